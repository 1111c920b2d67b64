import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { agesOf, sumsByCurrency } from "@/lib/reports/workshop-today/ages";

const TODAY = calendarDay("2026-11-30");
const filed = (daysAgo: number) => ({ filedOn: addDays(TODAY, -daysAgo) });

describe("the ages of open claims", () => {
  it("has each day's edge in one band", () => {
    const ages = agesOf([0, 7, 8, 30, 31, 60, 61, 400].map(filed), TODAY);
    expect(ages.bands.map(({ count }) => count)).toEqual([2, 2, 2, 2]);
    expect(ages).toMatchObject({ openDays: 597, oldestDays: 400 });
  });

  it("counts every claim once, whatever its age", () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 3000 })), (days) => {
        const { bands, openDays } = agesOf(days.map(filed), TODAY);
        expect(bands.reduce((sum, { count }) => sum + count, 0)).toBe(days.length);
        expect(openDays).toBe(days.reduce((sum, one) => sum + one, 0));
      }),
    );
  });

  it("is nothing where nothing is open", () => {
    expect(agesOf([], TODAY)).toMatchObject({ openDays: 0, oldestDays: 0 });
  });
});

describe("sums by currency", () => {
  it("adds within a currency alone, and leaves out what comes to nothing", () => {
    const sums = sumsByCurrency([
      { currency: "GBP", minor: 5n },
      { currency: "EUR", minor: 7n },
      { currency: "GBP", minor: 10n },
      { currency: "CHF", minor: 0n },
    ]);
    expect(sums).toEqual([
      { currency: "EUR", minor: 7n },
      { currency: "GBP", minor: 15n },
    ]);
  });
});
