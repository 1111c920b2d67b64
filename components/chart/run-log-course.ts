import { line } from "d3-shape";
import { coilTemperatureIn } from "@/lib/evidence/coil-from-log";
import { seriesOf, type MeasuredQuantity, type RunLog } from "@/lib/evidence/run-log";
import type { RunAnalysis } from "@/lib/evidence/run-analysis";
import { gapSecondsFor, median, samplesOf, type Sample } from "@/lib/evidence/samples";

export type PlotPoint = { readonly x: number; readonly y: number };
export type Scale = (value: number) => number;

/** What is drawn as one line. Its heading is null for the coil's temperature, which no column holds. */
export type Course = { readonly heading: string | null; readonly samples: readonly Sample[] };

export type PlotSeries = {
  readonly heading: string | null;
  /** Place in the order of the five styles. */
  readonly style: number;
  readonly path: string;
  readonly points: readonly PlotPoint[];
  readonly markers: readonly PlotPoint[];
};

/** The columns of a quantity that hold anything, in the order of the file. */
export function coursesOf(log: RunLog, quantity: MeasuredQuantity): Course[] {
  const courses = seriesOf(log, quantity).map(({ heading, values }) => ({
    heading,
    samples: samplesOf(log.timeS, values),
  }));
  return courses.filter(({ samples }) => samples.length > 0);
}

/** The temperature columns, then the coil's mean temperature where voltage and current tell it. */
export function temperatureCourses(log: RunLog, { coil }: RunAnalysis): Course[] {
  const basis = coil?.basis;
  const rated = basis?.method === "ratedResistance" ? { ohmAt20: basis.ohm, k: basis.k } : null;
  const values = basis ? (coilTemperatureIn(log, rated)?.values ?? []) : [];
  const samples = samplesOf(log.timeS, values);
  return [...coursesOf(log, "temperature"), ...(samples.length > 0 ? [{ heading: null, samples }] : [])];
}

const MARKERS = 4;

type Placing = { readonly log: RunLog; readonly time: Scale; readonly scale: Scale };

/** A course placed: its line, broken at pauses, and the few points that carry its marker, the last one among them. */
export function placed(
  { heading, samples }: Course,
  style: number,
  { log, time, scale }: Placing,
): PlotSeries {
  const gapS = drawnGapS(log);
  const runs: PlotPoint[][] = [];
  let beforeS = -Infinity;
  for (const { timeS, value } of samples) {
    if (timeS - beforeS > gapS) runs.push([]);
    runs.at(-1)?.push({ x: time(timeS), y: scale(value) });
    beforeS = timeS;
  }
  const points = runs.flat();
  const places = Array.from({ length: MARKERS }, (_, place) =>
    Math.round(((place + 1) * (points.length - 1)) / MARKERS),
  );
  const markers = [...new Set(places)].flatMap((place) => points.slice(place, place + 1));
  return { heading, style, points, path: pathThrough(runs), markers };
}

/** A pause is not joined. A thinned log has wider steps than the file had, and those are no pause. */
function drawnGapS({ timeS, stepS }: RunLog): number {
  const steps = timeS.slice(1).map((time, index) => time - (timeS[index] ?? time));
  return gapSecondsFor(Math.max(stepS, median(steps) ?? 0));
}

const round = (value: number): number => Number(value.toFixed(2));
const through = line<PlotPoint>()
  .x(({ x }) => round(x))
  .y(({ y }) => round(y));

/** The path through each run of points, with nothing between one run and the next. */
export const pathThrough = (runs: readonly (readonly PlotPoint[])[]): string =>
  runs.map((run) => through([...run]) ?? "").join("");
