import { getDayOfWeek, parseDate, parseTime, toCalendarDateTime, toZoned } from "@internationalized/date";
import { addDays, dayInZone, type CalendarDay } from "./calendar-day";

export const WEEKDAYS = [
  "monday",
  "tuesday",
  "wednesday",
  "thursday",
  "friday",
  "saturday",
  "sunday",
] as const;
export type Weekday = (typeof WEEKDAYS)[number];

/** Opening hours on the wall clock, `HH:MM`; `closes` is later on the same day, `24:00` at the latest. */
export type OpeningHours = { readonly opens: string; readonly closes: string };

/** When somebody works: an IANA time zone, hours per weekday in order (none for a day off), and holidays. */
export type WorkingCalendar = {
  readonly timeZone: string;
  readonly hours: Readonly<Record<Weekday, readonly OpeningHours[]>>;
  readonly holidays: readonly CalendarDay[];
};

const MINUTE_MS = 60_000;
const LONGEST_GAP_DAYS = 400;

/** True where the calendar has hours on that day. */
export const isWorkingDay = (calendar: WorkingCalendar, day: CalendarDay): boolean =>
  hoursOn(calendar, day).length > 0;

/**
 * The instant at which n working minutes after a start have passed; the end is inclusive, so one hour from
 * Thursday 16:00 is Thursday 17:00 where the day ends then. Throws RangeError for n below 0 or an empty calendar.
 */
export function addWorkingMinutes(calendar: WorkingCalendar, start: Date, minutes: number): Date {
  if (!(minutes >= 0)) throw new RangeError("Working minutes to add must not be negative");
  let leftMs = minutes * MINUTE_MS;
  let day = dayInZone(start, calendar.timeZone);
  for (let idleDays = 0; idleDays < LONGEST_GAP_DAYS; idleDays += 1) {
    for (const { opensMs, closesMs } of spansOn(calendar, day)) {
      const fromMs = Math.max(opensMs, start.getTime());
      const freeMs = closesMs - fromMs;
      if (freeMs < 0) continue;
      if (leftMs <= freeMs) return new Date(fromMs + leftMs);
      leftMs -= freeMs;
      if (freeMs > 0) idleDays = 0;
    }
    day = addDays(day, 1);
  }
  throw new RangeError("The calendar has no working time");
}

/** Whole working minutes from one instant to a later one; 0 where `to` is not after `from`. */
export function workingMinutesBetween(calendar: WorkingCalendar, from: Date, to: Date): number {
  if (to <= from) return 0;
  const lastDay = dayInZone(to, calendar.timeZone);
  let workedMs = 0;
  for (let day = dayInZone(from, calendar.timeZone); day <= lastDay; day = addDays(day, 1)) {
    for (const { opensMs, closesMs } of spansOn(calendar, day)) {
      workedMs += Math.max(0, Math.min(closesMs, to.getTime()) - Math.max(opensMs, from.getTime()));
    }
  }
  return Math.floor(workedMs / MINUTE_MS);
}

/** The nth working day after a day, the day itself not counted; for n = 0 the day itself. */
export function addWorkingDays(calendar: WorkingCalendar, day: CalendarDay, days: number): CalendarDay {
  if (!Number.isInteger(days) || days < 0)
    throw new RangeError("Working days to add must be whole and not negative");
  let reached = day;
  for (let left = days; left > 0; left -= 1) reached = workingDayFrom(calendar, addDays(reached, 1));
  return reached;
}

/**
 * That day, or the next working day where it is none: how a period for a declaration ends on a Saturday,
 * Sunday or holiday (Regulation (EEC, Euratom) 1182/71, Article 3(4)). Not for the end of a warranty term.
 */
export function workingDayFrom(calendar: WorkingCalendar, day: CalendarDay): CalendarDay {
  for (let tried = 0, next = day; tried < LONGEST_GAP_DAYS; tried += 1, next = addDays(next, 1)) {
    if (isWorkingDay(calendar, next)) return next;
  }
  throw new RangeError("The calendar has no working day");
}

function hoursOn(calendar: WorkingCalendar, day: CalendarDay): readonly OpeningHours[] {
  if (calendar.holidays.includes(day)) return [];
  const weekday = WEEKDAYS[getDayOfWeek(parseDate(day), "en-GB", "mon")];
  return weekday === undefined ? [] : calendar.hours[weekday];
}

/** Opening hours of a day as instants; a wall time that the change to summer time skips moves on by the gap. */
const spansOn = (calendar: WorkingCalendar, day: CalendarDay) =>
  hoursOn(calendar, day).map(({ opens, closes }) => ({
    opensMs: instantMs(day, opens, calendar.timeZone),
    closesMs: instantMs(day, closes, calendar.timeZone),
  }));

const instantMs = (day: CalendarDay, time: string, timeZone: string): number =>
  time === "24:00"
    ? instantMs(addDays(day, 1), "00:00", timeZone)
    : toZoned(toCalendarDateTime(parseDate(day), parseTime(time)), timeZone)
        .toDate()
        .getTime();

/** The instant a working day closes; for a day off, that of the next working day. */
export function endOfWorkingDay(calendar: WorkingCalendar, day: CalendarDay): Date {
  const closing = spansOn(calendar, workingDayFrom(calendar, day)).at(-1);
  if (!closing) throw new RangeError("The calendar has no working time");
  return new Date(closing.closesMs);
}
