import { MONTH_DAYS } from "@/lib/reliability/months";
import type { AgeGroup, UnitOutcome } from "./outcomes";

/**
 * What counts as a failure. `filed`: filed and not declined. `upheld`: upheld with a share on the part, the undecided end
 * without a failure. `upheldAtMost`: the same if every undecided claim were upheld.
 */
export type Counted = "filed" | "upheld" | "upheldAtMost";

export const FAILING: Readonly<Record<Counted, readonly UnitOutcome[]>> = {
  filed: ["confirmed", "otherCause", "undecided"],
  upheld: ["confirmed"],
  upheldAtMost: ["confirmed", "undecided"],
};

/** Equal units whose observation ended at an age in days after a start at age 0. */
export type Observed = { readonly ageDays: number; readonly failed: boolean; readonly count: number };

/** So many units that are not part of the curve, each kind told in words. */
export type LeftOut = {
  /** Failed on the day of fitting; no part of a life. */
  readonly deadOnArrival: number;
  readonly shelf: number;
  /** Failed before the day their service began, recorded or estimated. */
  readonly beforeStart: number;
  /** Fitted when nobody could claim any more. */
  readonly afterCover: number;
  readonly noShipment: number;
  /** In service for less than a day. */
  readonly today: number;
};

export type Observation = {
  readonly rows: readonly Observed[];
  readonly units: number;
  readonly failed: number;
  readonly assumed: number;
  readonly unitDays: number;
  readonly oldestDays: number;
  /** Units of the curve by how their observation ended. */
  readonly ended: Readonly<Record<UnitOutcome, number>>;
  readonly leftOut: LeftOut;
};

const sumOf = (groups: readonly AgeGroup[]): number => groups.reduce((sum, { count }) => sum + count, 0);

const NEVER: readonly UnitOutcome[] = ["shelf", "beforeStart", "afterCover", "noShipment"];

/**
 * The rules of observation on counts: who was at risk, until which age, and whether they failed there. A declined claim
 * ends its unit at the failure day without a failure, as do a removal and the end of cover; a failure on day 0 is dead on
 * arrival and counted apart; units on the shelf are not at risk.
 */
export function observe(groups: readonly AgeGroup[], counted: Counted): Observation {
  const failing = FAILING[counted];
  const of = (outcome: UnitOutcome) => sumOf(groups.filter((group) => group.outcome === outcome));
  const placed = groups.flatMap((group) =>
    group.ageDays === null || NEVER.includes(group.outcome) ? [] : [{ ...group, ageDays: group.ageDays }],
  );
  const lived = placed.filter(({ ageDays }) => ageDays > 0);
  const onDayNought = placed.filter(({ ageDays }) => ageDays === 0);
  const isFailed = ({ outcome }: AgeGroup) => failing.includes(outcome);
  const deadOnArrival = sumOf(onDayNought.filter(isFailed));
  return {
    rows: merged(lived.map((one) => ({ ageDays: one.ageDays, failed: isFailed(one), count: one.count }))),
    units: sumOf(lived),
    failed: sumOf(lived.filter(isFailed)),
    assumed: sumOf(lived.filter(({ assumed }) => assumed)),
    unitDays: lived.reduce((sum, { ageDays, count }) => sum + ageDays * count, 0),
    oldestDays: lived.reduce((most, { ageDays }) => Math.max(most, ageDays), 0),
    ended: endedOf(lived),
    leftOut: {
      deadOnArrival,
      shelf: of("shelf"),
      beforeStart: of("beforeStart"),
      afterCover: of("afterCover"),
      noShipment: of("noShipment"),
      today: sumOf(onDayNought) - deadOnArrival,
    },
  };
}

/** Rows of equal age and end together, the youngest first, failures before the others of their age. */
function merged(rows: readonly Observed[]): Observed[] {
  const byKey = new Map<string, Observed>();
  for (const row of rows) {
    const key = `${row.ageDays} ${row.failed}`;
    byKey.set(key, { ...row, count: row.count + (byKey.get(key)?.count ?? 0) });
  }
  return [...byKey.values()].toSorted((a, b) => a.ageDays - b.ageDays || Number(b.failed) - Number(a.failed));
}

const endedOf = (lived: readonly AgeGroup[]): Record<UnitOutcome, number> => {
  const of = (outcome: UnitOutcome) => sumOf(lived.filter((group) => group.outcome === outcome));
  return {
    confirmed: of("confirmed"),
    otherCause: of("otherCause"),
    undecided: of("undecided"),
    declined: of("declined"),
    removed: of("removed"),
    coverEnded: of("coverEnded"),
    running: of("running"),
    shelf: 0,
    beforeStart: 0,
    afterCover: 0,
    noShipment: 0,
  };
};

/** Ages in [month, month + 1) months: its failures, and the days units spent at those ages. */
export type MonthCell = {
  readonly month: number;
  /** Youngest and oldest whole age in days of the cell. */
  readonly fromDays: number;
  readonly toDays: number;
  readonly atRisk: number;
  readonly failed: number;
  readonly unitDays: number;
};

/** The cells of a life from month 0 to the oldest unit. */
export function monthCells({ rows, oldestDays }: Pick<Observation, "rows" | "oldestDays">): MonthCell[] {
  const cells = oldestDays === 0 ? 0 : Math.floor(oldestDays / MONTH_DAYS) + 1;
  return Array.from({ length: cells }, (_, month) => {
    const [start, end] = [month * MONTH_DAYS, (month + 1) * MONTH_DAYS];
    const fromDays = Math.ceil(start);
    const toDays = Math.ceil(end) - 1;
    const within = rows.filter(({ ageDays }) => ageDays >= start);
    return {
      month,
      fromDays,
      toDays,
      atRisk: within.reduce((sum, { count }) => sum + count, 0),
      failed: within.reduce(
        (sum, { ageDays, failed, count }) => sum + (failed && ageDays < end ? count : 0),
        0,
      ),
      unitDays: within.reduce((sum, { ageDays, count }) => sum + (Math.min(ageDays, end) - start) * count, 0),
    };
  });
}
