import { scaleLinear, scaleLog } from "d3-scale";
import { MONTH_DAYS } from "@/lib/reliability/months";
import type { Series, Weibull } from "@/lib/reports/life-curves/view";
import type { LifeFrame } from "./life-curve-plot";
import { spreadLabels, type Placed } from "./run-log-labels";

type Fit = Extract<Weibull, { kind: "fit" }>;
type Fitted = { readonly series: Series; readonly style: number | null; readonly fit: Fit };

export type ProbabilityPoint = {
  readonly x: number;
  readonly y: number;
  readonly ageDays: number;
  readonly failedShare: number;
  /** The youngest age whose claims it opens; null where the next point opens its claims too. */
  readonly opensFrom: number | null;
};
export type ProbabilityLine = {
  readonly key: string | null;
  readonly style: number | null;
  readonly path: string;
  readonly points: readonly ProbabilityPoint[];
};

export type WeibullPlot = {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly lines: readonly ProbabilityLine[];
  readonly labels: readonly Placed<{ readonly key: string | null; readonly style: number | null }>[];
  readonly monthTicks: readonly { readonly x: number; readonly months: number }[];
  readonly shareTicks: readonly { readonly y: number; readonly share: number }[];
};

const MONTHS = [0.1, 0.25, 0.5, 1, 2, 3, 6, 12, 24, 48, 96];
const SHARES = [0.0001, 0.0002, 0.0005, 0.001, 0.002, 0.005, 0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 0.9, 0.99];

/** A line carries at most so many links; where more ages failed, the last of each month stands for the month. */
const MOST_LINKS = 24;

function opensFrom(points: Fit["points"], place: number): number | null {
  const monthOf = (at: number) => Math.floor((points[at]?.ageDays ?? Infinity) / MONTH_DAYS);
  const own = points[place]?.ageDays ?? null;
  if (points.length <= MOST_LINKS) return own;
  if (monthOf(place) === monthOf(place + 1)) return null;
  return points.find((_, at) => monthOf(at) === monthOf(place))?.ageDays ?? own;
}

/** The scale on which a Weibull life is a straight line. */
const straight = (share: number): number => Math.log(-Math.log1p(-share));

const round = (value: number): number => Number(value.toFixed(1));

/** Failed share against age on Weibull paper, each fit a straight line; null where no series has a fit. */
export function weibullPlot(
  all: readonly Series[],
  rest: Series | null,
  frame: LifeFrame,
): WeibullPlot | null {
  const fitted = [...all, ...(rest ? [rest] : [])].flatMap((series, place): Fitted[] =>
    series.weibull.kind === "fit"
      ? [{ series, style: place < all.length ? place : null, fit: series.weibull }]
      : [],
  );
  const points = fitted.flatMap(({ fit }) => fit.points);
  if (points.length === 0) return null;
  const [left, right] = [frame.left, frame.width - frame.right];
  const [top, bottom] = [frame.top, frame.top + frame.height];
  const ages = points.map(({ ageDays }) => ageDays);
  const oldest = Math.max(...all.map(({ oldestDays }) => oldestDays), ...ages);
  const x = scaleLog()
    .domain([Math.min(...ages) / 1.5, oldest * 1.1])
    .range([left, right]);
  const shares = points.map(({ failedShare }) => failedShare);
  const [least, most] = [Math.min(...shares) / 2, Math.min(0.995, Math.max(...shares) * 2)];
  const y = scaleLinear()
    .domain([straight(least), straight(most)])
    .range([bottom, top]);
  const at = (share: number) => y(straight(share));
  const lines = fitted.map((one) => placed(one, { x, at, ends: [x.domain()[0] ?? 1, oldest] }));
  return {
    left,
    right,
    top,
    bottom,
    lines: lines.map(({ line }) => line),
    labels: spreadLabels(
      lines.map(({ line, endY }) => ({
        key: line.key,
        style: line.style,
        wantedY: Math.min(bottom, Math.max(top, endY)),
      })),
      { top, bottom, lineHeight: frame.lineHeight },
    ),
    monthTicks: MONTHS.filter(
      (months) => months * MONTH_DAYS >= (x.domain()[0] ?? 0) && months * MONTH_DAYS <= oldest * 1.1,
    ).map((months) => ({ x: x(months * MONTH_DAYS), months })),
    shareTicks: SHARES.filter((share) => share >= least && share <= most).map((share) => ({
      y: at(share),
      share,
    })),
  };
}

type Placing = {
  readonly x: (age: number) => number;
  readonly at: (share: number) => number;
  readonly ends: readonly [number, number];
};

function placed({ series, style, fit }: Fitted, { x, at, ends }: Placing) {
  const failedBy = (age: number) => -Math.expm1(-((age / fit.scaleDays.value) ** fit.shape.value));
  const [from, to] = ends.map((age) => ({ x: round(x(age)), y: round(at(failedBy(age))) }));
  const path = from && to ? `M${from.x} ${from.y}L${to.x} ${to.y}` : "";
  const points = fit.points.map((point, place) => ({
    ...point,
    x: round(x(point.ageDays)),
    y: round(at(point.failedShare)),
    opensFrom: opensFrom(fit.points, place),
  }));
  return { line: { key: series.key, style, path, points }, endY: to?.y ?? 0 };
}
