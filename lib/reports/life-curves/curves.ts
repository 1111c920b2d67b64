import { curveOf, logRankOf, weibullOf } from "./fits";
import { MONTH_DAYS } from "@/lib/reliability/months";
import { monthCells, observe, type Observation, type Observed } from "./observations";
import type { AgeGroup } from "./outcomes";
import type { LifeCurvesQuery } from "./schema";
import { ratePerThousand } from "./screen";
import type { Comparison, CurveStep, MonthLine, RiskCell, Series, Weibull } from "./view";

/** A curve is pale from where fewer units than these are at risk. */
const FADES_BELOW = 10;
/** A fit on fewer failures is warned of. */
const THIN_FIT = 10;
/** At most so many ages stand under a curve. */
const RISK_CELLS = 9;

const atRiskAt = (rows: readonly Observed[], ageDays: number): number =>
  rows.reduce((sum, row) => sum + (row.ageDays >= ageDays ? row.count : 0), 0);

/** Everything drawn of one batch, or of the others pooled. */
export function seriesOf(
  key: string | null,
  groups: readonly AgeGroup[],
  { count, riskMonths }: { readonly count: LifeCurvesQuery["count"]; readonly riskMonths: number },
): Series {
  const observed = observe(groups, count);
  const hasBand = count === "upheld" && observed.ended.undecided > 0;
  return {
    key,
    units: observed.units,
    failed: observed.failed,
    oldestDays: observed.oldestDays,
    curve: curveOf(observed.rows),
    thinFrom: thinFrom(observed),
    atMost: hasBand ? curveOf(observe(groups, "upheldAtMost").rows) : null,
    risk: riskCells(observed, riskMonths),
    weibull: weibullSheet(observed),
  };
}

/** The first age after which fewer than ten are left; null where there are ten to the end or never were. */
function thinFrom({ rows, oldestDays }: Observation): number | null {
  const ages = [...new Set(rows.map(({ ageDays }) => ageDays))];
  const last = ages.filter((age) => atRiskAt(rows, age) >= FADES_BELOW).at(-1);
  if (last === undefined) return 0;
  return last < oldestDays ? last : null;
}

/** Months from one column under the curves to the next, so that all curves fit. */
export const riskStep = (oldestDays: number): number =>
  [1, 2, 3, 6, 12, 24].find((step) => oldestDays / MONTH_DAYS / step < RISK_CELLS) ?? 60;

function riskCells({ rows, oldestDays }: Observation, step: number): RiskCell[] {
  const cells = Math.floor(oldestDays / MONTH_DAYS / step) + 1;
  return Array.from({ length: cells }, (_, place) => {
    const until = place * step * MONTH_DAYS;
    const since = (place - 1) * step * MONTH_DAYS;
    // The first column is the beginning: all at risk, nothing has ended yet.
    const between = rows.filter(
      ({ ageDays }) => place > 0 && ageDays >= Math.max(since, 0) && ageDays < until,
    );
    const sum = (failed: boolean) =>
      between.reduce((total, row) => total + (row.failed === failed ? row.count : 0), 0);
    return { months: place * step, atRisk: atRiskAt(rows, until), failed: sum(true), ended: sum(false) };
  });
}

function weibullSheet({ rows, failed }: Observation): Weibull {
  const fit = weibullOf(rows);
  if (fit.kind === "none") return { ...fit, failed };
  const { lower, upper } = fit.shape;
  const says =
    (upper ?? Infinity) < 1
      ? "early"
      : lower > 1
        ? "wearing"
        : lower > 0.8 && (upper ?? 9) < 1.25
          ? "steady"
          : "unclear";
  return {
    ...fit,
    failed,
    isThin: failed < THIN_FIT,
    says,
    points: probabilityPoints(curveOf(rows)),
  };
}

/** Plotted in the middle of each fall, so that neither end of a step is favoured. */
function probabilityPoints(curve: readonly CurveStep[]): { ageDays: number; failedShare: number }[] {
  const falls = curve.filter(({ failed }) => failed > 0);
  return falls.map(({ ageDays, survival }, place) => {
    const before = falls[place - 1]?.survival ?? 1;
    return { ageDays, failedShare: 1 - (before + survival) / 2 };
  });
}

const survivalAt = (curve: readonly CurveStep[], ageDays: number): number =>
  curve.filter((step) => step.ageDays <= ageDays).at(-1)?.survival ?? 1;

type Compared = {
  readonly key: string;
  readonly rows: readonly Observed[];
  readonly curve: readonly CurveStep[];
};
type Others = { readonly rows: readonly Observed[]; readonly curve: readonly CurveStep[] };

/** The first batch against the others: shares at the last whole month with ten of both, and the test of all curves. */
export function comparisonOf(
  first: Compared | undefined,
  others: Others | null,
  all: readonly (readonly Observed[])[],
): Comparison | null {
  const test = first && others && all.length > 1 ? logRankOf(all) : null;
  if (!first || !others || !test) return null;
  const lasts = [first.rows, others.rows].map((rows) =>
    rows.reduce(
      (most, { ageDays }) => (atRiskAt(rows, ageDays) >= FADES_BELOW ? Math.max(most, ageDays) : most),
      0,
    ),
  );
  const months = Math.max(1, Math.floor(Math.min(...lasts) / MONTH_DAYS));
  const age = months * MONTH_DAYS;
  return {
    key: first.key,
    ...test,
    ages: { months, one: survivalAt(first.curve, age), others: survivalAt(others.curve, age) },
  };
}

/** Failures by month in service, with the rate of the others at the same ages. */
export function monthLines(one: Observation, others: Observation | null): MonthLine[] {
  const theirs = others ? monthCells(others) : [];
  return monthCells(one).map((cell) => {
    const beside = theirs[cell.month];
    return {
      ...cell,
      rate: ratePerThousand(cell.failed, cell.unitDays),
      others: beside ? (ratePerThousand(beside.failed, beside.unitDays)?.value ?? null) : null,
    };
  });
}
