import "server-only";
import type { NoteDocument } from "@/lib/credits/note-document";
import { thawedNote } from "@/lib/credits/note-shape";
import type { AllocationWay, NoteInLedger } from "@/lib/credits/ledger";
import { claimForChange } from "@/lib/claims/moves/service";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { currencyFrom } from "@/lib/kernel/currency";
import type { Claim } from "@/models/claim";

export type AllocationRow = {
  id: string;
  amountMinor: string;
  how: AllocationWay;
  reference: string;
  takesBackId: string | null;
};

/** A credit note of the actor's organisation with what became of it, its claim locked. */
export type HeldNote = {
  readonly id: string;
  readonly sellerId: string;
  readonly verdictId: string;
  readonly document: NoteDocument;
  readonly claim: Claim;
  readonly inLedger: NoteInLedger;
  readonly allocations: readonly AllocationRow[];
};

type NoteRow = {
  id: string;
  sellerId: string;
  verdictId: string;
  claimNumber: string;
  document: unknown;
  currency: string;
  totalMinor: string;
};

/**
 * A credit note the actor's organisation issued, held for a change: its claim is locked first, then what became of the note is
 * read. Null where there is none of that number, and for a counter note.
 */
export async function holdNote(work: Work, number: string): Promise<HeldNote | null> {
  const [note] = await rows<NoteRow>(
    work,
    `select n.id, n.seller_id as "sellerId", n.verdict_id as "verdictId", c.number as "claimNumber", n.document, n.currency,
       n.total_minor as "totalMinor"
     from credit_notes n join claims c on c.id = n.claim_id
     where n.seller_id = $1 and n.number = $2 and n.kind = 'credit'`,
    [work.actor.organisationId, number],
  );
  const claim = note && (await claimForChange(work, note.claimNumber));
  if (!note || !claim) return null;
  const allocations = await rows<AllocationRow>(
    work,
    `select id, amount_minor as "amountMinor", how, reference, takes_back_id as "takesBackId" from credit_allocations
     where note_id = $1 order by allocated_at, id`,
    [note.id],
  );
  const [counter] = await rows(work, "select 1 as one from credit_notes where counters_id = $1", [note.id]);
  return {
    id: note.id,
    sellerId: note.sellerId,
    verdictId: note.verdictId,
    document: thawedNote(note.document),
    claim,
    allocations,
    inLedger: {
      currency: currencyFrom(note.currency),
      totalMinor: BigInt(note.totalMinor),
      isCountered: counter !== undefined,
      allocations: allocations.map(({ amountMinor }) => ({ amountMinor: BigInt(amountMinor) })),
    },
  };
}
