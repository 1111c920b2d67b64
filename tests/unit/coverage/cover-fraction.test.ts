import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { coverFractionAt } from "@/lib/coverage/cover-fraction";
import { compareFractions, fraction, ONE, ZERO } from "@/lib/kernel/fraction";
import type { CoverFractionSchedule } from "@/lib/rule-book/terms-shape";

const steps: CoverFractionSchedule = {
  kind: "step",
  steps: [
    { fromMonth: 0, fraction: "1/1" },
    { fromMonth: 6, fraction: "2/3" },
    { fromMonth: 18, fraction: "1/3" },
  ],
};

describe("the covered share of the price", () => {
  // Months left over months covered, completed months only: trade practice, from memory, no source.
  it.each([
    [0, fraction(1)],
    [7, fraction(17, 24)],
    [8, fraction(16, 24)],
    [23, fraction(1, 24)],
    [24, ZERO],
    [30, ZERO],
  ])("on a straight line over 24 months with %i used", (used, share) => {
    expect(coverFractionAt({ kind: "straightLine" }, 24, used)).toEqual(share);
  });

  it("is that of the step reached, or all of it", () => {
    expect([0, 5, 6, 17, 18, 23].map((used) => coverFractionAt(steps, 24, used))).toEqual([
      ONE,
      ONE,
      fraction(2, 3),
      fraction(2, 3),
      fraction(1, 3),
      fraction(1, 3),
    ]);
    expect(coverFractionAt({ kind: "full" }, 24, 23)).toEqual(ONE);
  });

  it("never rises on a straight line and stays from 0 to 1", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 240 }), fc.integer({ min: 0, max: 300 }), (cover, used) => {
        const share = coverFractionAt({ kind: "straightLine" }, cover, used);
        expect(compareFractions(share, ZERO) >= 0 && compareFractions(share, ONE) <= 0).toBe(true);
        expect(compareFractions(coverFractionAt({ kind: "straightLine" }, cover, used + 1), share) <= 0).toBe(
          true,
        );
      }),
    );
  });
});
