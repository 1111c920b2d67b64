import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { kaplanMeier } from "@/lib/reliability/kaplan-meier";
import { nelsonAalen } from "@/lib/reliability/nelson-aalen";
import { livesFromStart, unitByUnit } from "./made-lives";
import { REMISSIONS } from "./published-lives";

describe("Nelson-Aalen", () => {
  // Klein and Moeschberger (2003), table 4.2, from memory; the digits beyond are R's.
  it.each([
    [6, 0.142857142857143, 0.0824786098842323],
    [7, 0.201680672268908, 0.101306113837676],
    [10, 0.268347338935574, 0.121273959056908],
    [13, 0.351680672268908, 0.147145565987498],
    [16, 0.442589763177998, 0.172963234242709],
    [22, 0.585446906035141, 0.224331102758856],
    [23, 0.752113572701808, 0.279467746695003],
  ])("remissions at %i: hazard %f, error %f", (age, hazard, error) => {
    const point = nelsonAalen(REMISSIONS).find(({ ageDays }) => ageDays === age);
    expect(point?.hazard).toBeCloseTo(hazard, 11);
    expect(point?.standardError).toBeCloseTo(error, 11);
  });

  it("lies at or below minus the logarithm of Kaplan-Meier, and rises", () =>
    fc.assert(
      fc.property(livesFromStart, (rows) => {
        const { points } = kaplanMeier(rows, { confidence: 0.95 });
        let before = 0;
        for (const [at, { hazard }] of nelsonAalen(rows).entries()) {
          expect(hazard).toBeLessThanOrEqual(-Math.log(points[at]?.survival ?? 1) + 1e-12);
          expect(hazard).toBeGreaterThan(before);
          before = hazard;
        }
      }),
    ));

  it("does not change with the order of rows or with how counts are split", () =>
    fc.assert(
      fc.property(
        livesFromStart,
        fc.nat(),
        (rows, seed) => void expect(nelsonAalen(unitByUnit(rows, seed))).toEqual(nelsonAalen(rows)),
      ),
    ));
});
