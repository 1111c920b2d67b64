import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { RunLog, RunLogRefusal } from "./run-log";
import { findHeader, type Header } from "./run-log-header";
import { eventsIn, seriesIn } from "./run-log-series";
import { tableOf, type TableRow } from "./run-log-table";
import { logText } from "./run-log-text";
import { timesOf } from "./run-log-time";
import { decimalMarkOf } from "./run-log-values";
import { median } from "./samples";

/**
 * Reads a run log: comma, semicolon or tab; decimal comma or point; UTF-8, UTF-16 or Windows text; headings in
 * English or German; elapsed, clock or dated times. Never throws: what cannot be read is refused by code, what was
 * assumed or skipped is in `notes`.
 */
export function parseRunLog(source: Uint8Array | string): Outcome<RunLog, RunLogRefusal> {
  const text = logText(source);
  if (!text.ok) return text;
  const table = tableOf(text.value.text);
  if (!table.ok) return table;
  const header = findHeader(table.value);
  if (!header.ok) return header;
  const log = logFrom(header.value, table.value.delimiter);
  if (!log.ok || text.value.note === null) return log;
  return ok({ ...log.value, notes: [text.value.note, ...log.value.notes] });
}

function logFrom(header: Header, delimiter: string): Outcome<RunLog, RunLogRefusal> {
  const mark = decimalMarkOf(header, delimiter);
  if (!mark.ok) return mark;
  const times = timesOf(header, mark.value.mark);
  if (!times.ok) return times;

  const { kept, timeS } = times.value;
  if (kept.length < 2) return refuse("runLogNoRows", { rows: kept.length });
  const rows = kept.map((index) => header.rows[index]).filter((row): row is TableRow => row !== undefined);
  const series = seriesIn(header, rows, mark.value.mark);
  const steps = timeS.slice(1).map((time, index) => time - (timeS[index] ?? time));
  return ok({
    timeS,
    lines: rows.map((row) => row.line),
    series: series.series,
    events: eventsIn(header, rows),
    columns: header.columns.map(({ heading, takenAs, unitText }) => ({ heading, takenAs, unit: unitText })),
    notes: [...header.notes, ...mark.value.notes, ...times.value.notes, ...series.notes],
    stepS: median(steps.filter((step) => step > 0)) ?? 0,
  });
}
