import { scaleLinear } from "d3-scale";
import type { RunLog } from "@/lib/evidence/run-log";
import type { RunAnalysis } from "@/lib/evidence/run-analysis";
import { coursesOf, temperatureCourses } from "./run-log-course";
import { stripPanel, temperaturePanel, type PlotPanel } from "./run-log-panel-plot";
import { SERIES } from "./series-style";

/** Sizes of a drawing in its own units. */
export type PlotFrame = {
  readonly width: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  /** Room over the panels for the words of a fault; a run without one does not need it. */
  readonly faultWords: number;
  readonly main: number;
  readonly strip: number;
  readonly gap: number;
  readonly lineHeight: number;
};

export type RunLogPlot = {
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly panels: readonly PlotPanel[];
  readonly timeTicks: readonly { readonly x: number; readonly minutes: number }[];
  readonly fault: { readonly x: number } | null;
  /** Series of the file that are more than a drawing bears. */
  readonly leftOut: number;
};

const STRIPS = ["current", "voltage", "speed"] as const;
const TICK_WIDTH = 60;

/** Everything a run log's drawing shows, placed: temperatures above, current, voltage and speed in strips below. */
export function runLogPlot(
  { log, analysis }: { readonly log: RunLog; readonly analysis: RunAnalysis },
  frame: PlotFrame,
): RunLogPlot {
  const [left, right] = [frame.left, frame.width - frame.right];
  const [fromS, toS] = [Math.min(0, log.timeS[0] ?? 0), Math.max(log.timeS.at(-1) ?? 0, 1)];
  const time = scaleLinear().domain([fromS, toS]).range([left, right]);
  const all = [
    { quantity: "temperature" as const, height: frame.main, courses: temperatureCourses(log, analysis) },
    ...STRIPS.map((quantity) => ({ quantity, height: frame.strip, courses: coursesOf(log, quantity) })),
  ].filter(({ courses }) => courses.length > 0);
  const panels: PlotPanel[] = [];
  let top = frame.top + (analysis.fault ? frame.faultWords : 0);
  for (const { quantity, height, courses } of all) {
    const place = { top, bottom: top + height, lineHeight: frame.lineHeight, time, fromS, toS };
    const drawn = courses.slice(0, SERIES.length);
    panels.push(
      quantity === "temperature"
        ? temperaturePanel({ log, analysis }, drawn, place)
        : stripPanel({ quantity, courses: drawn }, log, place),
    );
    top = place.bottom + frame.gap;
  }
  const minutes = scaleLinear()
    .domain([fromS / 60, toS / 60])
    .range([left, right]);
  const ticks = minutes.ticks(Math.floor((right - left) / TICK_WIDTH));
  return {
    left,
    right,
    bottom: panels.at(-1)?.bottom ?? top,
    panels,
    timeTicks: ticks.map((tick) => ({ x: minutes(tick), minutes: tick })),
    fault: analysis.fault && { x: time(analysis.fault.atS) },
    leftOut: all.reduce((sum, { courses }) => sum + Math.max(0, courses.length - SERIES.length), 0),
  };
}
