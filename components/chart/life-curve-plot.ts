import { scaleLinear } from "d3-scale";
import { area, curveStepAfter, line } from "d3-shape";
import type { CurveStep, Series } from "@/lib/reports/life-curves/view";
import { MONTH_DAYS } from "@/lib/reliability/months";
import { spreadLabels, type Placed } from "./run-log-labels";

/** Sizes of a life curve's drawing in its own units. */
export type LifeFrame = {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly lineHeight: number;
};

type Point = { readonly x: number; readonly y: number };
export type StepPoint = Point & {
  readonly fromAge: number;
  readonly toAge: number;
  readonly failed: number;
  readonly atRisk: number;
  readonly survival: number;
};

export type PlottedCurve = {
  readonly key: string | null;
  /** Place in the order of the five styles; the others pooled have none. */
  readonly style: number | null;
  readonly path: string;
  /** The same from where fewer than ten were at risk. */
  readonly thinPath: string;
  readonly band: string;
  readonly atMost: string;
  readonly points: readonly StepPoint[];
};
export type CurveLabel = Placed<{
  readonly key: string | null;
  readonly style: number | null;
  readonly units: number;
  readonly x: number;
}>;

export type LifePlot = {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly curves: readonly PlottedCurve[];
  readonly labels: readonly CurveLabel[];
  readonly monthTicks: readonly { readonly x: number; readonly months: number }[];
  readonly shareTicks: readonly { readonly y: number; readonly share: number }[];
  /** The share axis does not begin at nought. */
  readonly isBroken: boolean;
};

export type LifeFigure = {
  readonly series: readonly Series[];
  readonly rest: Series | null;
  readonly isZoomed: boolean;
};

type Scales = { readonly x: (age: number) => number; readonly y: (share: number) => number };

const round = (value: number): number => Number(value.toFixed(1));

/** A curve carries at most so many links; where more ages failed, one stands for a month. */
const MOST_POINTS = 24;

const GAP_OF_TICKS = 52;

/** Every curve of a figure placed: steps down from all at age 0, its band, and its name where it ends. */
export function lifePlot({ series, rest, isZoomed }: LifeFigure, frame: LifeFrame): LifePlot {
  const all = [...series, ...(rest ? [rest] : [])];
  const floor = isZoomed ? floorOf(all) : 0;
  const [left, right] = [frame.left, frame.width - frame.right];
  const [top, bottom] = [frame.top, frame.top + frame.height];
  const oldest = Math.max(MONTH_DAYS, ...all.map(({ oldestDays }) => oldestDays));
  const days = scaleLinear().domain([0, oldest]).range([left, right]);
  const shares = scaleLinear().domain([floor, 1]).range([bottom, top]).clamp(true);
  const scales = { x: (age: number) => round(days(age)), y: (share: number) => round(shares(share)) };
  const curves = all.map((one, place) => plotted(one, place < series.length ? place : null, scales));
  const labels = all.map((one, place) => ({
    key: one.key,
    style: place < series.length ? place : null,
    units: one.units,
    x: scales.x(one.oldestDays),
    wantedY: scales.y(one.curve.at(-1)?.survival ?? 1),
  }));
  const months = scaleLinear().domain([0, oldest / MONTH_DAYS]);
  const step = tickStep(oldest / MONTH_DAYS, Math.max(2, Math.floor((right - left) / GAP_OF_TICKS)));
  return {
    left,
    right,
    top,
    bottom,
    curves,
    labels: spreadLabels(labels, { top, bottom, lineHeight: frame.lineHeight * 2 + 2 }),
    monthTicks: Array.from({ length: Math.floor((months.domain()[1] ?? 0) / step) + 1 }, (_, at) => ({
      x: scales.x(at * step * MONTH_DAYS),
      months: at * step,
    })),
    shareTicks: shareTicks(floor).map((share) => ({ y: scales.y(share), share })),
    isBroken: floor > 0,
  };
}

/** The highest step of a tenth that shows every curve and the lower limits of its last age. */
function floorOf(all: readonly Series[]): number {
  const lowest = all.flatMap(({ curve }) => curve.map(({ survival, lower }) => lower ?? survival));
  return Math.max(
    0,
    Math.floor(Math.min(1, ...lowest) * 10 - 0.001) / 10 - 0.1 * Number(lowest.length === 0),
  );
}

/** Shares to draw a line at, down from all: round ones, six at most, whatever the axis begins at. */
export function shareTicks(floor: number): number[] {
  const percents = Math.round((1 - floor) * 100);
  const step = [2, 5, 10].find((one) => percents / one <= 5) ?? 25;
  return Array.from({ length: Math.floor(percents / step) + 1 }, (_, at) => (100 - at * step) / 100);
}

/** Months from one tick to the next: a step people count in. */
function tickStep(months: number, most: number): number {
  return [1, 2, 3, 6, 12, 24, 60].find((step) => months / step <= most) ?? 120;
}

function plotted(one: Series, style: number | null, scales: Scales): PlottedCurve {
  const end = one.oldestDays;
  const thinFrom = one.thinFrom ?? Infinity;
  const whole = stepsTo(one.curve, end);
  const solid = whole.filter(({ ageDays }) => ageDays <= thinFrom);
  const lastSolid = solid.at(-1);
  const thin = lastSolid && thinFrom < end ? whole.filter(({ ageDays }) => ageDays >= thinFrom) : [];
  const thinStart = thin.length > 0 && lastSolid ? [{ ...lastSolid, ageDays: thinFrom }] : [];
  const solidEnd = lastSolid && thinFrom < end ? [{ ...lastSolid, ageDays: thinFrom }] : [];
  return {
    key: one.key,
    style,
    path: lineOf([...solid, ...solidEnd], scales),
    thinPath: lineOf([...thinStart, ...thin], scales),
    band: style === null ? "" : bandOf(whole, scales),
    atMost: one.atMost ? lineOf(stepsTo(one.atMost, end), scales) : "",
    points: pointsOf(one.curve, scales),
  };
}

/** A curve from all at age 0 to its oldest unit; past that nothing is extrapolated. */
const stepsTo = (curve: readonly CurveStep[], end: number): CurveStep[] => {
  const start: CurveStep = { ageDays: 0, survival: 1, lower: null, upper: null, atRisk: 0, failed: 0 };
  const last = curve.at(-1) ?? start;
  return [start, ...curve, ...(last.ageDays < end ? [{ ...last, ageDays: end }] : [])];
};

const lineOf = (steps: readonly CurveStep[], { x, y }: Scales): string =>
  line<CurveStep>()
    .x(({ ageDays }) => x(ageDays))
    .y(({ survival }) => y(survival))
    .curve(curveStepAfter)([...steps]) ?? "";

/** Between the limits, where there are any: at no failure and at none left there are no log-log limits. */
const bandOf = (steps: readonly CurveStep[], { x, y }: Scales): string =>
  area<CurveStep>()
    .defined(({ lower, upper }) => lower !== null && upper !== null)
    .x(({ ageDays }) => x(ageDays))
    .y0(({ lower }) => y(lower ?? 0))
    .y1(({ upper }) => y(upper ?? 1))
    .curve(curveStepAfter)([...steps]) ?? "";

/** Where the curve falls; many falls are gathered by the month, so that the keyboard has a way through. */
function pointsOf(curve: readonly CurveStep[], { x, y }: Scales): StepPoint[] {
  const falls = curve.filter(({ failed }) => failed > 0);
  const groupOf = ({ ageDays }: CurveStep) =>
    falls.length <= MOST_POINTS ? ageDays : Math.floor(ageDays / MONTH_DAYS);
  const groups = new Map<number, CurveStep[]>();
  for (const fall of falls) groups.set(groupOf(fall), [...(groups.get(groupOf(fall)) ?? []), fall]);
  return [...groups.values()].flatMap((group) => {
    const [first, last] = [group[0], group.at(-1)];
    if (!first || !last) return [];
    return [
      {
        x: x(last.ageDays),
        y: y(last.survival),
        fromAge: first.ageDays,
        toAge: last.ageDays,
        failed: group.reduce((sum, { failed }) => sum + failed, 0),
        atRisk: first.atRisk,
        survival: last.survival,
      },
    ];
  });
}
