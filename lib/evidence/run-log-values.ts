import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { plainText } from "./plain-text";
import type { RunLogNote, RunLogRefusal } from "./run-log";
import type { Header } from "./run-log-header";
import { unitNamed, type Unit } from "./units";

export type DecimalMark = "." | ",";

/** A cell of a measured column: a number with the unit written behind it, nothing measured, or not to be read. */
export type CellReading =
  | { readonly kind: "number"; readonly value: number; readonly unit: Unit | null }
  | { readonly kind: "blank" }
  | { readonly kind: "unreadable" };

const BLANK = /^(?:-+|n\/?a|#n\/a|nan|null|none|o\.?l\.?|inf|err(?:or)?)?$/iu;
const NUMBER = {
  ".": /^[+\-−]?(?:\d{1,3}(?:[,' ’]\d{3})+|\d*)(?:\.\d+)?(?:[eE][+-]?\d{1,2})?/u,
  ",": /^[+\-−]?(?:\d{1,3}(?:[.' ’]\d{3})+|\d*)(?:,\d+)?(?:[eE][+-]?\d{1,2})?/u,
} as const;
const PLAIN = { ".": /^-?\d{1,15}(?:\.\d{1,15})?$/u, ",": /^-?\d{1,15}(?:,\d{1,15})?$/u } as const;
const GROUPING = { ".": /[,' ’]/gu, ",": /[.' ’]/gu } as const;
const LONGEST_CELL = 40;

/** Reads one cell by the decimal mark of its file. */
export function cellReading(cell: string, mark: DecimalMark): CellReading {
  // Nearly every cell is a plain number, and a log has a great many of them.
  if (PLAIN[mark].test(cell)) return { kind: "number", value: Number(cell.replace(",", ".")), unit: null };
  if (cell.length > LONGEST_CELL) return { kind: "unreadable" };
  if (BLANK.test(cell)) return { kind: "blank" };
  const found = NUMBER[mark].exec(cell)?.[0] ?? "";
  const value = Number(found.replace(GROUPING[mark], "").replace(",", ".").replace("−", "-"));
  if (!/\d/u.test(found) || !Number.isFinite(value)) return { kind: "unreadable" };
  const behind = plainText(cell.slice(found.length));
  if (behind === "") return { kind: "number", value, unit: null };
  const unit = unitNamed(behind);
  return unit === null || unit === "ambiguous" ? { kind: "unreadable" } : { kind: "number", value, unit };
}

/** What a cell proves about the decimal mark of its file: a mark for certain, a mark perhaps ("1.234"), or nothing. */
function proofOf(cell: string): { mark: DecimalMark; certain: boolean } | null {
  const marks = cell.length > LONGEST_CELL ? null : /^[+\-−]?(\d*)((?:[.,]\d+)+)/u.exec(cell);
  const [, lead = "", tail = ""] = marks ?? [];
  const last = tail.lastIndexOf(".") > tail.lastIndexOf(",") ? "." : ",";
  if (tail === "") return null;
  const parts = tail.split(/[.,]/u).slice(1);
  const sameMark = !tail.includes(last === "." ? "," : ".");
  if (parts.length === 1) {
    const certain = tail.length !== 4 || lead === "" || lead.startsWith("0") || lead.length > 3;
    return { mark: last, certain };
  }
  // Several of the same mark group digits, so the other one is the decimal mark; else the last one is.
  return { mark: sameMark ? (last === "." ? "," : ".") : last, certain: true };
}

const CELLS_LOOKED_AT = 50_000;

/**
 * The decimal mark of a file, from the cells of its measured columns. A few cells against many are left to be
 * reported as unreadable; a file that is of two minds is refused. Where "1.234" is all there is, the mark is taken
 * for a decimal one, and a note says so.
 */
export function decimalMarkOf(
  header: Header,
  delimiter: string,
): Outcome<{ mark: DecimalMark; notes: RunLogNote[] }, RunLogRefusal> {
  const sure = { ".": 0, ",": 0 };
  const perhaps = { ".": 0, ",": 0 };
  let looked = 0;
  for (const row of header.rows) {
    for (const place of header.numericPlaces) {
      const proof = proofOf(row.cells[place] ?? "");
      if (proof) (proof.certain ? sure : perhaps)[proof.mark] += 1;
      looked += 1;
    }
    if (looked > CELLS_LOOKED_AT) break;
  }
  const mixed = refuse("runLogDecimalsMixed", { commas: sure[","], points: sure["."] });
  if (sure["."] > 0 && sure[","] > 0) {
    if (Math.min(sure["."], sure[","]) * 20 > Math.max(sure["."], sure[","])) return mixed;
    return ok({ mark: sure[","] > sure["."] ? "," : ".", notes: [] });
  }
  if (sure["."] + sure[","] > 0) return ok({ mark: sure[","] > 0 ? "," : ".", notes: [] });
  if (perhaps["."] > 0 && perhaps[","] > 0) return mixed;
  if (perhaps["."] + perhaps[","] === 0) return ok({ mark: delimiter === "," ? "." : ",", notes: [] });
  const mark = perhaps[","] > 0 ? "," : ".";
  return ok({ mark, notes: [{ code: "decimalAssumed", detail: { mark } }] });
}
