import { describe, expect, it } from "vitest";
import { shareTicks } from "@/components/chart/life-curve-plot";

describe("the lines of a share axis", () => {
  it("are quarters where it begins at nought, as it always does until somebody asks for the upper part", () =>
    expect(shareTicks(0)).toEqual([1, 0.75, 0.5, 0.25, 0]));

  it("are round shares within the axis, six at most, wherever it begins", () => {
    for (const floor of [0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9]) {
      const ticks = shareTicks(floor);
      expect(ticks.length).toBeGreaterThanOrEqual(3);
      expect(ticks.length).toBeLessThanOrEqual(6);
      for (const tick of ticks) {
        expect(tick).toBeGreaterThanOrEqual(floor);
        expect(Number.isInteger(Math.round(tick * 1e9) / 1e7)).toBe(true);
      }
    }
  });
});
