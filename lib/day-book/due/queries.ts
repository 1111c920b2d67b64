import "server-only";
import type { Actor } from "@/lib/access/actor";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import type { Credit } from "@/lib/credits/credit";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { dayInZone, type CalendarDay } from "@/lib/kernel/calendar-day";
import { printClaimNumber } from "@/lib/claims/number";
import { allows } from "@/lib/people/rights-queries";

/** A claim that was upheld and whose credit no note has given yet. */
export type DueCredit = {
  /** As it is printed. */
  readonly number: string;
  /** What a form sends: the digits, and how many notes the claim has had. */
  readonly key: string;
  readonly workshopName: string;
  readonly parts: string;
  readonly decidedOn: CalendarDay;
  /** The last day to object, where it is not over. */
  readonly contestUntil: CalendarDay | null;
  readonly credit: Credit;
  /** Its last note was countered, and no other was issued since. */
  readonly isCountered: boolean;
  /** A note from before a later verdict: it has to be countered first. */
  readonly standing: { readonly number: string; readonly sellerId: string } | null;
};

export type DueCredits = {
  readonly due: readonly DueCredit[];
  /** How many there are, also where not all are shown. */
  readonly count: number;
  readonly sums: readonly { readonly currency: string; readonly totalMinor: string }[];
  /** Claims under objection: nothing is issued until they are heard. */
  readonly contested: number;
};

type Row = {
  number: string;
  workshopName: string;
  parts: string;
  decidedAt: Date;
  contestUntil: CalendarDay | null;
  credit: unknown;
  isCountered: boolean;
  issuedBefore: number;
  standingNumber: string | null;
  sellerId: string;
};

const DUE_PAGE_SIZE = 100;

const DUE = `
  from claims c join lateral (select v.* from verdicts v where v.claim_id = c.id order by v.decided_at desc limit 1) v on true
  where c.seller_id = $1 and c.state = 'decided' and v.credit_total_minor > 0
    and exists (select 1 from claim_lines l where l.claim_id = c.id and l.credit_state in ('due', 'countered'))`;

const LIST = `
  select c.number, c.seller_id as "sellerId", w.name as "workshopName", v.decided_at as "decidedAt",
    c.contest_until as "contestUntil", v.credit,
    (select string_agg(p.name, ', ' order by l.line_number) from claim_lines l join parts p on p.seller_id = l.seller_id
       and p.id = l.part_id where l.claim_id = c.id) as parts,
    exists (select 1 from claim_lines l where l.claim_id = c.id and l.credit_state = 'countered') as "isCountered",
    (select count(*)::integer from credit_notes n where n.claim_id = c.id and n.kind = 'credit') as "issuedBefore",
    (select n.number from credit_notes n where n.claim_id = c.id and n.kind = 'credit'
       and not exists (select 1 from credit_notes x where x.counters_id = n.id)) as "standingNumber"
  from (select c.id as claim_id, v.id as verdict_id ${DUE} order by v.decided_at limit $2) due
    join claims c on c.id = due.claim_id join verdicts v on v.id = due.verdict_id
    join organisations w on w.id = c.workshop_id
  order by v.decided_at, c.number`;

const present = (row: Row, timeZone: string): DueCredit[] => {
  const todayOn = dayInZone(new Date(), timeZone);
  const credit = thawedCredit(row.credit);
  if (!credit) return [];
  return [
    {
      number: printClaimNumber(row.number),
      key: `${row.number}.${row.issuedBefore}`,
      workshopName: row.workshopName,
      parts: row.parts,
      decidedOn: dayInZone(row.decidedAt, timeZone),
      contestUntil: row.contestUntil && row.contestUntil < todayOn ? null : row.contestUntil,
      credit,
      isCountered: row.isCountered,
      standing: row.standingNumber ? { number: row.standingNumber, sellerId: row.sellerId } : null,
    },
  ];
};

const NOTHING: DueCredits = { due: [], count: 0, sums: [], contested: 0 };

/** What the actor's organisation has promised and not issued, oldest first; nothing for who may not issue. */
export const listDueCredits = (actor: Actor): Promise<DueCredits> =>
  unitOfWork(actor, async (work) => {
    if (!(await allows(work, "issueCredits"))) return NOTHING;
    const seller = actor.organisationId;
    const found = await rows<Row>(work, LIST, [seller, DUE_PAGE_SIZE]);
    const sums = await rows<{ currency: string; totalMinor: string; count: number }>(
      work,
      `select v.credit ->> 'currency' as currency, sum(v.credit_total_minor)::text as "totalMinor", count(*)::integer as count
       ${DUE} group by 1 order by 1`,
      [seller],
    );
    const [contested] = await rows<{ count: number }>(
      work,
      "select count(*)::integer as count from claims where seller_id = $1 and state = 'contested'",
      [seller],
    );
    return {
      due: found.flatMap((row) => present(row, actor.timeZone)),
      count: sums.reduce((so, { count }) => so + count, 0),
      sums,
      contested: contested?.count ?? 0,
    };
  });
