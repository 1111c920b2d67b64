import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { seesSide } from "@/lib/claims/seeing";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { money, type Money } from "@/lib/kernel/money";
import { agesOf, sumsByCurrency, type Sum } from "./ages";
import type { WorkshopToday } from "./view";

type Row = { currency: string; minor: string };

// Everything is asked of open claims alone, which an index holds by workshop and state; what is settled owes nothing.
const OPEN = "c.workshop_id = $1 and c.state in ('filed', 'beingJudged', 'answerNeeded', 'contested')";
const UNDER_WAY = "c.workshop_id = $1 and c.state in ('decided', 'contested', 'beingJudged')";

const PROMISED = `
  select c.currency, sum(case when n.total_minor is null then coalesce(v.credit_total_minor, 0)
      else n.total_minor - n.allocated_minor end)::text as minor
  from claims c
    left join lateral (select credit_total_minor from verdicts v where v.claim_id = c.id
      order by v.decided_at desc limit 1) v on c.state = 'decided'
    left join lateral (select n.total_minor, coalesce((select sum(a.amount_minor) from credit_allocations a
        where a.note_id = n.id), 0) as allocated_minor
      from credit_notes n where n.claim_id = c.id and n.kind = 'credit'
        and not exists (select 1 from credit_notes k where k.counters_id = n.id)
      order by n.issued_at desc limit 1) n on true
  where ${UNDER_WAY} group by c.currency`;

const CREDITED = `
  select n.currency, sum(a.amount_minor)::text as minor from credit_allocations a join credit_notes n on n.id = a.note_id
  where a.workshop_id = $1 and a.allocated_on >= date_trunc('month', $2::date) and a.allocated_on <= $2::date
  group by n.currency`;

const TO_SEND = `
  select c.number, min(r.due_on)::text as "dueOn" from claims c
    join claim_lines l on l.claim_id = c.id and l.return_state = 'awaited'
    join return_lines rl on rl.seller_id = l.seller_id and rl.line_id = l.id
    join part_returns r on r.id = rl.return_id
  where ${OPEN} group by c.number order by min(r.due_on), c.number limit 20`;

const CONTEST_SOON = `
  select c.number, c.contest_until::text as until from claims c
  where c.workshop_id = $1 and c.state = 'decided' and c.outcome <> 'upheld' and c.contest_waived_at is null
    and c.contest_until between $2::date and $2::date + 7
  order by c.contest_until, c.number limit 20`;

const toMoney = ({ currency, minor }: Sum): Money => money(minor, currencyFrom(currency));
const sumsOf = (found: readonly Row[]): Money[] =>
  sumsByCurrency(
    found.map(({ currency, minor }) => ({ currency: currency.trim(), minor: BigInt(minor) })),
  ).map(toMoney);

const openClaims = (work: Work) =>
  rows<Row & { filedOn: CalendarDay }>(
    work,
    `select c.filed_on::text as "filedOn", c.asked_minor::text as minor, c.currency from claims c where ${OPEN}`,
    [work.actor.organisationId],
  );

async function readToday(work: Work, today: CalendarDay): Promise<WorkshopToday> {
  const { organisationId } = work.actor;
  const open = await openClaims(work);
  return {
    ages: agesOf(open, today),
    openCount: open.length,
    asked: sumsOf(open),
    promised: sumsOf(await rows<Row>(work, PROMISED, [organisationId])),
    creditedThisMonth: sumsOf(await rows<Row>(work, CREDITED, [organisationId, today])),
    toSend: await rows(work, TO_SEND, [organisationId]),
    contestSoon: await rows(work, CONTEST_SOON, [organisationId, today]),
  };
}

/** How the actor's workshop stands today, on its own calendar; null for a person whose roles do not go with that side. */
export const findWorkshopToday = (actor: Actor): Promise<WorkshopToday | null> =>
  seesSide(actor, "own")
    ? unitOfWork(actor, (work) => readToday(work, todayOf(actor)))
    : Promise.resolve(null);
