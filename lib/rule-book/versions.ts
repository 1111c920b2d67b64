import type { CalendarDay } from "@/lib/kernel/calendar-day";

/** Anything dated from a day on; it is in force until a later one takes its place. */
export type Dated = { readonly validFrom: CalendarDay };

/** The version in force on a day: the latest whose first day is not after it, of equal ones the last listed. */
export function versionOn<Version extends Dated>(
  versions: readonly Version[],
  day: CalendarDay,
): Version | null {
  return versions.reduce<Version | null>((found, version) => {
    if (version.validFrom > day) return found;
    return found === null || version.validFrom >= found.validFrom ? version : found;
  }, null);
}

/** The days of a claim line by which rules are chosen; null where the day is not known. */
export type RuleDays = {
  readonly shippedOn: CalendarDay | null;
  readonly fittedOn: CalendarDay | null;
  readonly repairedOn: CalendarDay | null;
  readonly filedOn: CalendarDay | null;
  readonly invoicedOn: CalendarDay | null;
  readonly decidedOn: CalendarDay | null;
};

/**
 * Which day's rules answer which question. Price and tax are those of the original invoice line itself; the letter
 * follows the day of the verdict.
 */
export const QUESTION_DAY = {
  cover: "shippedOn",
  coverRate: "shippedOn",
  labourRate: "repairedOn",
  diagnosis: "repairedOn",
  evidenceList: "filedOn",
  readingLimits: "fittedOn",
  price: "invoicedOn",
  tax: "invoicedOn",
  letter: "decidedOn",
} as const satisfies Record<string, keyof RuleDays>;

export type RuleQuestion = keyof typeof QUESTION_DAY;

/** The day whose rules answer a question about a claim line, or null where that day is not known. */
export const questionDay = (question: RuleQuestion, days: RuleDays): CalendarDay | null =>
  days[QUESTION_DAY[question]];
