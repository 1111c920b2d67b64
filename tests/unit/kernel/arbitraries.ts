import fc from "fast-check";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { CURRENCIES } from "@/lib/kernel/currency";
import { money } from "@/lib/kernel/money";

/** Days over two leap cycles of a century, the odd year 2000 included. */
export const anyDay = fc
  .integer({ min: 0, max: 55_000 })
  .map((days) => addDays(calendarDay("1950-01-01"), days));
export const anyCurrency = fc.constantFrom(...CURRENCIES);
export const anyMinor = fc.bigInt({ min: -(10n ** 15n), max: 10n ** 15n });
export const anyMoney = fc.tuple(anyMinor, anyCurrency).map(([minor, currency]) => money(minor, currency));
