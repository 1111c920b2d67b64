import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { formatDay } from "@/lib/kernel/format";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { anyDay } from "./arbitraries";

const today = calendarDay("2026-12-01");

describe("a typed day", () => {
  it.each([
    ["3 mar 24", "2024-03-03"],
    ["03.03.2024", "2024-03-03"],
    ["3/3/2024", "2024-03-03"],
    ["2024-03-03", "2024-03-03"],
    ["2024/3/3", "2024-03-03"],
    ["3.3.24", "2024-03-03"],
    ["3. März 2024", "2024-03-03"],
    ["3. Maerz 2024", "2024-03-03"],
    ["3 Mrz. 24", "2024-03-03"],
    ["3rd March 2024", "2024-03-03"],
    ["March 3, 2024", "2024-03-03"],
    ["3mar24", "2024-03-03"],
    [" 12  sept  2025 ", "2025-09-12"],
    ["5 May 2025", "2025-05-05"],
    ["5. Mai 2025", "2025-05-05"],
    ["1. Dez. 2025", "2025-12-01"],
    ["1. Jänner 2025", "2025-01-01"],
    ["7 Okt 25", "2025-10-07"],
    ["today", "2026-12-01"],
    ["Gestern", "2026-11-30"],
    ["heute", "2026-12-01"],
    ["yesterday", "2026-11-30"],
  ])("%j is read as %s in both languages", (text, day) => {
    expect(readTypedDay(text, "en", today)).toBe(day);
    expect(readTypedDay(text, "de", today)).toBe(day);
  });

  it.each([
    "",
    "31.02.2024",
    "3 ma 24",
    "3 xyz 24",
    "12/25/2024",
    "3.3.024",
    "tomorrow",
    "3 mar",
    "0/1/2024",
    "x".repeat(1000),
  ])("%j is no day, and nothing is guessed", (text) => {
    expect(readTypedDay(text, "en", today)).toBeNull();
  });

  it("reads two digits of a year as the latest year not after next year", () => {
    expect(readTypedDay("1.1.27", "de", today)).toBe("2027-01-01");
    expect(readTypedDay("1.1.28", "de", today)).toBe("1928-01-01");
    expect(readTypedDay("1.1.99", "de", today)).toBe("1999-01-01");
    expect(readTypedDay("1.1.00", "de", today)).toBe("2000-01-01");
  });

  it("reads back every day the product prints, in each language", () => {
    fc.assert(
      fc.property(anyDay, fc.constantFrom("en", "de", "long"), (day, locale) => {
        expect(readTypedDay(formatDay(day, locale), locale, today)).toBe(day);
        expect(readTypedDay(day, locale, today)).toBe(day);
      }),
    );
  });

  it("takes any text without a fault", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (text) => {
        expect(() => readTypedDay(text, "en", today)).not.toThrow();
      }),
    );
  });
});
