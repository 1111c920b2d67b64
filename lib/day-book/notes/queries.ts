import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { AllocationWay } from "@/lib/credits/ledger";
import type { NoteDocument } from "@/lib/credits/note-document";
import { thawedNote } from "@/lib/credits/note-shape";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { money, type Money } from "@/lib/kernel/money";
import { printClaimNumber } from "@/lib/claims/number";
import { allows } from "@/lib/people/rights-queries";
import { isNoteNumber, type NoteView } from "../views";

export type NoteItem = {
  readonly number: string;
  readonly sellerId: string;
  readonly kind: "credit" | "counter";
  readonly issuedOn: CalendarDay;
  /** Whether the actor's organisation issued it or was given it; one that sells and buys has both. */
  readonly side: "issued" | "received";
  /** The other side: the workshop for the distributor, the distributor for the workshop. */
  readonly partner: string;
  readonly claimNumber: string;
  readonly total: Money;
  readonly allocated: Money;
  readonly open: Money;
  readonly isCountered: boolean;
};

type NoteRow = {
  number: string;
  sequence: number;
  sellerId: string;
  kind: NoteItem["kind"];
  issuedOn: CalendarDay;
  partner: string;
  claimNumber: string;
  currency: string;
  totalMinor: string;
  allocatedMinor: string;
  isCountered: boolean;
};

const NOTES_PAGE_SIZE = 50;

const ALLOCATED = `(select coalesce(sum(a.amount_minor), 0)::bigint from credit_allocations a where a.note_id = n.id)`;
const COUNTERED = `exists (select 1 from credit_notes x where x.counters_id = n.id)`;
const OF_VIEW: Readonly<Record<NoteView, string>> = {
  open: `n.kind = 'credit' and not ${COUNTERED} and n.total_minor > ${ALLOCATED}`,
  used: `n.kind = 'credit' and not ${COUNTERED} and n.total_minor = ${ALLOCATED}`,
  all: "true",
};

const LIST = (view: NoteView) => `
  select n.number, n.sequence, n.seller_id as "sellerId", n.kind, n.issued_on as "issuedOn", o.name as partner,
    c.number as "claimNumber", n.currency, n.total_minor as "totalMinor", ${ALLOCATED}::text as "allocatedMinor",
    ${COUNTERED} as "isCountered"
  from credit_notes n join claims c on c.id = n.claim_id
    join organisations o on o.id = case when n.seller_id = $1 then n.workshop_id else n.seller_id end
  where $1 in (n.seller_id, n.workshop_id) and (not $4::boolean or n.seller_id = $1) and ${OF_VIEW[view]}
    and ($2::date is null or (n.issued_on, n.sequence) < ($2::date, $3::integer))
  order by n.issued_on desc, n.sequence desc limit ${NOTES_PAGE_SIZE + 1}`;

const present = (row: NoteRow, organisationId: string): NoteItem => {
  const currency = currencyFrom(row.currency);
  const [total, allocated] = [BigInt(row.totalMinor), BigInt(row.allocatedMinor)];
  const isUsable = row.kind === "credit" && !row.isCountered;
  return {
    number: row.number,
    sellerId: row.sellerId,
    kind: row.kind,
    issuedOn: row.issuedOn,
    side: row.sellerId === organisationId ? "issued" : "received",
    partner: row.partner,
    claimNumber: printClaimNumber(row.claimNumber),
    total: money(total, currency),
    allocated: money(allocated, currency),
    open: money(isUsable ? total - allocated : 0n, currency),
    isCountered: row.isCountered,
  };
};

export type NoteList = { readonly notes: readonly NoteItem[]; readonly nextBefore: string | null };
type Asked = {
  readonly view: NoteView;
  readonly before?: string | undefined;
  /** Only what the organisation issued itself: one that also buys is given notes too. */
  readonly isOwnOnly?: boolean;
};

/** Notes the actor's organisation issued or was given, newest first; `before` goes on after the last one of a page. */
export const listNotes = (actor: Actor, { view, before, isOwnOnly = false }: Asked): Promise<NoteList> =>
  unitOfWork(actor, async (work) => {
    if (!(await allows(work, "seeCreditNotes"))) return { notes: [], nextBefore: null };
    const [day = null, sequence = null] = before?.split(".") ?? [];
    const found = await rows<NoteRow>(work, LIST(view), [actor.organisationId, day, sequence, isOwnOnly]);
    const shown = found.slice(0, NOTES_PAGE_SIZE);
    const last = found.length > NOTES_PAGE_SIZE ? shown.at(-1) : undefined;
    return {
      notes: shown.map((row) => present(row, actor.organisationId)),
      nextBefore: last ? `${last.issuedOn}.${last.sequence}` : null,
    };
  });

export type AllocationView = {
  readonly id: string;
  readonly amount: Money;
  readonly how: AllocationWay;
  readonly reference: string;
  readonly allocatedOn: CalendarDay;
  readonly by: string | null;
  readonly isTakingBack: boolean;
  readonly isTakenBack: boolean;
};

export type FoundNote = {
  readonly id: string;
  readonly sellerId: string;
  readonly side: "distributor" | "workshop";
  readonly document: NoteDocument;
  readonly open: Money;
  readonly allocations: readonly AllocationView[];
  readonly counteredBy: { readonly number: string; readonly issuedOn: CalendarDay } | null;
  /** A later verdict came to other sums: the note has to be countered. */
  readonly isReversed: boolean;
  readonly isSettled: boolean;
};

type Named = { readonly number: string; readonly of: string };
type FoundRow = {
  id: string;
  sellerId: string;
  document: unknown;
  claimState: string;
  counterNumber: string | null;
  counterOn: CalendarDay | null;
  isReversed: boolean;
};

const FOUND = `
  select n.id, n.seller_id as "sellerId", n.document, c.state as "claimState", x.number as "counterNumber",
    x.issued_on as "counterOn", n.kind = 'credit' and x.id is null and v.id <> n.verdict_id
      and (v.credit_net_minor, v.credit_total_minor) <> (n.net_minor, n.total_minor) as "isReversed"
  from credit_notes n join claims c on c.id = n.claim_id
    left join credit_notes x on x.counters_id = n.id
    join lateral (select v.* from verdicts v where v.claim_id = n.claim_id order by v.decided_at desc limit 1) v on true
  where n.number = $2 and $1 in (n.seller_id, n.workshop_id) and ($3 = '' or n.seller_id::text = $3)
  order by n.issued_at desc limit 1`;

async function allocationsOf(
  work: Work,
  noteId: string,
  currency: Money["currency"],
): Promise<AllocationView[]> {
  const found = await rows<Omit<AllocationView, "amount"> & { amountMinor: string }>(
    work,
    `select a.id, a.amount_minor as "amountMinor", a.how, a.reference, a.allocated_on as "allocatedOn", u.name as by,
       a.takes_back_id is not null as "isTakingBack",
       exists (select 1 from credit_allocations x where x.takes_back_id = a.id) as "isTakenBack"
     from credit_allocations a left join users u on u.id = a.allocated_by_id where a.note_id = $1
     order by a.allocated_at, a.id`,
    [noteId],
  );
  return found.map(({ amountMinor, ...one }) => ({ ...one, amount: money(BigInt(amountMinor), currency) }));
}

/** A note by its number as one of its two sides may read it; null where there is none, or it is not theirs to read. */
export const findNote = (actor: Actor, { number, of }: Named): Promise<FoundNote | null> =>
  unitOfWork(actor, async (work) => {
    if (!isNoteNumber(number) || !(await allows(work, "seeCreditNotes"))) return null;
    const [note] = await rows<FoundRow>(work, FOUND, [actor.organisationId, number, of]);
    if (!note) return null;
    const document = thawedNote(note.document);
    const { currency, totalMinor } = document;
    const allocations = await allocationsOf(work, note.id, currency);
    const used = allocations.reduce((so, { amount }) => so + amount.minor, 0n);
    const isUsable = document.kind === "credit" && note.counterNumber === null;
    return {
      id: note.id,
      sellerId: note.sellerId,
      side: note.sellerId === actor.organisationId ? "distributor" : "workshop",
      document,
      open: money(isUsable ? totalMinor - used : 0n, currency),
      allocations,
      counteredBy:
        note.counterNumber && note.counterOn
          ? { number: note.counterNumber, issuedOn: note.counterOn }
          : null,
      isReversed: note.isReversed,
      isSettled: note.claimState === "settled",
    };
  });
