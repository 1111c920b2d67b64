import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { atRiskAt, kaplanMeier } from "@/lib/reliability/kaplan-meier";
import type { Observation } from "@/lib/reliability/observation";
import { anyLives, unitByUnit } from "./made-lives";
import { HEAT_EXCHANGERS } from "./published-lives";

describe("the table under a curve", () => {
  it("accounts for each unit at each age", () =>
    fc.assert(
      fc.property(anyLives, fc.array(fc.integer({ min: 0, max: 70 })), (rows, ages) => {
        const units = unitByUnit(rows, 3);
        const table = atRiskAt(rows, ages);
        expect(table.map(({ ageDays }) => ageDays)).toEqual(ages);
        for (const { ageDays, atRisk, failed, censored } of table) {
          const notEntered = units.filter(
            (unit) => unit.entryDays !== undefined && unit.entryDays >= ageDays,
          ).length;
          expect(atRisk + failed + censored + notEntered).toBe(units.length);
          expect(failed).toBe(units.filter((unit) => unit.failed && unit.ageDays < ageDays).length);
        }
      }),
    ));

  it("shows the heat exchangers at the start of each year", () =>
    expect(atRiskAt(HEAT_EXCHANGERS, [0, 1, 2, 3, 4])).toEqual([
      { ageDays: 0, atRisk: 300, failed: 0, censored: 0 },
      { ageDays: 1, atRisk: 300, failed: 0, censored: 0 },
      { ageDays: 2, atRisk: 197, failed: 4, censored: 99 },
      { ageDays: 3, atRisk: 97, failed: 9, censored: 194 },
      { ageDays: 4, atRisk: 0, failed: 11, censored: 289 },
    ]));
});

describe("rows no unit can have", () => {
  it.each<[string, Observation]>([
    ["a negative age", { ageDays: -1, failed: false }],
    ["no number", { ageDays: Number.NaN, failed: false }],
    ["an endless age", { ageDays: Number.POSITIVE_INFINITY, failed: false }],
    ["an entry at the end", { ageDays: 5, entryDays: 5, failed: false }],
    ["an entry after the end", { ageDays: 5, entryDays: 6, failed: false }],
    ["a negative entry", { ageDays: 5, entryDays: -1, failed: false }],
    ["half a unit", { ageDays: 5, failed: false, count: 0.5 }],
    ["less than no unit", { ageDays: 5, failed: false, count: -1 }],
    ["a count that is no number", { ageDays: 5, failed: false, count: Number.NaN }],
  ])("are refused: %s", (_, row) =>
    expect(() => kaplanMeier([row], { confidence: 0.95 })).toThrow(RangeError),
  );

  it.each([0, 1, -0.5, 95, Number.NaN])("as is a confidence of %f", (confidence) =>
    expect(() => kaplanMeier([], { confidence })).toThrow(RangeError),
  );
});
