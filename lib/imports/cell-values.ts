import { isAfter, parseCalendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { isCurrency, type Currency } from "@/lib/kernel/currency";
import { parseMoney, type Money } from "@/lib/kernel/money";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { normaliseSerial } from "@/lib/labels/serial";

/** Why a cell cannot be taken; each has its sentence. */
export type CellProblem =
  | "missing"
  | "tooLong"
  | "lineNumber"
  | "dayUnread"
  | "dayAhead"
  | "currencyUnknown"
  | "quantity"
  | "serialUnread"
  | "amountUnread"
  | "amountTooFine"
  | "amountNegative"
  | "amountTooLarge"
  | "taxCategory"
  | "taxRate"
  | "taxRateZero"
  | "taxRateNotZero"
  | "reasonMissing"
  | "reasonNotTaken";

type Read<T> = Outcome<T, CellProblem>;

const LARGEST_WHOLE = 2_147_483_647;

/** A text that has to be there, of at most so many characters. */
export function readText(text: string, most: number): Read<string> {
  if (text === "") return refuse("missing");
  return text.length > most ? refuse("tooLong", { most }) : ok(text);
}

/** A text that may be left out. */
export const readOptional = (text: string, most: number): Read<string | null> =>
  text === "" ? ok(null) : readText(text, most);

const wholeNumber = (text: string): number | null => {
  // Spreadsheets write a whole number as "3.0" or "3,00" when the column is formatted.
  const digits = /^0*(\d{1,10})(?:[.,]0+)?$/u.exec(text)?.[1];
  const value = digits === undefined ? 0 : Number(digits);
  return value >= 1 && value <= LARGEST_WHOLE ? value : null;
};

/** The number of an invoice line: a whole number from 1. */
export function readLineNumber(text: string): Read<number> {
  if (text === "") return refuse("missing");
  const value = wholeNumber(text);
  return value === null ? refuse("lineNumber") : ok(value);
}

/** How many pieces: a whole number from 1, and one where nothing is said. */
export function readQuantity(text: string): Read<number> {
  const value = text === "" ? 1 : wholeNumber(text);
  return value === null ? refuse("quantity") : ok(value);
}

/** A day as 2026-03-02 or 2.3.2026 that has come. Two digits of a year and 3/2/2026 are not guessed at. */
export function readDay(text: string, today: CalendarDay): Read<CalendarDay> {
  if (text === "") return refuse("missing");
  const [, day = "", month = "", year = ""] = /^(\d{1,2})\.\s?(\d{1,2})\.\s?(\d{4})$/u.exec(text) ?? [];
  const found = parseCalendarDay(year ? `${year}-${month.padStart(2, "0")}-${day.padStart(2, "0")}` : text);
  if (found === null) return refuse("dayUnread");
  return isAfter(found, today) ? refuse("dayAhead") : ok(found);
}

/** A currency by its code, in small letters too. */
export function readCurrency(text: string): Read<Currency> {
  const code = text.toUpperCase();
  return isCurrency(code) ? ok(code) : refuse("currencyUnknown");
}

const AMOUNT_PROBLEMS = {
  amountNotReadable: "amountUnread",
  amountTooFine: "amountTooFine",
  amountTooLarge: "amountTooLarge",
} as const;

/** A net price of one piece, nothing or more. */
export function readPrice(text: string, currency: Currency): Read<Money> {
  if (text === "") return refuse("missing");
  const amount = parseMoney(text, currency);
  if (!amount.ok) return refuse(AMOUNT_PROBLEMS[amount.code], amount.detail);
  return amount.value.minor < 0n ? refuse("amountNegative") : amount;
}

export type Serial = { readonly raw: string; readonly normal: string };

const LONGEST_SERIAL = 80;

/** A serial as it stands and in the form it is compared by; null where there is none. */
export function readSerial(text: string): Read<Serial | null> {
  if (text === "") return ok(null);
  if (text.length > LONGEST_SERIAL) return refuse("tooLong", { most: LONGEST_SERIAL });
  const normal = normaliseSerial(text);
  return normal === "" ? refuse("serialUnread") : ok({ raw: text, normal });
}

/** Tax categories of an invoice line (UNCL5305): what is asked of rate and reason follows from them. */
export const TAX_CATEGORIES = {
  S: { hasRate: true, needsReason: false },
  Z: { hasRate: false, needsReason: false },
  E: { hasRate: false, needsReason: true },
  AE: { hasRate: false, needsReason: true },
  K: { hasRate: false, needsReason: true },
  G: { hasRate: false, needsReason: true },
  O: { hasRate: false, needsReason: true },
} as const;

export type TaxCategory = keyof typeof TAX_CATEGORIES;

const isTaxCategory = (text: string): text is TaxCategory => Object.hasOwn(TAX_CATEGORIES, text);

/** A tax category by its letters, in small ones too. */
export function readTaxCategory(text: string): Read<TaxCategory> {
  if (text === "") return refuse("missing");
  const category = text.toUpperCase();
  return isTaxCategory(category) ? ok(category) : refuse("taxCategory");
}

/** The rate as the ledger keeps it: a decimal with three places ("19.000"). Nothing said is none, where none is due. */
export function readTaxRate(text: string, category: TaxCategory): Read<string> {
  const { hasRate } = TAX_CATEGORIES[category];
  if (text === "") return hasRate ? refuse("missing") : ok("0.000");
  const [, whole, places = ""] = /^0*(\d{1,2})(?:[.,](\d{1,3})0*)?\s?%?$/u.exec(text) ?? [];
  if (whole === undefined) return refuse("taxRate");
  const rate = `${whole}.${places.padEnd(3, "0")}`;
  if (/^0+\.000$/u.test(rate)) return hasRate ? refuse("taxRateZero") : ok("0.000");
  return hasRate ? ok(rate) : refuse("taxRateNotZero", { category });
}

const LONGEST_REASON = 200;

/** Why no tax is due: asked for by some categories and taken by no taxed line. */
export function readReason(text: string, category: TaxCategory): Read<string | null> {
  const { hasRate, needsReason } = TAX_CATEGORIES[category];
  if (text === "") return needsReason ? refuse("reasonMissing", { category }) : ok(null);
  return hasRate ? refuse("reasonNotTaken", { category }) : readText(text, LONGEST_REASON);
}
