import type { Locale } from "@/lib/kernel/locale";
import { COLUMN_KEYS, COLUMNS } from "./columns";
import { headingIn } from "./heading";

const quoted = (cell: string): string => (/[";,\n]/u.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);

/** A small invoice file as it should look: two units on one invoice line, and a quantity. */
export function exampleFile(locale: Locale): string {
  // A German spreadsheet writes semicolons, because its comma is the decimal one.
  const isGerman = locale === "de";
  const cellOf = (cell: string) => quoted(isGerman ? cell.replace(/^(\d+)\.(\d{2})$/u, "$1,$2") : cell);
  const lines = [
    COLUMN_KEYS.map((key) => quoted(headingIn(key, locale))),
    ...([0, 1, 2] as const).map((line) => COLUMN_KEYS.map((key) => cellOf(COLUMNS[key].example[line]))),
  ];
  return lines.map((cells) => `${cells.join(isGerman ? ";" : ",")}\r\n`).join("");
}
