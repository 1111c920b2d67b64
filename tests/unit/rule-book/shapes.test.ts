import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { addWorkingDays } from "@/lib/kernel/working-time";
import { evidenceRowsFor } from "@/lib/rule-book/evidence-list-shape";
import { RULE_SHAPES, ruleBody, type RuleBody, type RuleKind } from "@/lib/rule-book/shapes";
import { bodies } from "./bodies";

const kinds: readonly RuleKind[] = ["terms", "evidenceList", "limits", "serviceLevels", "credit"];
/** The messages of the first body that does not fit, or none. */
const faults = (kind: RuleKind, body: unknown) =>
  RULE_SHAPES[kind].safeParse(body).error?.issues.map((issue) => issue.message) ?? [];
const terms = (change: Partial<RuleBody<"terms">>) => faults("terms", { ...bodies.terms, ...change });

describe("the body of every kind of rule", () => {
  it("is tested here for all kinds there are", () => {
    expect(kinds).toEqual(Object.keys(RULE_SHAPES));
  });

  it.each(kinds)("%s is kept as it was read, through JSON and back", (kind) => {
    expect(ruleBody(kind, JSON.parse(JSON.stringify(bodies[kind])))).toEqual(bodies[kind]);
  });

  it.each(kinds)("%s takes no field it does not know, and misses none", (kind) => {
    expect(faults(kind, { ...bodies[kind], colour: "red" })).toHaveLength(1);
    for (const name of Object.keys(bodies[kind])) {
      const rest = Object.fromEntries(Object.entries(bodies[kind]).filter(([other]) => other !== name));
      expect(faults(kind, rest), name).not.toEqual([]);
    }
    expect(() => ruleBody(kind, {})).toThrow();
  });
});

describe("terms", () => {
  it.each(["1/2", "17/24", "1/1", "0", "1"])("take the exact share %s", (fraction) => {
    expect(terms({ lateFiling: { policy: "reduce", fraction } })).toEqual([]);
  });

  it.each(["0.5", "50 %", "3/2", "1/0", "-1/2", "", "2"])("refuse %j as a share", (fraction) => {
    expect(terms({ lateFiling: { policy: "reduce", fraction } })).toContain("shareNeeded");
  });

  it("have steps that begin at month 0, rise, and lie within the term", () => {
    const steps = (...months: number[]) =>
      terms({
        coverFraction: { kind: "step", steps: months.map((fromMonth) => ({ fromMonth, fraction: "1/2" })) },
      });
    expect(steps(0, 6, 12)).toEqual([]);
    expect(steps(6, 12)).toEqual(["stepsOutOfOrder"]);
    expect(steps(0, 12, 12)).toEqual(["stepsOutOfOrder"]);
    expect(steps(0, 24)).toEqual(["stepsBeyondTerm"]);
    expect(steps()).not.toEqual([]);
  });

  it("keep the least cover of a replacement below a full term", () => {
    expect(terms({ coverMonths: 1, coverFraction: { kind: "full" }, replacementMinimumDays: 28 })).toEqual(
      [],
    );
    expect(terms({ coverMonths: 1, coverFraction: { kind: "full" }, replacementMinimumDays: 29 })).toEqual([
      "minimumBeyondTerm",
    ]);
  });

  it("are in a currency, and in whole numbers", () => {
    expect(faults("terms", { ...bodies.terms, currency: "XXX" })).toEqual(["currencyUnknown"]);
    expect(terms({ coverMonths: 0 })).not.toEqual([]);
    expect(terms({ filingLimitDays: 30.5 })).not.toEqual([]);
  });
});

describe("an evidence list", () => {
  it("gives a symptom its own rows, any other the family's", () => {
    expect(evidenceRowsFor(bodies.evidenceList, "gripsHot").map(({ id }) => id)).toEqual([
      "runLog",
      "coilCold",
    ]);
    expect(evidenceRowsFor(bodies.evidenceList, "noise").map(({ id }) => id)).toEqual(["label"]);
  });

  it("names a reading kind exactly where it wants a reading, and no row twice", () => {
    const [row] = bodies.evidenceList.rows;
    const listOf = (...rows: unknown[]) => faults("evidenceList", { rows, bySymptom: [] });
    expect(listOf({ ...row, accepts: "reading" })).toEqual(["readingKindNeeded"]);
    expect(listOf({ ...row, readingKind: "coilOhm" })).toEqual(["readingKindNeeded"]);
    expect(listOf(row, row)).toEqual(["rowTwice"]);
  });
});

describe("limits", () => {
  it("are not crossed, cite their source, and hold a kind once", () => {
    const [limit] = bodies.limits.readings;
    const withLimits = (...readings: unknown[]) => faults("limits", { ...bodies.limits, readings });
    expect(withLimits({ ...limit, low: 15, high: 9 })).toEqual(["limitsCrossed"]);
    expect(withLimits({ ...limit, low: null, high: 9 })).toEqual([]);
    expect(withLimits({ ...limit, source: " " })).toEqual(["missing"]);
    expect(withLimits(limit, limit)).toEqual(["readingKindTwice"]);
  });
});

describe("service levels", () => {
  it("hold the calendar that working time is counted by", () => {
    const { calendar } = ruleBody("serviceLevels", bodies.serviceLevels);
    expect(addWorkingDays(calendar, calendarDay("2026-12-04"), 5)).toBe("2026-12-14");
  });

  const withMonday = (...monday: { opens: string; closes: string }[]) => {
    const { calendar } = bodies.serviceLevels;
    const body = { ...bodies.serviceLevels, calendar: { ...calendar, hours: { ...calendar.hours, monday } } };
    return faults("serviceLevels", body);
  };

  it("have hours in order that do not overlap, to midnight at the latest", () => {
    expect(withMonday({ opens: "08:00", closes: "12:00" }, { opens: "12:30", closes: "24:00" })).toEqual([]);
    expect(withMonday({ opens: "08:00", closes: "12:00" }, { opens: "11:00", closes: "17:00" })).toEqual([
      "hoursOutOfOrder",
    ]);
    expect(withMonday({ opens: "17:00", closes: "08:00" })).toEqual(["hoursOutOfOrder"]);
    expect(withMonday({ opens: "8:00", closes: "17:00" })).toContain("timeNeeded");
    expect(withMonday({ opens: "24:00", closes: "24:00" })).toContain("timeNeeded");
  });

  it("have a zone and holidays that exist, and some working time", () => {
    const { calendar } = bodies.serviceLevels;
    const withCalendar = (change: object) =>
      faults("serviceLevels", { ...bodies.serviceLevels, calendar: { ...calendar, ...change } });
    expect(withCalendar({ timeZone: "Europe/Larkmoor" })).toEqual(["timeZoneUnknown"]);
    expect(withCalendar({ holidays: ["2026-02-30"] })).toEqual(["dayNeeded"]);
    const hours = Object.fromEntries(Object.keys(calendar.hours).map((weekday) => [weekday, []]));
    expect(withCalendar({ hours })).toEqual(["hoursMissing"]);
  });
});
