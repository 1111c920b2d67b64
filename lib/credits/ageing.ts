import { daysBetween, type CalendarDay } from "@/lib/kernel/calendar-day";

/** Buckets of what is owed by days past the due day, and the last day past it that each one holds. */
const BUCKETS = [
  { bucket: "current", lastDay: 0 },
  { bucket: "days1To30", lastDay: 30 },
  { bucket: "days31To60", lastDay: 60 },
  { bucket: "days61To90", lastDay: 90 },
] as const;

export const AGEING_BUCKETS = [...BUCKETS.map(({ bucket }) => bucket), "over90Days"] as const;
export type AgeingBucket = (typeof BUCKETS)[number]["bucket"] | "over90Days";

/** In which bucket something due on a day stands as at another; credits not used yet have a bucket of their own. */
export function ageingBucket(dueOn: CalendarDay, asAtOn: CalendarDay): AgeingBucket {
  const daysPast = daysBetween(dueOn, asAtOn);
  return BUCKETS.find(({ lastDay }) => daysPast <= lastDay)?.bucket ?? "over90Days";
}
