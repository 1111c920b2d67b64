import { analyseRun, type RunAnalysis, type RunOptions } from "./run-analysis";
import type { RunLog, RunLogRefusal } from "./run-log";
import { parseRunLog } from "./run-log-parser";

/**
 * A run log as it was read once, so that no page reads the file again: the log thinned to what a picture can show, and
 * the analysis of the whole of it; or why it could not be read.
 */
export type RunLogSummary =
  | {
      readonly shape: 1;
      readonly isRead: true;
      readonly log: RunLog;
      readonly analysis: RunAnalysis;
      readonly rowCount: number;
    }
  | {
      readonly shape: 1;
      readonly isRead: false;
      readonly code: RunLogRefusal;
      readonly detail: Readonly<Record<string, string | number>>;
    };

/** Whether a stored value is a summary of the shape this build writes; an older one is read anew. */
export const isRunLogSummary = (value: unknown): value is RunLogSummary =>
  typeof value === "object" && value !== null && "shape" in value && value.shape === 1 && "isRead" in value;

// A bench run of three hours at a row every ten seconds is kept whole; only a quick logger is thinned.
const MOST_POINTS = 1_200;

/** Every nth row, with the first, the last and every row a remark stands at, so that nothing marked is lost. */
export function thinnedLog(log: RunLog): RunLog {
  const every = Math.ceil(log.timeS.length / MOST_POINTS);
  if (every <= 1) return log;
  const marked = new Set(log.events.map((event) => event.index));
  const kept = log.timeS.flatMap((_time, index) =>
    index % every === 0 || index === log.timeS.length - 1 || marked.has(index) ? [index] : [],
  );
  const place = new Map(kept.map((index, position) => [index, position]));
  const pick = <Value>(values: readonly Value[]): Value[] =>
    kept.flatMap((index) => values.slice(index, index + 1));
  return {
    ...log,
    timeS: pick(log.timeS),
    lines: pick(log.lines),
    series: log.series.map((series) => ({ ...series, values: pick(series.values) })),
    events: log.events.map((event) => ({ ...event, index: place.get(event.index) ?? 0 })),
  };
}

/** Reads a file of a run log into what is kept of it; a file that is none is kept with the reason. */
export function summariseRunLog(bytes: Uint8Array): RunLogSummary {
  const parsed = parseRunLog(bytes);
  if (!parsed.ok) return { shape: 1, isRead: false, code: parsed.code, detail: parsed.detail };
  const log = parsed.value;
  // The coil's course is reckoned from the kept rows, with what the part is rated at.
  const analysis = { ...analyseRun(log), coil: null };
  return { shape: 1, isRead: true, log: thinnedLog(log), analysis, rowCount: log.timeS.length };
}

type ReadSummary = Extract<RunLogSummary, { isRead: true }>;

/**
 * A log that was read, against the limits and the rated coil of its part. They follow the fitting day, which the workshop
 * may still correct, so they are not kept with the log. Times above a limit come from the rows that are kept.
 */
export function withLimits(summary: ReadSummary, against: Pick<RunOptions, "limits" | "coil">): ReadSummary {
  const { temperatures, hottest, coil } = analyseRun(summary.log, against);
  const aboveOf = (heading: string) => temperatures.find((one) => one.heading === heading)?.above ?? [];
  const limited = summary.analysis.temperatures.map((one) => ({ ...one, above: aboveOf(one.heading) }));
  return {
    ...summary,
    analysis: {
      ...summary.analysis,
      temperatures: limited,
      hottest: limited.find((one) => one.heading === summary.analysis.hottest?.heading) ?? hottest,
      coil,
    },
  };
}
