import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { ClaimMark } from "@/lib/claims/lists/view";

/** A claim behind a point of the curves, with its number as it is printed. */
export type BehindItem = {
  readonly number: string;
  readonly mark: ClaimMark;
  readonly batchCode: string | null;
  readonly serial: string | null;
  readonly workshop: string;
  readonly ageDays: number;
  readonly failedOn: CalendarDay;
  readonly counted: "confirmed" | "otherCause" | "undecided";
};
