import { scaleLinear } from "d3-scale";
import type { RunLog } from "@/lib/evidence/run-log";
import type { RunAnalysis } from "@/lib/evidence/run-analysis";
import { celsiusAfter } from "@/lib/evidence/thermal-curve";
import {
  coursesOf,
  pathThrough,
  placed,
  type Course,
  type PlotPoint,
  type PlotSeries,
  type Scale,
} from "./run-log-course";
import { spreadLabels, type Placed } from "./run-log-labels";

export type PlotQuantity = "temperature" | "current" | "voltage" | "speed";

type WantedLabel = {
  readonly is: "series" | "coil" | "limit" | "ambient" | "fit";
  readonly name: string;
  readonly celsius: number | null;
  readonly style: number;
  readonly wantedY: number;
};
export type PlotLabel = Placed<WantedLabel>;

export type PlotPanel = {
  readonly quantity: PlotQuantity;
  readonly top: number;
  readonly bottom: number;
  readonly ticks: readonly { readonly y: number; readonly value: number }[];
  readonly series: readonly PlotSeries[];
  readonly limits: readonly { readonly y: number; readonly key: string }[];
  readonly ambient: string | null;
  readonly fit: string | null;
  readonly labels: readonly PlotLabel[];
};

export type Place = {
  readonly top: number;
  readonly bottom: number;
  readonly lineHeight: number;
  readonly fromS: number;
  readonly toS: number;
  readonly time: Scale;
};

type Run = { readonly log: RunLog; readonly analysis: RunAnalysis };

/** The panel of the temperatures: the series, the limits, the room, and the fitted course. */
export function temperaturePanel(
  { log, analysis }: Run,
  courses: readonly Course[],
  place: Place,
): PlotPanel {
  const { top, bottom, time } = place;
  const limits = analysis.hottest?.above.map(({ limit }) => limit) ?? [];
  const known = [
    ...valuesOf([...courses, ...coursesOf(log, "ambient").slice(0, 1)]),
    ...limits.map(({ celsius }) => celsius),
    ...(analysis.ambient ? [analysis.ambient.celsius] : []),
    ...(analysis.hottest ? [analysis.hottest.peakCelsius] : []),
  ];
  const scale = scaleLinear().domain(rangeOf(known)).nice(6).range([bottom, top]);
  const series = courses.map((course, style) => placed(course, style, { log, time, scale }));
  const room = roomPoints({ log, analysis }, place, scale);
  const fit = fitPoints(analysis, place, scale);
  return {
    quantity: "temperature",
    top,
    bottom,
    ticks: scale.ticks(6).map((value) => ({ y: scale(value), value })),
    series,
    limits: limits.map(({ key, celsius }) => ({ key, y: scale(celsius) })),
    ambient: room.length > 1 ? pathThrough([room]) : null,
    fit: fit.length > 1 ? pathThrough([fit]) : null,
    labels: spreadLabels(
      [
        ...series.map(seriesLabel),
        ...limits.map(({ name, celsius }) => wanted("limit", scale(celsius), { name, celsius })),
        ...room
          .slice(-1)
          .map(({ y }) => wanted("ambient", y, { celsius: analysis.ambient?.celsius ?? null })),
        ...fit.slice(-1).map(({ y }) => wanted("fit", y)),
      ],
      place,
    ),
  };
}

/** A low panel of its own for what was fed or turned, from zero up. */
export function stripPanel(
  { quantity, courses }: { quantity: PlotQuantity; courses: readonly Course[] },
  log: RunLog,
  place: Place,
): PlotPanel {
  const { top, bottom, time } = place;
  const scale = scaleLinear()
    .domain(rangeOf([0, ...valuesOf(courses)]))
    .nice(2)
    .range([bottom, top]);
  const series = courses.map((course, style) => placed(course, style, { log, time, scale }));
  const ticks = scale.ticks(2).map((value) => ({ y: scale(value), value }));
  const labels = spreadLabels(series.map(seriesLabel), place);
  return { quantity, top, bottom, ticks, series, limits: [], ambient: null, fit: null, labels };
}

/** The room's column, or a level line where the room is only known as the first reading. */
function roomPoints({ log, analysis }: Run, { time, fromS, toS }: Place, scale: Scale): PlotPoint[] {
  const column = coursesOf(log, "ambient")[0];
  if (column) return column.samples.map(({ timeS, value }) => ({ x: time(timeS), y: scale(value) }));
  if (!analysis.ambient) return [];
  const y = scale(analysis.ambient.celsius);
  return [fromS, toS].map((timeS) => ({ x: time(timeS), y }));
}

const FIT_STEPS = 80;

/** The fitted course to the end of the log, as far as it lies in the panel; none where the run was too short for it. */
function fitPoints({ fit }: RunAnalysis, { time, toS, top, bottom }: Place, scale: Scale): PlotPoint[] {
  if (!fit?.fit.longEnough) return [];
  const { startS, curve } = fit.fit;
  const points = Array.from({ length: FIT_STEPS + 1 }, (_, step) => {
    const afterS = ((toS - startS) * step) / FIT_STEPS;
    return { x: time(startS + afterS), y: scale(celsiusAfter(curve, afterS)) };
  });
  return points.filter(({ y }) => y >= top && y <= bottom);
}

const wanted = (
  is: WantedLabel["is"],
  wantedY: number,
  more: { name?: string; celsius?: number | null; style?: number } = {},
): WantedLabel => ({ is, name: "", celsius: null, style: 0, wantedY, ...more });

const seriesLabel = ({ heading, style, points }: PlotSeries): WantedLabel =>
  wanted(heading === null ? "coil" : "series", points.at(-1)?.y ?? 0, { name: heading ?? "", style });

const valuesOf = (courses: readonly Course[]): number[] =>
  courses.flatMap(({ samples }) => samples.map(({ value }) => value));

// A millionth is below the last digit of any meter; a scale much shorter has no ticks that can be told apart.
const LEAST_SPAN = 1e-6;

/** From the least to the greatest, widened where both are as good as one, so that a scale has a length. */
function rangeOf(values: readonly number[]): [number, number] {
  const least = values.reduce((best, value) => Math.min(best, value), Infinity);
  const most = values.reduce((best, value) => Math.max(best, value), -Infinity);
  return most - least > LEAST_SPAN ? [least, most] : [least - 1, most + 1];
}
