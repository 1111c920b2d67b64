import type { MeasuredQuantity, RunLogEvent, RunLogNote, RunLogSeries } from "./run-log";
import { CANONICAL, isMeasured, type Header, type HeaderColumn } from "./run-log-header";
import type { TableRow } from "./run-log-table";
import { cellReading, type DecimalMark } from "./run-log-values";
import { inBaseUnit } from "./units";

// Outside of these no rig of this trade measures; loggers write such figures for a broken probe (-999, 1372, 9999).
const POSSIBLE: Readonly<Record<MeasuredQuantity, readonly [from: number, to: number]>> = {
  temperature: [-60, 1200],
  ambient: [-60, 100],
  current: [-2000, 2000],
  voltage: [-1000, 1000],
  speed: [-100_000, 100_000],
};

/** The measured columns in canonical units, with a note for each column that has cells nobody could read. */
export function seriesIn(
  header: Header,
  rows: readonly TableRow[],
  mark: DecimalMark,
): { readonly series: RunLogSeries[]; readonly notes: RunLogNote[] } {
  const read = header.columns.filter(isMeasured).flatMap((column) => {
    const quantity = column.takenAs;
    return isQuantity(quantity) ? [columnValues({ column, quantity }, rows, mark)] : [];
  });
  return { series: read.map((column) => column.series), notes: read.flatMap((column) => column.notes) };
}

const isQuantity = (taken: HeaderColumn["takenAs"]): taken is MeasuredQuantity =>
  Object.hasOwn(POSSIBLE, taken);

function columnValues(
  { column, quantity }: { column: HeaderColumn; quantity: MeasuredQuantity },
  rows: readonly TableRow[],
  mark: DecimalMark,
): { series: RunLogSeries; notes: RunLogNote[] } {
  const [from, to] = POSSIBLE[quantity];
  const unreadable: number[] = [];
  const impossible: number[] = [];
  const values = rows.map(({ cells, line }) => {
    const cell = cellReading(cells[column.place] ?? "", mark);
    if (cell.kind === "blank") return null;
    const unit = cell.kind === "number" ? (cell.unit ?? column.unit) : null;
    if (cell.kind === "unreadable" || (unit !== null && !fits(unit.dimension, quantity))) {
      unreadable.push(line);
      return null;
    }
    const value = unit === null ? cell.value : inBaseUnit(cell.value, unit);
    if (value >= from && value <= to) return value;
    impossible.push(line);
    return null;
  });
  const { heading } = column;
  const notes = [
    note("valuesUnreadable", heading, unreadable),
    note("valuesImpossible", heading, impossible),
  ];
  return { series: { quantity, heading, unit: CANONICAL[quantity] ?? "°C", values }, notes: notes.flat() };
}

const fits = (dimension: string, quantity: MeasuredQuantity): boolean =>
  dimension === (quantity === "ambient" ? "temperature" : quantity);

const note = (code: RunLogNote["code"], heading: string, lines: readonly number[]): RunLogNote[] =>
  lines.length === 0
    ? []
    : [{ code, detail: { heading, cells: lines.length, lines: lines.slice(0, 10).join(", ") } }];

const FAULT =
  /\b(?:faults?|fail(?:s|ed|ure)?|trip(?:s|ped)?|cuts? ?out|stall(?:s|ed)?|lock(?:s|ed)|grab(?:s|bed)?|drag(?:s|ged)?|error)\b|störung|stoerung|fehler|ausfall|ausgefallen|blockiert|schleift|bremst|fällt ab/iu;
const DENIED = /\b(?:no|not|none|without|kein\p{L}*|ohne|nicht)\b/iu;
const YES = /^(?:1|x|y|yes|true|j|ja|wahr)$/iu;
const NO = /^(?:0|n|no|false|nein|falsch|ok|-+)$/iu;

const LONGEST_EVENT = 160;
const MOST_EVENTS = 1_000;

/** Remarks of all event columns; a remark repeated row after row is one event, at its first row. */
export function eventsIn(header: Header, rows: readonly TableRow[]): RunLogEvent[] {
  const events: RunLogEvent[] = [];
  for (const column of header.columns.filter(({ takenAs }) => takenAs === "event")) {
    let before = "";
    for (const [index, { cells }] of rows.entries()) {
      const text = (cells[column.place] ?? "").slice(0, LONGEST_EVENT);
      if (text !== before && text !== "" && !NO.test(text) && events.length < MOST_EVENTS)
        events.push({
          index,
          text: YES.test(text) ? column.heading : text,
          isFault: isFault(column.heading, text),
        });
      before = text;
    }
  }
  return events.toSorted((first, second) => first.index - second.index);
}

const isFault = (heading: string, text: string): boolean =>
  YES.test(text) ? FAULT.test(heading) : FAULT.test(text) && !DENIED.test(text);
