import { coverFractionAt } from "@/lib/coverage/cover-fraction";
import type { Step } from "@/lib/kernel/explanation";
import { ONE, printFraction, ZERO, type Fraction } from "@/lib/kernel/fraction";
import type { CreditLineInput } from "./credit-input";
import { citedStep, creditStep, type NotGivenReason } from "./steps";

type MonthsLine = Pick<CreditLineInput, "monthsUsed" | "goodwill" | "coverTerms">;

/** Completed months that count, and the step where goodwill changed them; null months are not known. */
type Months = { readonly months: number | null; readonly steps: readonly Step[] };

/**
 * The completed months a credit goes by. Goodwill after the term counts as a failure in its last month, so with one
 * month of it left; before its end goodwill changes nothing.
 */
export function monthsThatCount({ monthsUsed, goodwill, coverTerms }: MonthsLine): Months {
  const { coverMonths } = coverTerms.terms;
  if (monthsUsed === null || !goodwill || monthsUsed < coverMonths) return { months: monthsUsed, steps: [] };
  const months = coverMonths - 1;
  return { months, steps: [creditStep("goodwillMonths", String(months), { monthsUsed, coverMonths })] };
}

type CoverShare = {
  readonly fraction: Fraction;
  readonly reason: NotGivenReason;
  readonly steps: readonly Step[];
};

/** The exact share of a part's price at its completed months, by the schedule of its cover terms; nothing after the term. */
export function coverShareOf(line: MonthsLine): CoverShare {
  const { terms, version } = line.coverTerms;
  const { coverMonths, coverFraction: schedule } = terms;
  const { months, steps } = monthsThatCount(line);
  if (months === null) {
    const known = schedule.kind === "full";
    const only = known ? creditStep("coverFull", "1", {}) : creditStep("monthsUnknown", "0", {});
    return {
      fraction: known ? ONE : ZERO,
      reason: "monthsUnknown",
      steps: [citedStep(version, only)],
    };
  }
  if (months >= coverMonths) {
    const over = creditStep("termOver", "0", { monthsUsed: months, coverMonths });
    return { fraction: ZERO, reason: "termOver", steps: [...steps, citedStep(version, over)] };
  }
  const fraction = coverFractionAt(schedule, coverMonths, months);
  const result = printFraction(fraction);
  const rule = {
    full: () => creditStep("coverFull", result, {}),
    straightLine: () => creditStep("coverStraightLine", result, { monthsUsed: months, coverMonths }),
    step: () => creditStep("coverStep", result, { monthsUsed: months }),
  }[schedule.kind];
  return { fraction, reason: "monthsUsed", steps: [...steps, citedStep(version, rule())] };
}
