import type { ColumnKey } from "./columns";
import type { Encoding } from "./csv-text";
import type { Delimiter } from "./delimiter";
import type { Heading } from "./heading";

/** Cells of a line that are looked at. A heading has no more; what lies outside of it is only counted. */
export const MOST_COLUMNS = 100;

/** One line of the file: where it begins, its first cells, and how many it has up to the last with something in it. */
export type CsvRow = { readonly line: number; readonly cells: readonly string[]; readonly width: number };

export type CsvFile = {
  readonly delimiter: Delimiter;
  readonly encoding: Encoding;
  readonly heading: Heading;
  readonly rows: readonly CsvRow[];
};

/** A line of the file as it is kept. A hundred thousand commas are not. */
export const rowOf = (line: number, cells: readonly string[]): CsvRow => ({
  line,
  cells: cells.length > MOST_COLUMNS + 1 ? cells.slice(0, MOST_COLUMNS + 1) : cells,
  width: cells.findLastIndex((cell) => cell.trim() !== "") + 1,
});

/** A spreadsheet is kept from running a text that begins like a formula by a quote before it; the quote is not the text. */
const unquoted = (cell: string): string => cell.trim().replace(/^'(?=[=+\-@])/u, "");

/** What stands in a row under a column; an empty text where the column or the cell is not there. */
export const cellOf = ({ places }: Heading, row: CsvRow, key: ColumnKey): string =>
  unquoted(row.cells[places.get(key) ?? -1] ?? "");

/** How many cells a row has that lie outside of the headings: a comma too many, mostly. */
export const cellsOutside = ({ width }: Heading, row: CsvRow): number => Math.max(0, row.width - width);
