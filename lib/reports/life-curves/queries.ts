import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { ClaimState, VerdictOutcome } from "@/lib/claims/lifecycle";
import { OBSERVED } from "./observed-sql";
import type { AgeGroup, UnitOutcome } from "./outcomes";
import type { CataloguePart } from "./root-parts";

/** The parts of this distributor, each with the claim lines received on it; read from an index, no unit is touched. */
export const listParts = (work: Work): Promise<CataloguePart[]> =>
  rows<CataloguePart>(
    work,
    `select p.id, p.part_number as "partNumber", p.name, p.family, p.superseded_by_id as "supersededById",
       coalesce(l.claims, 0)::int as claims
     from parts p left join (select part_id, count(*) as claims from claim_lines where seller_id = $1
       group by part_id) l on l.part_id = p.id
     where p.seller_id = $1 and p.serial_tracked`,
    [work.actor.organisationId],
  );

/** Median days from shipment to first fitting, of `fittings` recorded by the data cut; null where there is none. */
export type Lag = { readonly lagDays: number | null; readonly fittings: number };

/** The lag of a family, from every recorded first fitting of it; fittings before their shipment are no lag. */
export async function findLag(work: Work, family: string, cutOn: CalendarDay): Promise<Lag> {
  const [lag] = await rows<Lag>(
    work,
    `select percentile_disc(0.5) within group (order by lag_days)::int as "lagDays", count(*)::int as fittings
     from (select min(f.fitted_on) - l.shipped_on as lag_days from parts p
         join units u on u.seller_id = p.seller_id and u.part_id = p.id
         join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
         join fittings f on f.seller_id = u.seller_id and f.unit_id = u.id
       where p.seller_id = $1 and p.family = $2 and f.fitted_on <= $3::date
       group by u.id, l.shipped_on) first where lag_days >= 0`,
    [work.actor.organisationId, family, cutOn],
  );
  return lag ?? { lagDays: null, fittings: 0 };
}

/** How many units shipped so long ago that they should be in use have a fitting on record. */
export type Recorded = { readonly recorded: number; readonly due: number };

/** Of the units shipped by a day, how many have a fitting on record. */
export async function findRecorded(
  work: Work,
  partIds: readonly string[],
  shippedBy: CalendarDay,
): Promise<Recorded> {
  const [found] = await rows<Recorded>(
    work,
    `select count(*)::int as due, count(*) filter (where exists (select 1 from fittings f
         where f.seller_id = u.seller_id and f.unit_id = u.id))::int as recorded
     from units u join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
     where u.seller_id = $1 and u.part_id = any ($2::uuid[]) and l.shipped_on <= $3::date`,
    [work.actor.organisationId, partIds, shippedBy],
  );
  return found ?? { recorded: 0, due: 0 };
}

export type Largest = { readonly id: string; readonly name: string; readonly claims: number };

/** The workshop with the most claims on a part; null where there is no claim. */
export async function findLargest(work: Work, partIds: readonly string[]): Promise<Largest | null> {
  const [found] = await rows<Largest>(
    work,
    `select o.id, o.name, m.claims from (select workshop_id, count(*)::int as claims from claim_lines
         where seller_id = $1 and part_id = any ($2::uuid[]) group by workshop_id
         order by count(*) desc, workshop_id limit 1) m join organisations o on o.id = m.workshop_id`,
    [work.actor.organisationId, partIds],
  );
  return found ?? null;
}

/** What the counts are asked with. `lagDays` is added to the shipment day where a start is estimated. */
export type Observing = {
  readonly partIds: readonly string[];
  readonly cutOn: CalendarDay;
  readonly lagDays: number;
  readonly start: "fitting" | "lag";
  readonly largestId: string | null;
};

const bindings = (work: Work, { partIds, cutOn, lagDays, start, largestId }: Observing): unknown[] => [
  work.actor.organisationId,
  partIds,
  cutOn,
  lagDays,
  start,
  work.actor.timeZone,
  largestId,
];

/** Counts by batch, age and outcome: one aggregate of the database, as many rows as there are different ages. */
export const countGroups = (work: Work, observing: Observing): Promise<AgeGroup[]> =>
  rows<AgeGroup>(
    work,
    `${OBSERVED} select batch_id as "batchId", age_days as "ageDays", outcome, assumed, at_largest as "atLargest",
       count(*)::int as count from observed group by batch_id, age_days, outcome, assumed, at_largest`,
    bindings(work, observing),
  );

export type BatchRow = {
  readonly id: string;
  readonly code: string;
  readonly partNumber: string;
  readonly madeOn: CalendarDay | null;
};

/** The batches of a part, the oldest first, those without a month last. */
export const listBatches = (work: Work, partIds: readonly string[]): Promise<BatchRow[]> =>
  rows<BatchRow>(
    work,
    `select b.id, b.code, p.part_number as "partNumber", b.made_on as "madeOn"
     from batches b join parts p on p.seller_id = b.seller_id and p.id = b.part_id
     where b.seller_id = $1 and b.part_id = any ($2::uuid[]) order by b.made_on nulls last, b.code`,
    [work.actor.organisationId, partIds],
  );

/** Claim lines on a part that name no unit: they cannot be given an age. */
export async function countWithoutUnit(work: Work, partIds: readonly string[], cutOn: CalendarDay) {
  const [found] = await rows<{ count: number }>(
    work,
    `select count(*)::int as count from claim_lines l join claims c on c.id = l.claim_id
     where l.seller_id = $1 and l.part_id = any ($2::uuid[]) and l.unit_id is null
       and c.state not in ('draft', 'discarded', 'withdrawn', 'lapsed') and c.filed_on <= $3::date`,
    [work.actor.organisationId, partIds, cutOn],
  );
  return found?.count ?? 0;
}

/** Which of the observed units: of these batches (null: whatever batch), with these outcomes, of an age in days. */
export type Behind = {
  readonly batchIds: readonly string[] | null;
  readonly outcomes: readonly UnitOutcome[];
  readonly withoutLargest: boolean;
  readonly fromDays: number;
  readonly toDays: number;
};

export type ClaimBehind = {
  readonly number: string;
  readonly state: ClaimState;
  readonly outcome: VerdictOutcome | null;
  readonly counted: UnitOutcome;
  readonly batchCode: string | null;
  readonly serial: string | null;
  readonly workshop: string;
  readonly ageDays: number;
  readonly failedOn: CalendarDay;
  readonly total: number;
};

export const BEHIND_PAGE = 50;

/** One page of the claims behind a figure, youngest unit first; each row carries how many there are in all. */
export const listBehind = (
  work: Work,
  observing: Observing,
  { behind, page }: { readonly behind: Behind; readonly page: number },
): Promise<ClaimBehind[]> =>
  rows<ClaimBehind>(
    work,
    `${OBSERVED} select c.number, c.state, c.outcome, o.outcome as counted, b.code as "batchCode", u.serial,
       w.name as workshop, o.age_days as "ageDays", o.failed_on as "failedOn",
       (count(*) over ())::int as total
     from observed o join claims c on c.id = o.claim_id join organisations w on w.id = c.workshop_id
       join units u on u.seller_id = $1 and u.id = o.unit_id
       left join batches b on b.seller_id = $1 and b.id = o.batch_id
     where o.outcome = any ($8::text[]) and o.age_days between $9 and $10
       and ($11::uuid[] is null or o.batch_id = any ($11::uuid[])) and not ($12 and o.at_largest)
     order by o.age_days, c.number limit ${BEHIND_PAGE} offset $13`,
    [
      ...bindings(work, observing),
      behind.outcomes,
      behind.fromDays,
      behind.toDays,
      behind.batchIds,
      behind.withoutLargest,
      (page - 1) * BEHIND_PAGE,
    ],
  );
