import { CsvError, parse } from "csv-parse/sync";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { ColumnKey } from "./columns";
import { columnNamed, headingOf, type Heading, type HeadingRefusal } from "./heading";

/** Far above any real line, and low enough that a file made to hurt ends early. */
const LONGEST_LINE = 20_000;
const MOST_COLUMNS = 100;
const DELIMITERS = [";", "\t", ","] as const;

export type Delimiter = (typeof DELIMITERS)[number];
export type Encoding = "utf-8" | "windows-1252";

/** One line of the file, with the number it begins on. */
export type CsvRow = { readonly line: number; readonly cells: readonly string[] };

export type CsvFile = {
  readonly delimiter: Delimiter;
  readonly encoding: Encoding;
  readonly heading: Heading;
  readonly rows: readonly CsvRow[];
};

export type CsvRefusal =
  | HeadingRefusal
  | "importNotText"
  | "importWithoutLines"
  | "importQuoteOpen"
  | "importLineTooLong"
  | "importTooManyLines"
  | "importTooManyColumns";

type Decoded = { readonly text: string; readonly encoding: Encoding };

/** UTF-8 with or without its mark, else Windows-1252 as older programs write it. */
function decoded(bytes: Uint8Array): Outcome<Decoded, "importNotText"> {
  if (bytes.includes(0)) return refuse("importNotText");
  try {
    return ok({ text: new TextDecoder("utf-8", { fatal: true }).decode(bytes), encoding: "utf-8" });
  } catch {
    return ok({ text: new TextDecoder("windows-1252").decode(bytes), encoding: "windows-1252" });
  }
}

type Records = Outcome<CsvRow[], "importQuoteOpen" | "importLineTooLong">;

const breaksIn = (cells: readonly string[]): number =>
  cells.reduce((breaks, cell) => breaks + (cell.includes("\n") ? cell.split("\n").length - 1 : 0), 0);

/** Whether a text runs over more lines than that, blank ones too: looked at first, for reading each of them costs. */
function isLongerThan(text: string, mostLines: number): boolean {
  let breaks = 0;
  for (let at = text.indexOf("\n"); at >= 0 && breaks <= mostLines; at = text.indexOf("\n", at + 1))
    breaks += 1;
  return breaks > mostLines;
}

/** The rows with the line each began on; blank ones left out. A quoted cell may run over several lines. */
function recordsOf(text: string, delimiter: Delimiter, most?: number): Records {
  const found: CsvRow[] = [];
  let line = 1;
  try {
    parse(text, {
      delimiter,
      to: most,
      record_delimiter: "\n",
      relax_column_count: true,
      relax_quotes: true,
      max_record_size: LONGEST_LINE,
      on_record: (cells: string[]) => {
        if (cells.some((cell) => cell.trim() !== "")) found.push({ line, cells });
        line += 1 + breaksIn(cells);
        return null;
      },
    });
    return ok(found);
  } catch (fault) {
    if (!(fault instanceof CsvError)) throw fault;
    return fault.code === "CSV_MAX_RECORD_SIZE"
      ? refuse("importLineTooLong", { line })
      : refuse("importQuoteOpen", { line });
  }
}

/** The character that finds most of our columns in the heading. */
function delimiterOf(text: string): Delimiter {
  const head = text.slice(0, LONGEST_LINE).replace(/^\n+/u, "").split("\n", 1)[0] ?? "";
  const known = (delimiter: Delimiter): number => {
    const records = recordsOf(`${head}\n`, delimiter, 1);
    const cells = records.ok ? (records.value[0]?.cells ?? []) : [];
    return cells.filter((cell) => columnNamed(cell) !== undefined).length;
  };
  return DELIMITERS.reduce((best, other) => (known(other) > known(best) ? other : best));
}

/** A spreadsheet is kept from running a text that begins like a formula by a quote before it; the quote is not the text. */
const unquoted = (cell: string): string => cell.trim().replace(/^'(?=[=+\-@])/u, "");

/** What stands in a row under a column; an empty text where the column or the cell is not there. */
export const cellOf = ({ places }: Heading, row: CsvRow, key: ColumnKey): string =>
  unquoted(row.cells[places.get(key) ?? -1] ?? "");

/** How many cells a row has that lie outside of the headings: a comma too many, mostly. */
export const cellsOutside = ({ width }: Heading, row: CsvRow): number =>
  Math.max(0, row.cells.findLastIndex((cell) => cell.trim() !== "") + 1 - width);

/**
 * The rows of an invoice file by column: comma, semicolon or tab, UTF-8 or Windows-1252, headings in either language.
 * Refuses what cannot be read as a whole; what is wrong with a single line is found when the lines are checked.
 */
export function readCsv(bytes: Uint8Array, mostLines: number): Outcome<CsvFile, CsvRefusal> {
  const source = decoded(bytes);
  if (!source.ok) return source;
  const text = source.value.text.replace(/\r\n?/gu, "\n");
  if (isLongerThan(text, mostLines + 1)) return refuse("importTooManyLines", { most: mostLines });
  const delimiter = delimiterOf(text);
  const records = recordsOf(text, delimiter);
  if (!records.ok) return records;
  const [first, ...others] = records.value;
  if (!first || others.length === 0) return refuse("importWithoutLines");
  if (others.length > mostLines) return refuse("importTooManyLines", { most: mostLines });
  if (first.cells.length > MOST_COLUMNS) return refuse("importTooManyColumns", { most: MOST_COLUMNS });
  const heading = headingOf(first.cells);
  if (!heading.ok) return heading;
  return ok({
    delimiter,
    encoding: source.value.encoding,
    heading: heading.value,
    rows: others,
  });
}
