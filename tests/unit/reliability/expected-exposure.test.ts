import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { expectedExposure, type GroupedObservation } from "@/lib/reliability/expected-exposure";
import { logRank } from "@/lib/reliability/log-rank";
import { anyLives, unitByUnit } from "./made-lives";

describe("expected exposure", () => {
  const threeGroups = fc
    .tuple(anyLives, anyLives, anyLives)
    .map((groups) =>
      groups.flatMap((rows, at) =>
        rows.map((row): GroupedObservation => ({ ...row, group: "abc"[at] ?? "" })),
      ),
    );

  it("sums, over the ages at which others are at risk, units at risk times the pooled hazard", () =>
    fc.assert(
      fc.property(threeGroups, (rows) => {
        const units = rows.flatMap((row) =>
          unitByUnit([row], 1).map((unit) => ({ ...unit, group: row.group })),
        );
        const ages = [...new Set(units.flatMap(({ ageDays, failed }) => (failed ? [ageDays] : [])))];
        for (const { id, failures, exposure } of expectedExposure(rows)) {
          let [seen, sum] = [0, 0];
          for (const age of ages) {
            const atRisk = units.filter((unit) => (unit.entryDays ?? -1) < age && age <= unit.ageDays);
            const own = atRisk.filter(({ group }) => group === id);
            if (own.length === atRisk.length) continue;
            const failing = (of: typeof units) =>
              of.filter(({ failed, ageDays }) => failed && ageDays === age).length;
            seen += failing(own);
            sum += (own.length * failing(atRisk)) / atRisk.length;
          }
          expect(failures).toBe(seen);
          expect(exposure).toBeCloseTo(sum, 9);
        }
      }),
    ));

  it("agrees with the log-rank expectation where everybody is at risk at every failure", () => {
    const rows = [
      { group: "a", ageDays: 10, failed: true, count: 2 },
      { group: "a", ageDays: 90, failed: false, count: 8 },
      { group: "b", ageDays: 20, failed: true, count: 1 },
      { group: "b", ageDays: 90, failed: false, count: 29 },
    ];
    const expected = logRank(["a", "b"].map((id) => rows.filter(({ group }) => group === id))).groups;
    for (const [at, { exposure, failures }] of expectedExposure(rows).entries()) {
      expect(exposure).toBeCloseTo(expected[at]?.expected ?? -1, 12);
      expect(failures).toBe(expected[at]?.observed);
    }
  });

  it("measures a batch left out by the hazard of the others, and lends them nothing of its own", () => {
    const rows = [
      { group: "bad", ageDays: 10, failed: true, count: 250 },
      { group: "bad", ageDays: 90, failed: false, count: 250 },
      { group: "a", ageDays: 10, failed: true, count: 2 },
      { group: "a", ageDays: 90, failed: false, count: 98 },
      { group: "b", ageDays: 90, failed: false, count: 100 },
    ];
    expect(expectedExposure(rows, { leftOut: ["bad"] })).toEqual([
      { id: "bad", failures: 250, exposure: 5 },
      { id: "a", failures: 2, exposure: 1 },
      { id: "b", failures: 0, exposure: 1 },
    ]);
  });
});
