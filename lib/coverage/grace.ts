import { addDays, daysBetween, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { Step } from "@/lib/kernel/explanation";
import { fraction, fractionFrom, multiplyFractions } from "@/lib/kernel/fraction";
import type { TermsInForce } from "./facts";
import { cited, coverageStep } from "./steps";
import type { Term } from "./term";

type Grace = { readonly lastOn: CalendarDay; readonly steps: readonly Step[] };

/** The last day of the grace band behind a term: so many days, or a fraction of the term's days, rounded down. */
export function graceAfter(term: Term, lastCoveredOn: CalendarDay, { terms, version }: TermsInForce): Grace {
  const { days: graceDays, steps } = graceLength(term, lastCoveredOn, { terms, version });
  const lastOn = addDays(lastCoveredOn, graceDays);
  return {
    lastOn,
    steps: [...steps, cited(version, coverageStep("graceBand", lastOn, { lastCoveredOn, graceDays }))],
  };
}

function graceLength(term: Term, lastCoveredOn: CalendarDay, { terms, version }: TermsInForce) {
  const { grace } = terms;
  if (grace.kind === "days") return { days: grace.days, steps: [] };
  // Without a start there is no term to take a fraction of.
  const termDays = term.startOn === null ? 0 : daysBetween(term.startOn, lastCoveredOn) + 1;
  const exact = multiplyFractions(fractionFrom(grace.fraction), fraction(termDays));
  const days = Number(exact.numerator / exact.denominator);
  return {
    days,
    steps: [cited(version, coverageStep("graceDays", String(days), { fraction: grace.fraction, termDays }))],
  };
}
