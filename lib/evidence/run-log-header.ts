import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { RunLogColumn, RunLogNote, RunLogRefusal } from "./run-log";
import { readHeading, type Heading } from "./run-log-heading";
import { LINES_BEFORE_HEADER, type Table, type TableRow } from "./run-log-table";
import { unitNamed } from "./units";

export type HeaderColumn = Heading & {
  readonly place: number;
  readonly heading: string;
  readonly takenAs: RunLogColumn["takenAs"];
};

/** The heading of a log and the rows under it. */
export type Header = {
  readonly columns: readonly HeaderColumn[];
  readonly time: HeaderColumn;
  /** A day that stands in a column of its own beside a clock time. */
  readonly date: HeaderColumn | null;
  readonly rows: readonly TableRow[];
  /** Places of the columns that hold numbers: measured ones and an elapsed time. */
  readonly numericPlaces: readonly number[];
  readonly notes: readonly RunLogNote[];
};

const MEASURED: ReadonlySet<string> = new Set(["temperature", "ambient", "current", "voltage", "speed"]);

/** Whether a column holds measured figures. */
export const isMeasured = (column: HeaderColumn): boolean => MEASURED.has(column.takenAs);

/** The first row that names a time and something measured, and how its columns are taken. */
export function findHeader(table: Table): Outcome<Header, RunLogRefusal> {
  const top = table.rows.slice(0, LINES_BEFORE_HEADER);
  const at = top.findIndex((row) => namesARun(row.cells.map(readHeading)));
  const headingRow = table.rows[at];
  if (!headingRow) return refuse("runLogNoHeader", { lines: top.length });

  const below = table.rows.slice(at + 1);
  const unitRow = below[0] && isUnitRow(below[0]) ? below[0] : null;
  const rows = unitRow ? below.slice(1) : below;
  const columns = takenColumns(headingRow, unitRow);
  const time = columns.find((column) => column.takenAs === "time");
  if (!time) return refuse("runLogNoHeader", { lines: top.length });
  if (usualWidth(rows) > headingRow.cells.length && table.delimiter === ",")
    return refuse("runLogCommaTwice", { headings: headingRow.cells.length, cells: usualWidth(rows) });
  const numeric = columns.filter((column) => isMeasured(column) || column === time);
  return ok({
    columns,
    time,
    date: columns.find((column) => column.takenAs === "date") ?? null,
    rows,
    numericPlaces: numeric.map((column) => column.place),
    notes: [...notesAbove(at), ...notesOn(columns), ...notesOnWidth(rows, columns.length)],
  });
}

const namesARun = (headings: readonly Heading[]): boolean =>
  headings.some(({ quantity }) => quantity === "time" || quantity === "date") &&
  headings.some(({ quantity }) => quantity !== null && MEASURED.has(quantity));

// Some loggers write the units in a row of their own under the heading.
const isUnitRow = (row: TableRow): boolean => {
  const written = row.cells.filter((cell) => cell !== "");
  return written.length > 1 && written.every((cell) => unitFromCell(cell) !== null);
};

const unitFromCell = (cell: string) => {
  const unit = unitNamed(cell.replace(/^[[(]|[\])]$/gu, ""));
  if (unit !== null && unit !== "ambiguous") return { unit, unitText: unit.symbol };
  return readHeading(cell).unitText === "rpm" ? { unit: null, unitText: "rpm" } : null;
};

function takenColumns(headingRow: TableRow, unitRow: TableRow | null): HeaderColumn[] {
  const read = headingRow.cells.map((heading, place) => {
    const own = readHeading(heading);
    const below = own.unitText === null ? unitFromCell(unitRow?.cells[place] ?? "") : null;
    return { ...own, ...below, heading: heading.slice(0, 60), place };
  });
  const times = read.filter((column) => column.quantity === "time");
  const dates = read.filter((column) => column.quantity === "date");
  // An elapsed time in a named unit is surer than a clock; a day alone may carry the clock in its cells.
  const time = times.find((column) => column.unit !== null) ?? times[0] ?? dates[0];
  const date = time?.unit === null && dates[0] !== time ? dates[0] : undefined;
  return read.map((column) => ({ ...column, takenAs: takenAs(column, time?.place, date?.place) }));
}

function takenAs(
  column: Heading & { place: number },
  timePlace: number | undefined,
  datePlace: number | undefined,
): RunLogColumn["takenAs"] {
  if (column.place === timePlace) return "time";
  if (column.place === datePlace) return "date";
  const { quantity } = column;
  return quantity === null || quantity === "time" || quantity === "date" ? "notUsed" : quantity;
}

const notesAbove = (lines: number): RunLogNote[] =>
  lines === 0 ? [] : [{ code: "linesBeforeHeader", detail: { lines } }];

function notesOn(columns: readonly HeaderColumn[]): RunLogNote[] {
  const unused = columns.filter((column) => column.takenAs === "notUsed" && column.heading !== "");
  const bare = columns.filter((column) => isMeasured(column) && column.unitText === null);
  return [
    ...unused.map(({ heading }): RunLogNote => ({ code: "columnNotUsed", detail: { heading } })),
    ...bare.map(({ heading, takenAs: quantity }): RunLogNote => ({
      code: "unitAssumed",
      detail: { heading, unit: CANONICAL[quantity] ?? "" },
    })),
  ];
}

/** The unit each measured quantity is kept in, and taken to be in where the file names none. */
export const CANONICAL: Readonly<Record<string, "°C" | "A" | "V" | "rpm">> = {
  temperature: "°C",
  ambient: "°C",
  current: "A",
  voltage: "V",
  speed: "rpm",
};

function notesOnWidth(rows: readonly TableRow[], width: number): RunLogNote[] {
  const wide = rows.filter((row) => row.cells.length > width);
  return wide.length === 0
    ? []
    : [{ code: "extraCells", detail: { rows: wide.length, line: wide[0]?.line ?? 0 } }];
}

function usualWidth(rows: readonly TableRow[]): number {
  const counts = new Map<number, number>();
  for (const row of rows.slice(0, 500)) counts.set(row.cells.length, (counts.get(row.cells.length) ?? 0) + 1);
  return [...counts].reduce((best, entry) => (entry[1] > best[1] ? entry : best), [0, 0])[0];
}
