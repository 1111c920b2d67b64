import { describe, expect, it } from "vitest";
import { groupedByMonth, MONTH_DAYS } from "@/lib/reliability/months";
import type { Observation } from "@/lib/reliability/observation";
import { weibullFit, type WeibullEstimate } from "@/lib/reliability/weibull";
import { uniformFrom, weibullLife } from "./made-lives";
import { fitted, logLikelihood } from "./weibull-written-out";

const CONFIDENCE = { confidence: 0.95 };
const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

/** Units of a made fleet: lives from a seed, watched until an end that differs from unit to unit, some entered late. */
function fleet(
  seed: number,
  { units, shape, late }: { units: number; shape: number; late: boolean },
): Observation[] {
  const uniform = uniformFrom(seed);
  return Array.from(
    { length: units },
    () => [weibullLife(uniform, shape, 1000), 300 + 900 * uniform(), 250 * uniform()] as const,
  )
    .filter(([life, , entry]) => !late || life > entry)
    .map(([life, end, entry]): Observation => ({
      ageDays: Math.min(life, end),
      failed: life <= end,
      ...(late ? { entryDays: entry } : {}),
    }));
}

describe("simulated fleets, from seeds", () => {
  const runs = (late: boolean): WeibullEstimate[] =>
    Array.from({ length: 400 }, (_, seed) => fitted(fleet(seed + 1, { units: 60, shape: 1.8, late })));
  const holding = (within: readonly (readonly [number, number] | null)[], truth: number): number =>
    within.filter((limits) => limits !== null && limits[0] <= truth && truth <= limits[1]).length /
    within.length;

  // 400 runs tell a share to about ±2.2 %: nominal 95 %, promised 93 to 97 %.
  it.each([false, true])(
    "limits of 95 per cent hold the truth in 92 to 98 of 100 (late entries: %s)",
    (late) => {
      const fits = runs(late);
      const b10 = 1000 * (-Math.log(0.9)) ** (1 / 1.8);
      const shares = [
        holding(
          fits.map(({ shapeLimits }) => shapeLimits),
          1.8,
        ),
        holding(
          fits.map(({ scaleLimits }) => scaleLimits),
          1000,
        ),
        holding(
          fits.map(({ b10Limits }) => b10Limits),
          b10,
        ),
        holding(
          fits.map(({ profileShapeLimits }) => profileShapeLimits),
          1.8,
        ),
        holding(
          fits.map(({ profileB10Limits }) => profileB10Limits),
          b10,
        ),
      ];
      for (const share of shares) {
        expect(share).toBeGreaterThanOrEqual(0.92);
        expect(share).toBeLessThanOrEqual(0.98);
      }
    },
  );

  it("with late entries the fit lies at the top of the likelihood written out row by row", () => {
    const rows = fleet(7, { units: 80, shape: 0.9, late: true });
    const { shape, scaleDays, logLikelihood: top } = fitted(rows);
    expect(relative(top, logLikelihood(rows, shape, scaleDays))).toBeLessThan(1e-11);
    for (const [up, along] of [
      [1.001, 1],
      [0.999, 1],
      [1, 1.001],
      [1, 0.999],
    ] as const)
      expect(logLikelihood(rows, shape * up, scaleDays * along)).toBeLessThan(top);
  });

  it("grouped by months, shape and B10 stay within 1 % and scale within 0.5 % of the fit in days (2,000 units)", () => {
    for (const seed of [1, 2, 3]) {
      const rows = fleet(seed, { units: 2000, shape: 1.8, late: false });
      const [days, months] = [fitted(rows), fitted(groupedByMonth(rows))];
      expect(relative(months.shape, days.shape)).toBeLessThan(0.01);
      expect(relative(months.b10Days, days.b10Days)).toBeLessThan(0.01);
      expect(relative(months.scaleDays, days.scaleDays)).toBeLessThan(0.005);
    }
  });
});

describe("grouping by months", () => {
  it("places ages in [k, k + 1) months at k + 0.5 and keeps the number of units", () =>
    expect(
      groupedByMonth([
        { ageDays: 1, failed: true },
        { ageDays: 30, failed: true, count: 2 },
        { ageDays: 31, failed: true },
        { ageDays: 31, failed: false },
        { ageDays: 365.25, entryDays: 40, failed: false },
      ]),
    ).toEqual([
      { ageDays: 0.5 * MONTH_DAYS, failed: true, count: 3 },
      { ageDays: 1.5 * MONTH_DAYS, failed: true, count: 1 },
      { ageDays: 1.5 * MONTH_DAYS, failed: false, count: 1 },
      { ageDays: 12.5 * MONTH_DAYS, entryDays: MONTH_DAYS, failed: false, count: 1 },
    ]));

  it("hides no failure at age 0 from the fit", () =>
    expect(
      weibullFit(
        groupedByMonth([
          { ageDays: 0, failed: true },
          { ageDays: 70, failed: true },
        ]),
        CONFIDENCE,
      ),
    ).toMatchObject({
      reason: "failureAtAgeZero",
    }));
});
