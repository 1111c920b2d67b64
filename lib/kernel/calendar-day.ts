import { fromDate, getDayOfWeek, parseDate, toCalendarDate } from "@internationalized/date";

declare const calendarDayChecked: unique symbol;
/** A civil day as `YYYY-MM-DD`, years 0001 to 9999, checked to exist. It has no time and no zone. */
export type CalendarDay = string & { readonly [calendarDayChecked]: true };

/** The day a text names, or null: only `YYYY-MM-DD` of a day that exists, so 2023-02-31 is null. */
export function parseCalendarDay(text: string): CalendarDay | null {
  try {
    // The round trip catches what the parser corrects in silence (year 0000 becomes 0001).
    return parseDate(text).toString() === text ? (text as CalendarDay) : null;
  } catch {
    return null;
  }
}

/** The day a text names. Throws RangeError where no such day exists: use it on data that was already checked. */
export function calendarDay(text: string): CalendarDay {
  const day = parseCalendarDay(text);
  if (day === null) throw new RangeError(`No such day: ${text}`);
  return day;
}

/**
 * The day n months later, always added once from the original day: the same day number, or the last day of
 * the month where that number does not exist (Regulation (EEC, Euratom) 1182/71, Article 3(2)(c)).
 * Negative n goes back. Throws RangeError outside the years 0001 to 9999.
 */
export function addMonths(day: CalendarDay, months: number): CalendarDay {
  const from = parseDate(day);
  const monthIndex = from.year * 12 + (from.month - 1) + months;
  // The library stops at its last year in silence; a term must not end there.
  if (!Number.isInteger(months) || monthIndex < 12 || monthIndex >= 120_000) {
    throw new RangeError(`Cannot add ${months} months to ${day}`);
  }
  return calendarDay(from.add({ months }).toString());
}

/** The day n days later, or earlier for negative n. Throws RangeError outside the years 0001 to 9999. */
export function addDays(day: CalendarDay, days: number): CalendarDay {
  const from = parseDate(day);
  const to = from.add({ days });
  if (!Number.isInteger(days) || to.compare(from) !== days)
    throw new RangeError(`Cannot add ${days} days to ${day}`);
  return calendarDay(to.toString());
}

/** Whole days from one day to another: 0 for the same day, negative where `to` comes first. */
export const daysBetween = (from: CalendarDay, to: CalendarDay): number =>
  parseDate(to).compare(parseDate(from));

/**
 * Completed months from one day to another: the greatest n for which `addMonths(from, n)` is not after `to`.
 * It agrees with the end of a term: a term of n months is over exactly from the day n months are completed.
 * So 31 January to 28 February is one completed month, although only 28 days. Negative where `to` comes first.
 */
export function completedMonths(from: CalendarDay, to: CalendarDay): number {
  const [start, end] = [parseDate(from), parseDate(to)];
  const months = (end.year - start.year) * 12 + (end.month - start.month);
  return isAfter(addMonths(from, months), to) ? months - 1 : months;
}

/** Order of two days for sorting: negative, 0 or positive. The text of a day sorts as the day does. */
export const compareDays = (a: CalendarDay, b: CalendarDay): number => (a < b ? -1 : a > b ? 1 : 0);

/** True where the first day comes before the second; the same day does not. */
export const isBefore = (a: CalendarDay, b: CalendarDay): boolean => a < b;
/** True where the first day comes after the second; the same day does not. */
export const isAfter = (a: CalendarDay, b: CalendarDay): boolean => a > b;
/** The earlier of two days. */
export const earlier = (a: CalendarDay, b: CalendarDay): CalendarDay => (a < b ? a : b);
/** The later of two days. */
export const later = (a: CalendarDay, b: CalendarDay): CalendarDay => (a > b ? a : b);

/** The civil day it was at an instant, in an IANA time zone such as `Europe/Vienna`. */
export const dayInZone = (instant: Date, timeZone: string): CalendarDay =>
  calendarDay(toCalendarDate(fromDate(instant, timeZone)).toString());

/** Year, week and weekday (1 Monday to 7 Sunday) by ISO 8601, for the YYWW codes on motors. */
export function isoWeek(day: CalendarDay): { year: number; week: number; weekday: number } {
  const weekday = getDayOfWeek(parseDate(day), "en-GB", "mon") + 1;
  // The week belongs to the year its Thursday is in.
  const thursday = parseDate(addDays(day, 4 - weekday));
  const newYear = thursday.set({ month: 1, day: 1 });
  return { year: thursday.year, week: Math.floor(thursday.compare(newYear) / 7) + 1, weekday };
}

/** True for a time zone the runtime knows by its IANA name. */
export function isTimeZone(name: string): boolean {
  try {
    dayInZone(new Date(0), name);
    return true;
  } catch {
    return false;
  }
}
