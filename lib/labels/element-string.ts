import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import {
  element,
  fixedLength,
  GROUP_SEPARATOR,
  identifierLength,
  type Element,
  type LabelFault,
} from "./application-identifiers";

/**
 * The elements of a GS1 element string as a scanner sends it, symbology identifier taken off. Values without a
 * predefined length end at GS or at the end; a superfluous GS after any value, or in front, is tolerated.
 */
export function parseElementString(text: string): Outcome<readonly Element[], LabelFault> {
  const elements: Element[] = [];
  let rest = withoutLeadingSeparators(text);
  if (rest === "") return refuse("labelUnreadable");
  while (rest !== "") {
    const length = identifierLength(rest);
    if (length === null) return refuse("identifierUnknown", { identifier: rest.slice(0, 2) });
    const ai = rest.slice(0, length);
    const end = valueEnd(rest, length, fixedLength(ai));
    const read = element(ai, rest.slice(length, end));
    if (!read.ok) return read;
    elements.push(read.value);
    rest = withoutLeadingSeparators(rest.slice(end));
  }
  return ok(elements);
}

/** The elements of a label's readable form, `(01)12345678901231(10)12345`; a `\(` is a bracket of the value. */
export function parseBracketed(text: string): Outcome<readonly Element[], LabelFault> {
  const elements: Element[] = [];
  const pair = /\((\d{2,4})\)((?:\\\(|[^(\\])*)/y;
  while (pair.lastIndex < text.length) {
    const match = pair.exec(text);
    if (!match) return refuse("labelUnreadable");
    const read = element(match[1] ?? "", (match[2] ?? "").replaceAll("\\(", "("));
    if (!read.ok) return read;
    elements.push(read.value);
  }
  return elements.length === 0 ? refuse("labelUnreadable") : ok(elements);
}

/** The element string of a label, `^` for FNC1: in front, and behind each value that needs it, save the last. */
export const printElementString = (elements: readonly Element[]): string =>
  "^" +
  elements
    .map(
      ({ ai, value }, place) =>
        ai + value + (fixedLength(ai) === null && place < elements.length - 1 ? "^" : ""),
    )
    .join("");

/** Where a value that starts at `start` ends: after its fixed digits, at the next GS, or with the text. */
function valueEnd(text: string, start: number, fixed: number | null): number {
  if (fixed !== null) return start + fixed;
  const separator = text.indexOf(GROUP_SEPARATOR, start);
  return separator < 0 ? text.length : separator;
}

const withoutLeadingSeparators = (text: string): string => text.replace(/^\u001d+/, "");
