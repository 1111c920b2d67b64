import { addMonths, addDays, parseCalendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";

/** One element of a GS1 label: its application identifier ("01", "10", "21") and its value. */
export type Element = { readonly ai: string; readonly value: string };

/** What an identifier's value must be; `fixed` ones need no separator behind them. */
type ValueRule = { readonly digits: boolean; readonly least: number; readonly most: number };

export type LabelFault = "identifierUnknown" | "valueWrong" | "labelUnreadable";

/** The separator FNC1 as a scanner sends it: the control character GS. */
export const GROUP_SEPARATOR = "\u001d";

// All from GS1's open Barcode Syntax Dictionary, 2026-01-27. Identifiers by their first two digits: how long they are.
const IDENTIFIER_LENGTH: readonly (readonly [RegExp, number])[] = [
  [/^(0[0-3]|1[0-7]|2[0-2]|30|37|9\d)/, 2],
  [/^(2[345]|4[0-2]|71)/, 3],
  [/^(3[1-69]|43|70|72|8[0-2])/, 4],
];

const FIXED_DIGITS: readonly (readonly [RegExp, number])[] = [
  [/^00$/, 18],
  [/^0[123]$/, 14],
  [/^1[1235-7]$/, 6],
  [/^20$/, 2],
  [/^3[1-6]\d\d$/, 6],
  [/^41[0-7]$/, 13],
];

const VARIABLE: ReadonlyMap<string, ValueRule> = new Map([
  ...["10", "21", "22"].map((ai) => [ai, { digits: false, least: 1, most: 20 }] as const),
  ["235", { digits: false, least: 1, most: 28 }],
  ...["240", "241", "250", "251", "400", "8004", "8010", "90"].map(
    (ai) => [ai, { digits: false, least: 1, most: 30 }] as const,
  ),
  ["8011", { digits: true, least: 1, most: 12 }],
  ...["30", "37"].map((ai) => [ai, { digits: true, least: 1, most: 8 }] as const),
]);
/** Identifiers this product has no use for are read by the widest rule there is, so that a label never fails on them. */
const ANY_VALUE: ValueRule = { digits: false, least: 1, most: 90 };

// GS1 character set 82: letters, figures and these marks; no space.
const CHARACTER_SET_82 = /^[!"%&'()*+,\-./0-9:;<=>?A-Z_a-z]*$/;

/** Length of the identifier that begins there, by its first two digits; null where none begins so. */
export const identifierLength = (text: string): number | null =>
  IDENTIFIER_LENGTH.find(([beginning]) => beginning.test(text))?.[1] ?? null;

/** True where a text is an identifier in full: the right number of digits for its beginning. */
export const isIdentifier = (text: string): boolean =>
  /^\d{2,4}$/.test(text) && identifierLength(text) === text.length;

/** Digits of an identifier whose value has a predefined length and so needs no separator, else null. */
export const fixedLength = (ai: string): number | null =>
  FIXED_DIGITS.find(([form]) => form.test(ai))?.[1] ?? null;

/** One element, its value checked for length and characters by its identifier's rule; check digits are not looked at. */
export function element(ai: string, value: string): Outcome<Element, LabelFault> {
  if (!isIdentifier(ai)) return refuse("identifierUnknown", { identifier: ai });
  const fixed = fixedLength(ai);
  const rule = fixed === null ? (VARIABLE.get(ai) ?? ANY_VALUE) : { digits: true, least: fixed, most: fixed };
  const fits = value.length >= rule.least && value.length <= rule.most && CHARACTER_SET_82.test(value);
  return fits && (!rule.digits || /^\d+$/.test(value))
    ? ok({ ai, value })
    : refuse("valueWrong", { identifier: ai });
}

/**
 * The day behind YYMMDD in a year near `today`'s: the year within 49 back and 50 ahead (GS1 General Specifications
 * 7.12, from memory); day 00 is the last of its month (from memory). Null where there is no such day.
 */
export function gs1Day(yymmdd: string, today: CalendarDay): CalendarDay | null {
  if (!/^\d{6}$/.test(yymmdd)) return null;
  const year = nearYear(Number(yymmdd.slice(0, 2)), Number(today.slice(0, 4)));
  const [month, day] = [yymmdd.slice(2, 4), yymmdd.slice(4)];
  if (day !== "00") return parseCalendarDay(`${year}-${month}-${day}`);
  const first = parseCalendarDay(`${year}-${month}-01`);
  return first && addDays(addMonths(first, 1), -1);
}

/** The four-digit year of a two-digit one: 51 or more ahead is the last century, 50 or more behind the next. */
export function nearYear(twoDigits: number, currentYear: number): number {
  const century = currentYear - (currentYear % 100);
  const ahead = twoDigits - (currentYear % 100);
  return century + twoDigits + (ahead >= 51 ? -100 : ahead <= -50 ? 100 : 0);
}
