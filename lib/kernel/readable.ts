import { parseCalendarDay } from "./calendar-day";
import { formatDay } from "./format";
import type { Locale } from "./locale";

/** The values of a sentence as people write them: a civil day becomes "3 May 2027", everything else stays. */
export const readableValues = (
  values: Readonly<Record<string, string | number>>,
  locale: Locale,
): Record<string, string | number> =>
  Object.fromEntries(
    Object.entries(values).map(([name, value]) => {
      const day = typeof value === "string" ? parseCalendarDay(value) : null;
      return [name, day ? formatDay(day, locale) : value];
    }),
  );
