import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addDays,
  addMonths,
  calendarDay,
  compareDays,
  completedMonths,
  dayInZone,
  daysBetween,
  earlier,
  isAfter,
  isBefore,
  isoWeek,
  isTimeZone,
  later,
  parseCalendarDay,
} from "@/lib/kernel/calendar-day";
import { anyDay } from "./arbitraries";

const anyMonths = fc.integer({ min: 0, max: 600 });

describe("a calendar day", () => {
  it.each(["2024-02-29", "2000-02-29", "0001-01-01", "9999-12-31"])("is a day that exists: %s", (text) => {
    expect(calendarDay(text)).toBe(text);
  });

  it.each([
    "2023-02-29",
    "2023-02-31",
    "1900-02-29",
    "2024-13-01",
    "2024-00-10",
    "2024-01-00",
    "0000-01-01",
    "24-01-01",
  ])("is never one that does not exist: %s", (text) => {
    expect(parseCalendarDay(text)).toBeNull();
    expect(() => calendarDay(text)).toThrow(RangeError);
  });

  it.each(["", " 2024-01-01", "2024-01-01T00:00:00Z", "2024-1-1", "+02024-01-01", "03.03.2024"])(
    "is written in one form only: %j",
    (text) => {
      expect(parseCalendarDay(text)).toBeNull();
    },
  );

  it("is ordered as its text is", () => {
    const [first, second] = [calendarDay("2025-12-31"), calendarDay("2026-01-01")];
    expect([isBefore(first, second), isAfter(first, second), isBefore(first, first)]).toEqual([
      true,
      false,
      false,
    ]);
    expect([earlier(first, second), later(first, second)]).toEqual([first, second]);
    expect([second, first].toSorted(compareDays)).toEqual([first, second]);
  });
});

describe("adding months", () => {
  // Computed with an independent implementation of the Temporal proposal; the rule that the last day of the month
  // stands in is Regulation (EEC, Euratom) 1182/71, Article 3(2)(c) (article text from memory).
  it.each([
    ["2024-01-31", 1, "2024-02-29"],
    ["2025-01-31", 1, "2025-02-28"],
    ["2025-03-31", 1, "2025-04-30"],
    ["2025-08-31", 6, "2026-02-28"],
    ["2025-11-30", 3, "2026-02-28"],
    ["2024-02-29", 12, "2025-02-28"],
    ["2024-02-29", 48, "2028-02-29"],
    ["2026-01-15", 24, "2028-01-15"],
  ])("%s and %i months is %s", (from, months, to) => {
    expect(addMonths(calendarDay(from), months)).toBe(to);
  });

  it("differs when it is done twice, so a term is always added once from its first day", () => {
    const start = calendarDay("2025-01-31");
    expect(addMonths(addMonths(start, 1), 1)).toBe("2025-03-28");
    expect(addMonths(start, 2)).toBe("2025-03-31");
    expect(addDays(addMonths(calendarDay("2025-01-30"), 1), 1)).toBe("2025-03-01");
  });

  it("keeps the day number, or ends on the last day of the month", () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -600, max: 600 }), (day, months) => {
        const to = addMonths(day, months);
        expect(to.slice(8) === day.slice(8) || addDays(to, 1).endsWith("-01")).toBe(true);
      }),
    );
  });

  it("never moves back when the start or the months grow", () => {
    fc.assert(
      fc.property(anyDay, anyMonths, (day, months) => {
        expect(addMonths(day, months) < addMonths(day, months + 1)).toBe(true);
        expect(addMonths(day, months) <= addMonths(addDays(day, 1), months)).toBe(true);
      }),
    );
  });

  it("refuses to stop in silence at the last year it knows, and parts of a month", () => {
    expect(() => addMonths(calendarDay("9999-12-01"), 1)).toThrow(RangeError);
    expect(() => addMonths(calendarDay("0001-01-31"), -1)).toThrow(RangeError);
    expect(() => addDays(calendarDay("9999-12-31"), 1)).toThrow(RangeError);
    expect(() => addMonths(calendarDay("2025-01-01"), 1.5)).toThrow(RangeError);
    expect(() => addDays(calendarDay("2025-01-01"), 0.5)).toThrow(RangeError);
  });
});

describe("counting between days", () => {
  it("counts days as the civil calendar does", () => {
    expect(daysBetween(calendarDay("2025-01-31"), calendarDay("2025-02-28"))).toBe(28);
    expect(daysBetween(calendarDay("2024-02-28"), calendarDay("2024-03-01"))).toBe(2);
    expect(daysBetween(calendarDay("1900-01-01"), calendarDay("2000-01-01"))).toBe(36_524);
  });

  it("counts days so that adding them comes back", () => {
    fc.assert(
      fc.property(anyDay, anyDay, (from, to) => {
        expect(addDays(from, daysBetween(from, to))).toBe(to);
      }),
    );
  });

  // 11 and 12: computed with an independent implementation of the Temporal proposal. The third row departs from it on
  // purpose: 28 days there are no month, but the term of one month from 31 January is over on 28 February.
  it.each([
    ["2024-03-15", "2025-03-14", 11],
    ["2024-03-15", "2025-03-15", 12],
    ["2025-01-31", "2025-02-28", 1],
    ["2025-01-31", "2025-02-27", 0],
    ["2025-01-31", "2025-03-30", 1],
    ["2025-03-15", "2025-03-14", -1],
  ])("from %s to %s %i months are completed", (from, to, months) => {
    expect(completedMonths(calendarDay(from), calendarDay(to))).toBe(months);
  });

  it("has completed n months exactly from the day a term of n months is over", () => {
    fc.assert(
      fc.property(anyDay, anyMonths, (from, months) => {
        const end = addMonths(from, months);
        expect(completedMonths(from, end)).toBe(months);
        expect(completedMonths(from, addDays(end, -1))).toBe(months - 1);
      }),
    );
  });
});

describe("a day in a zone", () => {
  it("is the day on the wall there, whatever the zone of the machine", () => {
    const lateEvening = new Date("2026-03-28T23:30:00Z");
    expect(dayInZone(lateEvening, "Europe/London")).toBe("2026-03-28");
    expect(dayInZone(lateEvening, "Europe/Vienna")).toBe("2026-03-29");
    expect(dayInZone(lateEvening, "America/Los_Angeles")).toBe("2026-03-28");
  });

  it("needs a zone that exists", () => {
    expect(["Europe/Vienna", "UTC", "Europe/Larkmoor", ""].map(isTimeZone)).toEqual([
      true,
      true,
      false,
      false,
    ]);
  });

  it("is never taken from the zone of the machine: the kernel asks for no local zone", () => {
    const source = readFileSync(new URL("../../../lib/kernel/calendar-day.ts", import.meta.url), "utf8");
    expect(source).not.toMatch(/getLocalTimeZone|fromDateToLocal|\.getDate\(|new Date\(\)/);
  });
});

describe("an ISO week", () => {
  // Computed with an independent implementation of the Temporal proposal (ISO 8601 week dates).
  it.each([
    ["2026-01-01", { year: 2026, week: 1, weekday: 4 }],
    ["2027-01-01", { year: 2026, week: 53, weekday: 5 }],
    ["2024-12-30", { year: 2025, week: 1, weekday: 1 }],
    ["2021-01-03", { year: 2020, week: 53, weekday: 7 }],
  ])("of %s", (day, week) => {
    expect(isoWeek(calendarDay(day))).toEqual(week);
  });
});
