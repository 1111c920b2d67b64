import { CsvError, parse } from "csv-parse/sync";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { RunLogRefusal } from "./run-log";
import { RUN_LOG_LIMITS } from "./run-log-limits";

export type TableRow = { readonly line: number; readonly cells: readonly string[] };
export type Table = { readonly delimiter: string; readonly rows: readonly TableRow[] };

/** Rows that may stand above the heading: rig, instruments, operator. */
export const LINES_BEFORE_HEADER = 60;

const MOST_ROWS = RUN_LOG_LIMITS.rows + LINES_BEFORE_HEADER;

const DELIMITERS = [";", "\t", ",", "|"] as const;
const LINES_LOOKED_AT = 200;

/** The cells of a log with the line each row began on; blank lines left out, trailing empty cells cut. */
export function tableOf(source: string): Outcome<Table, RunLogRefusal> {
  const text = source.replace(/\r\n?/gu, "\n");
  const longLine = lineOver(text, RUN_LOG_LIMITS.lineCharacters);
  if (longLine !== null)
    return refuse("runLogLineTooLong", { line: longLine, limit: RUN_LOG_LIMITS.lineCharacters });
  const named = /^sep=(.)\n/iu.exec(text);
  const delimiter = named?.[1] ?? delimiterOf(text);
  const cells = countOf(text, delimiter) + countOf(text, "\n") + 1;
  if (cells > RUN_LOG_LIMITS.cells)
    return refuse("runLogTooManyCells", { cells, limit: RUN_LOG_LIMITS.cells });
  const rows = rowsOf(named ? text.slice(named[0].length) : text, delimiter, named ? 2 : 1);
  if (!rows.ok) return rows;
  const widest = rows.value.find((row) => row.cells.length > RUN_LOG_LIMITS.columns);
  if (widest)
    return refuse("runLogTooManyColumns", {
      line: widest.line,
      columns: widest.cells.length,
      limit: RUN_LOG_LIMITS.columns,
    });
  return ok({ delimiter, rows: rows.value });
}

function rowsOf(text: string, delimiter: string, firstLine: number): Outcome<TableRow[], RunLogRefusal> {
  try {
    const records = parse(text, {
      delimiter,
      to: MOST_ROWS + 1,
      relax_column_count: true,
      relax_quotes: true,
      record_delimiter: "\n",
      max_record_size: 4 * RUN_LOG_LIMITS.lineCharacters,
    });
    if (records.length > MOST_ROWS) return refuse("runLogTooManyRows", { limit: RUN_LOG_LIMITS.rows });
    return ok(numbered(records, firstLine));
  } catch (fault) {
    if (!(fault instanceof CsvError)) throw fault;
    const line = typeof fault["lines"] === "number" ? fault["lines"] + firstLine - 1 : firstLine;
    return fault.code === "CSV_MAX_RECORD_SIZE"
      ? refuse("runLogLineTooLong", { line, limit: RUN_LOG_LIMITS.lineCharacters })
      : refuse("runLogQuoteOpen", { line });
  }
}

function numbered(records: readonly (readonly string[])[], firstLine: number): TableRow[] {
  const rows: TableRow[] = [];
  let line = firstLine;
  for (const record of records) {
    const cells = record.map((cell) => cell.trim());
    while (cells.at(-1) === "") cells.pop();
    if (cells.length > 0) rows.push({ line, cells });
    // A quoted cell may run over several lines.
    line +=
      1 +
      record.reduce((breaks, cell) => breaks + (cell.includes("\n") ? cell.split("\n").length - 1 : 0), 0);
  }
  return rows;
}

function countOf(text: string, mark: string): number {
  let count = 0;
  for (let at = text.indexOf(mark); at !== -1; at = text.indexOf(mark, at + 1)) count += 1;
  return count;
}

/** Number of the first line longer than the limit, or null. */
function lineOver(text: string, limit: number): number | null {
  for (let start = 0, line = 1; start < text.length; line += 1) {
    const found = text.indexOf("\n", start);
    const end = found === -1 ? text.length : found;
    if (end - start > limit) return line;
    start = end + 1;
  }
  return null;
}

/**
 * The character most lines agree on. With a decimal comma a file agrees on the semicolon and on the comma alike; the
 * comma is the weaker sign and comes after it.
 */
function delimiterOf(text: string): string {
  const lines = text
    .slice(0, LINES_LOOKED_AT * 1_000)
    .split("\n")
    .filter((line) => line.trim() !== "")
    .slice(0, LINES_LOOKED_AT);
  const agreement = DELIMITERS.map((delimiter) => ({ delimiter, lines: linesThatAgree(lines, delimiter) }));
  const best = agreement.reduce((leader, other) => (other.lines > leader.lines ? other : leader));
  return best.lines === 0 ? "," : best.delimiter;
}

function linesThatAgree(lines: readonly string[], delimiter: string): number {
  const byCount = new Map<number, number>();
  for (const line of lines) {
    const count = line.replace(/"[^"]*"/gu, "").split(delimiter).length - 1;
    if (count > 0) byCount.set(count, (byCount.get(count) ?? 0) + 1);
  }
  return Math.max(0, ...byCount.values());
}
