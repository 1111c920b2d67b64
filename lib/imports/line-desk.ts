import type { Outcome } from "@/lib/kernel/outcome";
import type { CellProblem } from "./cell-values";
import type { ColumnKey } from "./columns";
import type { Heading } from "./heading";
import { cellOf, cellsOutside, type CsvRow } from "./csv-file";

export type ProblemCode =
  | CellProblem
  | "cellsOutside"
  | "accountUnknown"
  | "accountClosed"
  | "siteUnknown"
  | "currencyNotAccounts"
  | "partUnknown"
  | "serialWanted"
  | "serialNotTaken"
  | "batchNotTaken"
  | "quantityOfSerial"
  | "serialTwice"
  | "lineTwice"
  | "lineDiffers"
  | "lineExists"
  | "serialKnown";

/** What is wrong with a line, where, and what stands there; `column` is null where it is the line as a whole. */
export type LineProblem = {
  readonly line: number;
  readonly column: ColumnKey | null;
  readonly code: ProblemCode;
  readonly given: string;
  readonly detail: Readonly<Record<string, string | number>>;
};

/** What a cell means, or why it cannot be taken. */
export type Answer<T> = Outcome<T, ProblemCode>;

/** One row being read: its cells, and the problems found so far. */
export type Desk = {
  readonly text: (column: ColumnKey) => string;
  readonly problems: LineProblem[];
  /** The value, or undefined with the problem noted at its column. */
  readonly take: <T>(column: ColumnKey, read: (text: string) => Answer<T>) => T | undefined;
};

/** Lays a row out for reading. What lies outside of the headings is a problem from the start. */
export function deskFor(row: CsvRow, heading: Heading): Desk {
  const problems: LineProblem[] = [];
  const text = (column: ColumnKey) => cellOf(heading, row, column);
  const take = <T>(column: ColumnKey, read: (text: string) => Answer<T>): T | undefined => {
    const given = text(column);
    const answer = read(given);
    if (answer.ok) return answer.value;
    problems.push({ line: row.line, column, code: answer.code, given, detail: answer.detail });
    return undefined;
  };
  const outside = cellsOutside(heading, row);
  if (outside > 0)
    problems.push({
      line: row.line,
      column: null,
      code: "cellsOutside",
      given: row.cells.at(heading.width) ?? "",
      detail: { count: outside },
    });
  return { text, problems, take };
}
