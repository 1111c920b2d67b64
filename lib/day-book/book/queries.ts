import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { addMonths, calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { allows } from "@/lib/people/rights-queries";
import { postingFrom } from "../ledger/accounts";
import type { BookQuery } from "../schema";
import type { Sums } from "./proof";
import { withBalances, type Balance, type BookEntry, type RunningEntry } from "./running";

const BOOK_PAGE_SIZE = 50;
const ONE_MORE = BOOK_PAGE_SIZE + 1;

export type DayBook = {
  readonly entries: readonly RunningEntry[];
  /** The number of the last entry shown, where there are older ones. */
  readonly nextBefore: string | null;
  /** What workshops were owed before the period and after it, each currency apart. */
  readonly opening: readonly Balance[];
  readonly closing: readonly Balance[];
  /** Of the whole book of the workshop asked for, or of all: never of a month alone. */
  readonly sums: readonly Sums[];
  readonly workshops: readonly { readonly id: string; readonly name: string }[];
};

type Kept = { account: string; amountMinor: string; currency: string };
type EntryRow = Omit<BookEntry, "postings"> & { postings: Kept[] };
type Period = {
  readonly workshopId: string | null;
  readonly from: CalendarDay | null;
  readonly to: CalendarDay | null;
};

const IN_PERIOD = `e.seller_id = $1 and ($2::uuid is null or e.workshop_id = $2::uuid)
  and ($3::date is null or e.entry_on >= $3::date) and ($4::date is null or e.entry_on < $4::date)`;

const periodOf = ({ workshop, month }: BookQuery): Period => {
  const from = month === "" ? null : calendarDay(`${month}-01`);
  return { workshopId: workshop || null, from, to: from && addMonths(from, 1) };
};

const listEntries = (
  work: Work,
  { workshopId, from, to }: Period,
  before: string | null,
): Promise<EntryRow[]> =>
  rows<EntryRow>(
    work,
    `select e.sequence::text as sequence, e.entry_on as "enteredOn", e.kind, e.workshop_id as "workshopId",
       w.name as "workshopName", n.number as "noteNumber", a.reference, e.counters_sequence::text as counters,
       (select x.sequence::text from ledger_entries x where x.seller_id = e.seller_id and x.counters_sequence = e.sequence)
         as "counteredBy", u.name as by,
       (select json_agg(json_build_object('account', p.account, 'amountMinor', p.amount_minor::text, 'currency', p.currency)
          order by p.position) from ledger_postings p where p.seller_id = e.seller_id and p.sequence = e.sequence) as postings
     from ledger_entries e join organisations w on w.id = e.workshop_id join credit_notes n on n.id = e.note_id
       left join credit_allocations a on a.id = e.allocation_id left join users u on u.id = e.entered_by_id
     where ${IN_PERIOD} and ($5::bigint is null or e.sequence < $5::bigint)
     order by e.sequence desc limit ${ONE_MORE}`,
    [work.actor.organisationId, workshopId, from, to, before],
  );

type BalanceRow = { workshopId: string; currency: string; owedMinor: string };

/** What workshops are owed by entries before a number or a day; by all where neither is said. */
async function balancesBefore(
  work: Work,
  workshopId: string | null,
  before: { readonly sequence?: string; readonly day?: CalendarDay },
): Promise<Balance[]> {
  const found = await rows<BalanceRow>(
    work,
    `select e.workshop_id as "workshopId", p.currency, (-sum(p.amount_minor))::text as "owedMinor"
     from ledger_entries e join ledger_postings p on p.seller_id = e.seller_id and p.sequence = e.sequence
     where e.seller_id = $1 and ($2::uuid is null or e.workshop_id = $2::uuid) and p.account = 'workshopPayable'
       and ($3::bigint is null or e.sequence < $3::bigint) and ($4::date is null or e.entry_on < $4::date)
     group by 1, 2`,
    [work.actor.organisationId, workshopId, before.sequence ?? null, before.day ?? null],
  );
  return found.map((row) => ({
    workshopId: row.workshopId,
    currency: currencyFrom(row.currency),
    owedMinor: BigInt(row.owedMinor),
  }));
}

type SumsRow = { currency: string } & Readonly<Record<Exclude<keyof Sums, "currency">, string>>;

// One statement: every figure is of the same moment.
const SUMS = `
  with notes as (
    select n.currency, case n.kind when 'credit' then n.total_minor else -n.total_minor end as signed,
      coalesce((select sum(a.amount_minor) from credit_allocations a where a.note_id = n.id), 0) as allocated,
      case when n.kind = 'credit' and not exists (select 1 from credit_notes x where x.counters_id = n.id)
        then n.total_minor - coalesce((select sum(a.amount_minor) from credit_allocations a where a.note_id = n.id), 0)
        else 0 end as open
    from credit_notes n where n.seller_id = $1 and ($2::uuid is null or n.workshop_id = $2::uuid)),
  postings as (
    select p.currency, p.amount_minor, p.account, e.kind
    from ledger_entries e join ledger_postings p on p.seller_id = e.seller_id and p.sequence = e.sequence
    where e.seller_id = $1 and ($2::uuid is null or e.workshop_id = $2::uuid)),
  of_notes as (select currency, sum(signed) as notes, sum(allocated) as allocated, sum(open) as open from notes group by 1),
  of_postings as (select currency,
      coalesce(-sum(amount_minor) filter (where account = 'workshopPayable' and kind in ('noteIssued', 'noteCountered')), 0) as credited,
      coalesce(-sum(amount_minor) filter (where account = 'workshopPayable'), 0) as owed, sum(amount_minor) as postings
    from postings group by 1)
  select currency, coalesce(n.notes, 0)::text as "notesMinor", coalesce(n.allocated, 0)::text as "allocatedMinor",
    coalesce(n.open, 0)::text as "openMinor", coalesce(p.credited, 0)::text as "creditedMinor",
    coalesce(p.owed, 0)::text as "owedMinor", coalesce(p.postings, 0)::text as "postingsMinor"
  from of_notes n full join of_postings p using (currency) order by currency`;

async function sumsOf(work: Work, workshopId: string | null): Promise<Sums[]> {
  const found = await rows<SumsRow>(work, SUMS, [work.actor.organisationId, workshopId]);
  return found.map((row) => ({
    currency: currencyFrom(row.currency),
    notesMinor: BigInt(row.notesMinor),
    allocatedMinor: BigInt(row.allocatedMinor),
    openMinor: BigInt(row.openMinor),
    creditedMinor: BigInt(row.creditedMinor),
    owedMinor: BigInt(row.owedMinor),
    postingsMinor: BigInt(row.postingsMinor),
  }));
}

const EMPTY: DayBook = { entries: [], nextBefore: null, opening: [], closing: [], sums: [], workshops: [] };

/** The Day book of the actor's organisation: its entries, newest first, with running balances and sums that prove themselves. */
export const readDayBook = (actor: Actor, query: BookQuery): Promise<DayBook> =>
  unitOfWork(actor, async (work) => {
    if (!(await allows(work, "seeDayBook"))) return EMPTY;
    const period = periodOf(query);
    const { workshopId, from, to } = period;
    const found = await listEntries(work, period, query.before ?? null);
    const shown = found
      .slice(0, BOOK_PAGE_SIZE)
      .map((row): BookEntry => ({ ...row, postings: row.postings.map(postingFrom) }));
    const oldest = shown.at(-1);
    const before = oldest ? await balancesBefore(work, workshopId, { sequence: oldest.sequence }) : [];
    return {
      entries: withBalances(shown, before),
      nextBefore: found.length > BOOK_PAGE_SIZE ? (oldest?.sequence ?? null) : null,
      opening: from ? await balancesBefore(work, workshopId, { day: from }) : [],
      closing: await balancesBefore(work, workshopId, to ? { day: to } : {}),
      sums: await sumsOf(work, workshopId),
      workshops: await rows<{ id: string; name: string }>(
        work,
        `select o.id, o.name from organisations o
         where exists (select 1 from ledger_entries e where e.seller_id = $1 and e.workshop_id = o.id) order by o.name`,
        [actor.organisationId],
      ),
    };
  });
