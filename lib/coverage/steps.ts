import { step, type Step } from "@/lib/kernel/explanation";

/** The rules a coverage answer walks through, with the values their sentences speak of (`steps` in the message files). */
export const COVERAGE_STEPS = {
  termFromFitting: ["startOn", "coverMonths"],
  termFromShipment: ["startOn", "coverMonths"],
  shelfLimit: ["shippedOn", "shelfLimitMonths", "coverMonths"],
  earlierEnd: ["termEndOn", "shelfEndOn"],
  replacementMinimum: ["startOn", "replacementMinimumDays"],
  laterEnd: ["remainingEndOn", "minimumEndOn"],
  lastCoveredDay: ["firstUncoveredOn"],
  daysLeft: ["failedOn", "lastCoveredOn"],
  monthsUsed: ["startOn", "failedOn"],
  filingDays: ["failedOn", "filedOn", "timeZone", "filingLimitDays"],
  graceDays: ["fraction", "termDays"],
  graceBand: ["lastCoveredOn", "graceDays"],
} as const satisfies Record<string, readonly string[]>;

export type CoverageRule = keyof typeof COVERAGE_STEPS;

/** A step with exactly the values its sentence needs. */
export const coverageStep = <Rule extends CoverageRule>(
  rule: Rule,
  result: string,
  input: Readonly<Record<(typeof COVERAGE_STEPS)[Rule][number], string | number>>,
): Step => step(rule, result, input);

/** A step that rests on a version of the Rule book, which it names. */
export const cited = (version: string, uncited: Step): Step => ({ ...uncited, source: version });
