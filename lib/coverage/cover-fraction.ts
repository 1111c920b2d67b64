import { fraction, fractionFrom, ONE, ZERO, type Fraction } from "@/lib/kernel/fraction";
import type { CoverFractionSchedule } from "@/lib/rule-book/terms-shape";

/**
 * The exact share of the price that is covered with so many completed months used: all of it; months left over months
 * covered, down to zero (trade practice, from memory, no source); or the share of the last step reached.
 */
export function coverFractionAt(
  schedule: CoverFractionSchedule,
  coverMonths: number,
  monthsUsed: number,
): Fraction {
  switch (schedule.kind) {
    case "full":
      return ONE;
    case "straightLine":
      return monthsUsed >= coverMonths ? ZERO : fraction(coverMonths - Math.max(0, monthsUsed), coverMonths);
    case "step":
      return fractionFrom(
        schedule.steps.findLast((one) => one.fromMonth <= Math.max(0, monthsUsed))?.fraction ?? "0",
      );
  }
}
