import "server-only";
import { claimFacts, type ClaimFacts } from "@/lib/claims/facts-shape";
import { printClaimNumber } from "@/lib/claims/number";
import type { CreditState } from "@/lib/claims/lifecycle";
import type { Credit } from "@/lib/credits/credit";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import type { ClaimLineOnNote, NoteContent, NoteParty } from "@/lib/credits/note-document";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { calendarDay, dayInZone } from "@/lib/kernel/calendar-day";
import type { Claim } from "@/models/claim";
import type { LineKeys } from "./note-service";

type VerdictLine = {
  lineId: string;
  lineNumber: number;
  creditState: CreditState;
  reasonCode: string;
  reason: string;
};

/** The verdict that counts: the newest, with the facts it was given on. */
export type NewestVerdict = {
  readonly id: string;
  readonly decidedAt: Date;
  readonly credit: Credit | null;
  readonly facts: ClaimFacts;
  readonly lines: readonly VerdictLine[];
};

/** The newest verdict of a claim; null where none was given. */
export async function newestVerdict(work: Work, claimId: string): Promise<NewestVerdict | null> {
  const [verdict] = await rows<{ id: string; decidedAt: Date; credit: unknown; facts: unknown }>(
    work,
    `select v.id, v.decided_at as "decidedAt", v.credit, r.facts from verdicts v
       join claim_revisions r on r.claim_id = v.claim_id and r.revision = v.revision
     where v.claim_id = $1 order by v.decided_at desc limit 1`,
    [claimId],
  );
  if (!verdict) return null;
  const lines = await rows<VerdictLine>(
    work,
    `select l.id as "lineId", l.line_number as "lineNumber", l.credit_state as "creditState", x.reason_code as "reasonCode",
       x.reason from verdict_lines x join claim_lines l on l.id = x.line_id where x.verdict_id = $1 order by l.line_number`,
    [verdict.id],
  );
  return {
    ...verdict,
    credit: thawedCredit(verdict.credit),
    facts: claimFacts.parse(verdict.facts),
    lines,
  };
}

async function partyOf(work: Work, organisationId: string): Promise<NoteParty> {
  const [party] = await rows<NoteParty>(
    work,
    `select name, legal_name as "legalName", address, country::text as country, tax_number as "taxNumber"
     from organisations where id = $1`,
    [organisationId],
  );
  if (!party) throw new Error("a party of a note is not in sight");
  return party;
}

const onNote = (facts: ClaimFacts, { lineNumber, reasonCode, reason }: VerdictLine): ClaimLineOnNote[] => {
  const line = facts.lines.find((one) => one.lineNumber === lineNumber);
  if (!line) return [];
  return [
    {
      lineNumber,
      partNumber: line.part.number,
      partName: line.part.name,
      serial: line.unit?.serial ?? line.serialTyped,
      quantity: line.quantity,
      invoicedOn: line.invoiceLine ? calendarDay(line.invoiceLine.invoicedOn) : null,
      reasonCode,
      reason,
    },
  ];
};

/** All a note says besides its number, its day and its sums. */
export async function headOfNote(
  work: Work,
  claim: Claim,
  verdict: NewestVerdict,
): Promise<Pick<NoteContent, "seller" | "buyer" | "accountNumber" | "claim" | "claimLines">> {
  const [account] = await rows<{ number: string }>(
    work,
    "select account_number as number from trading_accounts where id = $1",
    [claim.accountId],
  );
  return {
    seller: await partyOf(work, claim.sellerId),
    buyer: await partyOf(work, claim.workshopId),
    accountNumber: account?.number ?? "",
    claim: {
      number: printClaimNumber(claim.number),
      filedOn: calendarDay(verdict.facts.filedOn),
      decidedOn: dayInZone(verdict.decidedAt, work.actor.timeZone),
    },
    claimLines: verdict.lines.flatMap((line) => onNote(verdict.facts, line)),
  };
}

/** The keys a note's lines are kept under. */
export const lineKeysOf = ({ facts, lines }: NewestVerdict): LineKeys[] =>
  lines.map(({ lineId, lineNumber }) => ({
    lineId,
    lineNumber,
    invoiceLineId: facts.lines.find((line) => line.lineNumber === lineNumber)?.invoiceLine?.id ?? null,
  }));

/** Notes of a claim that were issued so far, countered ones too: what a page saw of them must still be so. */
export async function countIssued(work: Work, claimId: string): Promise<number> {
  const [found] = await rows<{ count: number }>(
    work,
    "select count(*)::integer as count from credit_notes where claim_id = $1 and kind = 'credit'",
    [claimId],
  );
  return found?.count ?? 0;
}

/** Whether, with this note, the notes that stand would give back more of an invoice line than was invoiced. */
export async function givesBackTooMuch(work: Work, noteId: string): Promise<boolean> {
  const [line] = await rows(
    work,
    `select i.id from invoice_lines i
     where i.id in (select l.invoice_line_id from credit_note_lines l where l.note_id = $1 and l.kind = 'part')
       and (select sum(l.net_minor) from credit_note_lines l join credit_notes n on n.seller_id = l.seller_id and n.id = l.note_id
            where l.seller_id = i.seller_id and l.invoice_line_id = i.id and l.kind = 'part' and n.kind = 'credit'
              and not exists (select 1 from credit_notes c where c.counters_id = n.id)) > i.unit_price_minor * i.quantity limit 1`,
    [noteId],
  );
  return line !== undefined;
}
