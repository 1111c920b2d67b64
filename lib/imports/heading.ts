import type { Locale } from "@/lib/kernel/locale";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { COLUMN_KEYS, COLUMNS, isColumnKey, type ColumnKey } from "./columns";

/** The heading of a column as we write it in a language. */
export const headingIn = (key: ColumnKey, locale: Locale): string =>
  COLUMNS[key].heading[locale === "de" ? "de" : "en"];

/** The headings of columns whose keys stand in a text with spaces between, as a refusal carries them. */
export const headingsIn = (keys: string, locale: Locale): string =>
  keys
    .split(" ")
    .filter(isColumnKey)
    .map((key) => headingIn(key, locale))
    .join(", ");

const folded = (heading: string): string =>
  heading
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/ß/gu, "ss")
    .replace(/[^\p{L}\p{N}%]/gu, "");

const KEY_OF: ReadonlyMap<string, ColumnKey> = new Map(
  COLUMN_KEYS.flatMap((key) => {
    const { heading, synonyms } = COLUMNS[key];
    return [key, heading.en, heading.de, ...synonyms].map((name) => [folded(name), key] as const);
  }),
);

/** The column a heading means, or undefined where it is none of ours. */
export const columnNamed = (heading: string): ColumnKey | undefined => KEY_OF.get(folded(heading));

export type Heading = {
  /** Which cell of a row belongs to a column. */
  readonly places: ReadonlyMap<ColumnKey, number>;
  /** How many cells a row has. */
  readonly width: number;
  /** Headings that mean nothing to us; their cells are not read. */
  readonly unread: readonly string[];
};

export type HeadingRefusal = "importColumnsMissing" | "importColumnTwice";

/**
 * Which cell belongs to which column. Refuses `importColumnsMissing` with the headings that are wanted, and
 * `importColumnTwice` where two headings mean the same.
 */
export function headingOf(cells: readonly string[]): Outcome<Heading, HeadingRefusal> {
  const places = new Map<ColumnKey, number>();
  const unread: string[] = [];
  for (const [place, cell] of cells.entries()) {
    const key = columnNamed(cell);
    if (key === undefined) {
      if (cell.trim() !== "") unread.push(cell.trim());
      continue;
    }
    const earlier = places.get(key);
    if (earlier !== undefined)
      return refuse("importColumnTwice", { first: cells[earlier] ?? "", second: cell.trim() });
    places.set(key, place);
  }
  const missing = COLUMN_KEYS.filter((key) => COLUMNS[key].isRequired && !places.has(key));
  if (missing.length > 0) return refuse("importColumnsMissing", { columns: missing.join(" ") });
  return ok({ places, width: cells.length, unread });
}
