import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { QUESTION_DAY, questionDay, versionOn, type RuleDays } from "@/lib/rule-book/versions";

const version = (validFrom: string, name = validFrom) => ({ validFrom: calendarDay(validFrom), name });

describe("the version in force", () => {
  const versions = [version("2026-07-01"), version("2024-01-01"), version("2025-01-01")];

  it.each([
    ["2023-12-31", null],
    ["2024-01-01", "2024-01-01"],
    ["2024-12-31", "2024-01-01"],
    ["2025-01-01", "2025-01-01"],
    ["2030-01-01", "2026-07-01"],
  ])("on %s is that of %s: its first day counts, order of listing does not", (day, name) => {
    expect(versionOn(versions, calendarDay(day))?.name ?? null).toBe(name);
  });

  it("is the last listed of two that start on one day", () => {
    expect(
      versionOn([version("2025-01-01", "first"), version("2025-01-01", "second")], calendarDay("2025-06-01"))
        ?.name,
    ).toBe("second");
    expect(versionOn([], calendarDay("2025-06-01"))).toBeNull();
  });

  it("never lies ahead, and no other in force is younger", () => {
    const anyDay = fc.integer({ min: 0, max: 400 }).map((days) => addDays(calendarDay("2025-01-01"), days));
    fc.assert(
      fc.property(fc.array(anyDay.map((validFrom) => ({ validFrom }))), anyDay, (list, day) => {
        const found = versionOn(list, day);
        const inForce = list.map(({ validFrom }) => validFrom).filter((validFrom) => validFrom <= day);
        expect(found?.validFrom ?? null).toBe(inForce.toSorted().at(-1) ?? null);
      }),
    );
  });
});

describe("the day that answers a question", () => {
  const days: RuleDays = {
    shippedOn: calendarDay("2025-01-10"),
    fittedOn: calendarDay("2025-02-10"),
    repairedOn: calendarDay("2026-03-10"),
    filedOn: calendarDay("2026-03-15"),
    invoicedOn: calendarDay("2025-01-09"),
    decidedOn: calendarDay("2026-03-20"),
  };

  it.each([
    ["cover", "2025-01-10"],
    ["coverRate", "2025-01-10"],
    ["labourRate", "2026-03-10"],
    ["diagnosis", "2026-03-10"],
    ["evidenceList", "2026-03-15"],
    ["readingLimits", "2025-02-10"],
    ["price", "2025-01-09"],
    ["tax", "2025-01-09"],
    ["letter", "2026-03-20"],
  ] as const)("for %s is %s", (question, day) => {
    expect(questionDay(question, days)).toBe(day);
  });

  it("is missing where the claim does not know it, and is settled for every question", () => {
    expect(questionDay("readingLimits", { ...days, fittedOn: null })).toBeNull();
    expect(Object.keys(QUESTION_DAY)).toHaveLength(9);
  });
});
