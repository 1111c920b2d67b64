import { z } from "zod";
import { isTimeZone, parseCalendarDay } from "@/lib/kernel/calendar-day";
import { compareFractions, ONE, parseFraction } from "@/lib/kernel/fraction";

// Messages are keys of sentences under `forms`.

/** A share from 0 to 1 as an exact fraction of integers: "17/24", "1/1", "0". */
export const share = z
  .string()
  .regex(/^\d{1,9}(\/\d{1,9})?$/, "shareNeeded")
  .refine((text) => {
    const value = parseFraction(text);
    return value !== null && compareFractions(value, ONE) <= 0;
  }, "shareNeeded");

/** A civil day; a body holds it as `YYYY-MM-DD`. */
export const day = z.string().transform((text, context) => {
  const parsed = parseCalendarDay(text);
  if (parsed !== null) return parsed;
  context.addIssue({ code: "custom", message: "dayNeeded" });
  return z.NEVER;
});

export const timeZone = z.string().refine(isTimeZone, "timeZoneUnknown");

/** A code of this project's own lists (family, symptom, reading kind, sentence), never a person's text. */
export const code = z.string().regex(/^[a-z][A-Za-z0-9]{0,59}$/, "codeNeeded");

/** Where a figure comes from, shown beside it wherever it is used. */
export const sourceNote = z.string().trim().min(1, "missing").max(300, "tooLong");

export const wholeDays = z.int().min(0).max(3660);
export const wholeMonths = z.int().min(0).max(240);
/** An amount that is not negative, in minor units. */
export const amountMinor = z.int().min(0).max(1_000_000_000_00);

/** True where each value is greater than the one before. */
export const rising = (values: readonly number[]): boolean =>
  values.every((value, place) => place === 0 || value > (values[place - 1] ?? value));
