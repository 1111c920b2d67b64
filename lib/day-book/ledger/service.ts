import "server-only";
import { postingsOf, type Movement } from "@/lib/credits/ledger";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { keptAccount } from "./accounts";

export type Entry = {
  readonly movement: Movement;
  readonly workshopId: string;
  readonly enteredOn: CalendarDay;
  readonly noteId: string;
  readonly allocationId: string | null;
  /** The entry this one takes back. */
  readonly countersSequence: string | null;
};

/** The next number in the actor's book. Its row stays locked until the end, so that numbers follow each other. */
async function nextSequence(work: Work): Promise<string> {
  const seller = [work.actor.organisationId];
  await rows(
    work,
    "insert into ledger_heads (seller_id) values ($1) on conflict (seller_id) do nothing",
    seller,
  );
  const [head] = await rows<{ sequence: string }>(
    work,
    "update ledger_heads set sequence = sequence + 1 where seller_id = $1 returning sequence",
    seller,
  );
  if (!head) throw new Error("the Day book has no head");
  return head.sequence;
}

/** Writes a movement into the actor's Day book: one entry with its postings, which sum to nothing. Returns its number. */
export async function enterInLedger(work: Work, entry: Entry): Promise<string> {
  const sequence = await nextSequence(work);
  const { organisationId, userId } = work.actor;
  await rows(
    work,
    `insert into ledger_entries (seller_id, sequence, workshop_id, kind, entry_on, note_id, allocation_id, counters_sequence,
       entered_by_id) values ($1, $2, $3, $4, $5, $6, $7, $8, $9)`,
    [
      organisationId,
      sequence,
      entry.workshopId,
      entry.movement.kind,
      entry.enteredOn,
      entry.noteId,
      entry.allocationId,
      entry.countersSequence,
      userId,
    ],
  );
  for (const [place, posting] of postingsOf(entry.movement).entries())
    await rows(
      work,
      `insert into ledger_postings (seller_id, sequence, position, account, amount_minor, currency)
       values ($1, $2, $3, $4, $5, $6)`,
      [
        organisationId,
        sequence,
        place + 1,
        keptAccount(posting.account),
        String(posting.amountMinor),
        posting.currency,
      ],
    );
  return sequence;
}

/** The entry that wrote a note or an allocation down. */
export async function entryOf(
  work: Work,
  of: { readonly noteId: string; readonly allocationId: string | null },
): Promise<string | null> {
  const [entry] = await rows<{ sequence: string }>(
    work,
    `select sequence from ledger_entries where seller_id = $1 and note_id = $2 and allocation_id is not distinct from $3
       and kind in ('noteIssued', 'allocated')`,
    [work.actor.organisationId, of.noteId, of.allocationId],
  );
  return entry?.sequence ?? null;
}
