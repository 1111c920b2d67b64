import { addDays, daysBetween, isAfter, type CalendarDay } from "@/lib/kernel/calendar-day";

/** How an open query stands. All days are those of the workshop's zone. */
export type OpenQuery = {
  readonly askedOn: CalendarDay;
  /** The last day an answer counts; the claim lapses on the day after it. */
  readonly lapsesOn: CalendarDay;
  /** The number of the newest reminder sent, which may have left out the one before it; 0 before the first. */
  readonly remindersSent: number;
};

export type QueryStep =
  | { readonly kind: "remind"; readonly reminder: number; readonly lapsesOn: CalendarDay }
  | { readonly kind: "lapse" };

const REMINDERS = 2;
const LATE_GRACE_DAYS = 3;

/**
 * The days the reminders fall on: a third and two thirds of the way from asking to the last day, at least one day
 * apart and never after the last day. Terms that leave a single day leave room for one reminder only.
 */
export function reminderDays({ askedOn, lapsesOn }: Omit<OpenQuery, "remindersSent">): CalendarDay[] {
  const days = daysBetween(askedOn, lapsesOn);
  const first = Math.max(1, Math.floor(days / (REMINDERS + 1)));
  const second = Math.max(first + 1, Math.floor((days * REMINDERS) / (REMINDERS + 1)));
  return [first, second].filter((after) => after <= days).map((after) => addDays(askedOn, after));
}

/**
 * What the clock does to a query today; null for nothing. After a standstill only the newest reminder that is due goes
 * out. Once the last day has passed the claim lapses, unless no reminder was ever sent: nobody loses a claim unwarned,
 * so the last reminder goes out then and leaves three more days to answer.
 */
export function stepDue(query: OpenQuery, today: CalendarDay): QueryStep | null {
  if (isAfter(today, query.lapsesOn)) {
    if (query.remindersSent > 0) return { kind: "lapse" };
    return { kind: "remind", reminder: REMINDERS, lapsesOn: addDays(today, LATE_GRACE_DAYS) };
  }
  const reminder = reminderDays(query).filter((day) => !isAfter(day, today)).length;
  return reminder > query.remindersSent ? { kind: "remind", reminder, lapsesOn: query.lapsesOn } : null;
}
