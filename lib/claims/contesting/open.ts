import { isAfter, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { ClaimState } from "../lifecycle";

type Decided = {
  readonly state: ClaimState;
  /** The last day, as at the workshop; null where none was named. */
  readonly contestUntil: CalendarDay | null;
  readonly contestWaivedAt: Date | null;
};

/** Whether the workshop may still object to the verdict: decided, not accepted, and its last day not over. */
export const isContestOpen = (
  { state, contestUntil, contestWaivedAt }: Decided,
  todayOn: CalendarDay,
): boolean =>
  state === "decided" &&
  contestWaivedAt === null &&
  (contestUntil === null || !isAfter(todayOn, contestUntil));
