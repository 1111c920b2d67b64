import { parseCalendarDay, type CalendarDay } from "./calendar-day";
import { minorDigits } from "./currency";
import { formatTag, type Locale } from "./locale";
import { toDecimalString, type Money } from "./money";

// Making a formatter costs more than a hundred uses of it.
const dateFormats = new Map<string, Intl.DateTimeFormat>();
const numberFormats = new Map<string, Intl.NumberFormat>();

/** "3 May 2027", "3. Mai 2027". */
export const formatDay = (day: CalendarDay, locale: Locale): string =>
  dateFormat(locale, "UTC", { day: "numeric", month: "long", year: "numeric" }).format(
    new Date(`${day}T00:00:00Z`),
  );

/** "3 May 2027, 14:02", on the wall clock of an IANA time zone. */
export const formatInstant = (at: Date, locale: Locale, timeZone: string): string =>
  `${dateFormat(locale, timeZone, { day: "numeric", month: "long", year: "numeric" }).format(at)}, ${formatTime(at, locale, timeZone)}`;

/** "14:02", on the wall clock of an IANA time zone. */
export const formatTime = (at: Date, locale: Locale, timeZone: string): string =>
  dateFormat(locale, timeZone, { hour: "2-digit", minute: "2-digit", hourCycle: "h23" }).format(at);

/** "May 2027", "Mai 2027": the month a day is in, for batches and reports. */
export const formatMonth = (day: CalendarDay, locale: Locale): string =>
  dateFormat(locale, "UTC", { month: "long", year: "numeric" }).format(new Date(`${day}T00:00:00Z`));

/** "£145.55", "145,55 €", with the decimals of ISO 4217, never those of the format's own currency table. */
export function formatMoney(amount: Money, locale: Locale): string {
  const digits = minorDigits(amount.currency);
  return numberFormat(locale, {
    style: "currency",
    currency: amount.currency,
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  }).format(toDecimalString(amount) as Intl.StringNumericLiteral);
}

/** How many decimals a number shows: from `least` (default 0) to `most` (default the greater of 3 and `least`). */
export type Decimals = { readonly least?: number; readonly most?: number };

/** "1,234.5", "1.234,5". */
export const formatNumber = (
  value: number | bigint,
  locale: Locale,
  { least = 0, most = Math.max(3, least) }: Decimals = {},
): string =>
  numberFormat(locale, { minimumFractionDigits: least, maximumFractionDigits: most }).format(value);

/** A decimal kept as text, as people write it and never through a float: "20.000" gives "20", "5.500" gives "5.5", "5,5". */
export const formatDecimal = (decimal: string, locale: Locale): string =>
  numberFormat(locale, { maximumFractionDigits: 6 }).format(decimal as Intl.StringNumericLiteral);

/** A ratio as a percentage: 0.125 gives "12.5%", "12,5 %". */
export const formatPercent = (
  ratio: number,
  locale: Locale,
  { least = 0, most = Math.max(1, least) }: Decimals = {},
): string =>
  numberFormat(locale, {
    style: "percent",
    minimumFractionDigits: least,
    maximumFractionDigits: most,
  }).format(ratio);

const BYTE_UNITS = ["byte", "kilobyte", "megabyte", "gigabyte"];

/** "31 MB", "1.4 MB", "640 kB", "12 byte": steps of 1024, as the limits of the product are counted. */
export function formatBytes(bytes: number, locale: Locale): string {
  let [size, unit] = [bytes, 0];
  // From 999.5 a figure of three digits would be rounded up to four.
  for (; size >= 999.5 && unit < BYTE_UNITS.length - 1; unit += 1) size /= 1024;
  return numberFormat(locale, {
    style: "unit",
    unit: BYTE_UNITS[unit],
    maximumFractionDigits: size < 9.95 ? 1 : 0,
  }).format(size);
}

/**
 * The values of a step, a reason or a refusal, ready for the placeholders of its sentence: what stands under a
 * name ending in `On` is a day and is printed as one; numbers stay numbers, the sentence formats them.
 */
export const formatDetail = (
  detail: Readonly<Record<string, string | number>>,
  locale: Locale,
): Record<string, string | number> =>
  Object.fromEntries(
    Object.entries(detail).map(([name, value]) => [
      name,
      name.endsWith("On") ? formatResult(String(value), locale) : value,
    ]),
  );

/** The result of a step: printed as a day where it is one, else as it stands. */
export function formatResult(result: string, locale: Locale): string {
  const day = parseCalendarDay(result);
  return day === null ? result : formatDay(day, locale);
}

function dateFormat(
  locale: Locale,
  timeZone: string,
  options: Intl.DateTimeFormatOptions,
): Intl.DateTimeFormat {
  const key = JSON.stringify([formatTag(locale), timeZone, options]);
  const known = dateFormats.get(key) ?? new Intl.DateTimeFormat(formatTag(locale), { ...options, timeZone });
  dateFormats.set(key, known);
  return known;
}

function numberFormat(locale: Locale, options: Intl.NumberFormatOptions): Intl.NumberFormat {
  const key = JSON.stringify([formatTag(locale), options]);
  const known = numberFormats.get(key) ?? new Intl.NumberFormat(formatTag(locale), options);
  numberFormats.set(key, known);
  return known;
}
