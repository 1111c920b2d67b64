import "server-only";
import { isUtf8 } from "node:buffer";
import { finished } from "node:stream/promises";
import { CsvError, parse, type Parser } from "csv-parse";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { MOST_COLUMNS, rowOf, type CsvFile, type CsvRow } from "./csv-file";
import { isLongerThan, textOf, type Encoding } from "./csv-text";
import { delimiterOf, LONGEST_LINE, optionsFor, type Delimiter } from "./delimiter";
import { headingOf, type HeadingRefusal } from "./heading";
import { slices } from "./slices-service";

export type CsvRefusal =
  | HeadingRefusal
  | "importNotText"
  | "importWithoutLines"
  | "importQuoteOpen"
  | "importLineTooLong"
  | "importTooManyLines"
  | "importTooManyColumns";

/** UTF-8 with or without its mark, else Windows-1252 as older programs write it. */
function encodingOf(bytes: Uint8Array): Outcome<Encoding, "importNotText"> {
  if (bytes.includes(0)) return refuse("importNotText");
  return ok(isUtf8(bytes) ? "utf-8" : "windows-1252");
}

const written = (parser: Parser, piece: string): Promise<void> =>
  new Promise((resolve, reject) => {
    parser.write(piece, (fault) => (fault ? reject(fault) : resolve()));
  });

async function parseInSlices(parser: Parser, pieces: Iterable<string>): Promise<void> {
  const { isOver, rest } = slices();
  const end = finished(parser);
  // A piece that cannot be read says so itself; the end says it once more, to nobody.
  end.catch(() => undefined);
  parser.resume();
  for (const piece of pieces) {
    if (piece !== "") await written(parser, piece);
    if (isOver()) await rest();
  }
  parser.end();
  await end;
}

const breaksIn = (cells: readonly string[]): number =>
  cells.reduce((breaks, cell) => breaks + (cell.includes("\n") ? cell.split("\n").length - 1 : 0), 0);

type Records = Outcome<CsvRow[], "importQuoteOpen" | "importLineTooLong">;

/** The rows with the line each began on; blank ones left out. A quoted cell may run over several lines. */
async function recordsOf(pieces: Iterable<string>, delimiter: Delimiter): Promise<Records> {
  const found: CsvRow[] = [];
  let line = 1;
  const keep = (cells: string[]): null => {
    // Lines may differ in how many cells they have. Told that each is the first, the parser compares none of them: it
    // would make an error of every other line, with its stack, only to throw it away.
    Object.assign(parser.info, { records: 0 });
    const row = rowOf(line, cells);
    if (row.width > 0) found.push(row);
    line += 1 + breaksIn(cells);
    return null;
  };
  const parser = parse({ ...optionsFor(delimiter), on_record: keep });
  try {
    await parseInSlices(parser, pieces);
    return ok(found);
  } catch (fault) {
    if (!(fault instanceof CsvError)) throw fault;
    return fault.code === "CSV_MAX_RECORD_SIZE"
      ? refuse("importLineTooLong", { line })
      : refuse("importQuoteOpen", { line });
  }
}

const beginningOf = (bytes: Uint8Array, encoding: Encoding): string =>
  [...textOf(bytes.subarray(0, LONGEST_LINE), encoding)].join("");

/**
 * The rows of an invoice file by column: comma, semicolon or tab, UTF-8 or Windows-1252, headings in either language.
 * Refuses what cannot be read as a whole; what is wrong with a single line is found when the lines are checked. Reads in
 * slices: whatever else the process has to do is done in between.
 */
export async function readCsv(bytes: Uint8Array, mostLines: number): Promise<Outcome<CsvFile, CsvRefusal>> {
  const encoding = encodingOf(bytes);
  if (!encoding.ok) return encoding;
  if (isLongerThan(bytes, mostLines + 1)) return refuse("importTooManyLines", { most: mostLines });
  const delimiter = delimiterOf(beginningOf(bytes, encoding.value));
  const records = await recordsOf(textOf(bytes, encoding.value), delimiter);
  if (!records.ok) return records;
  const [first, ...others] = records.value;
  if (!first || others.length === 0) return refuse("importWithoutLines");
  if (others.length > mostLines) return refuse("importTooManyLines", { most: mostLines });
  if (first.cells.length > MOST_COLUMNS) return refuse("importTooManyColumns", { most: MOST_COLUMNS });
  const heading = headingOf(first.cells);
  if (!heading.ok) return heading;
  return ok({ delimiter, encoding: encoding.value, heading: heading.value, rows: others });
}
