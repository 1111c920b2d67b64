import { getDayOfWeek, parseDate, parseTime, toCalendarDateTime, toZoned } from "@internationalized/date";
import { addDays, type CalendarDay } from "@/lib/kernel/calendar-day";

const SUNDAY = 6;
const SATURDAY = 5;

/**
 * The working day the story means by "n days ago": that day, or the Friday before a weekend. Steps of the story keep
 * their order, because an earlier day never becomes a later one than its follower.
 */
export function workingDayAgo(today: CalendarDay, daysAgo: number): CalendarDay {
  const day = addDays(today, -daysAgo);
  const weekday = getDayOfWeek(parseDate(day), "en-GB", "mon");
  return addDays(day, weekday === SUNDAY ? -2 : weekday === SATURDAY ? -1 : 0);
}

/** The instant of a wall time `HH:MM:SS` on a day in an IANA zone. */
export const instantOn = (day: CalendarDay, time: string, timeZone: string): Date =>
  toZoned(toCalendarDateTime(parseDate(day), parseTime(time)), timeZone).toDate();

/** A wall time from minutes after midnight. */
export const wallTime = (minutes: number, seconds = 0): string =>
  [Math.floor(minutes / 60), Math.floor(minutes) % 60, seconds]
    .map((part) => String(part).padStart(2, "0"))
    .join(":");
