import { CsvError, parse, type Options } from "csv-parse/sync";
import { columnNamed } from "./heading";

/** Far above any real line, and low enough that a file made to hurt ends early. */
export const LONGEST_LINE = 20_000;
const DELIMITERS = [";", "\t", ","] as const;

export type Delimiter = (typeof DELIMITERS)[number];

/** How lines are read whose cells stand between this character. */
export const optionsFor = (delimiter: Delimiter) =>
  ({
    delimiter,
    record_delimiter: "\n",
    relax_column_count: true,
    relax_quotes: true,
    max_record_size: LONGEST_LINE,
  }) satisfies Options;

function firstRecord(line: string, delimiter: Delimiter): string[] {
  try {
    return parse(line, { ...optionsFor(delimiter), to: 1 })[0] ?? [];
  } catch (fault) {
    if (fault instanceof CsvError) return [];
    throw fault;
  }
}

/** The character that finds most of our columns in the heading, at the beginning of a text. */
export function delimiterOf(beginning: string): Delimiter {
  const head = beginning.slice(0, LONGEST_LINE).replace(/^\n+/u, "").split("\n", 1)[0] ?? "";
  const known = (delimiter: Delimiter): number =>
    firstRecord(`${head}\n`, delimiter).filter((cell) => columnNamed(cell) !== undefined).length;
  return DELIMITERS.reduce((best, other) => (known(other) > known(best) ? other : best));
}
