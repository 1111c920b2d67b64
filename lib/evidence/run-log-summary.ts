import type { RunAnalysis } from "./run-analysis";
import type { RunLog, RunLogRefusal } from "./run-log";

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

const MOST_POINTS = 600;

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
