import { describe, expect, it } from "vitest";
import { rateScale } from "@/lib/reports/life-curves/rate-scale";

const rate = (value: number, upper: number | null = value * 1.5) => ({ value, lower: 0, upper });

describe("the scale of the dot plot", () => {
  it("goes by the batches with enough exposure: one failure among few young units flattens nobody", () => {
    const known = [
      { grade: "act", rate: rate(99.5, 128) },
      { grade: "quiet", rate: rate(2.3, 5.9) },
    ] as const;
    const tiny = { grade: "notYetKnown", rate: rate(60_875, null) } as const;
    expect(rateScale([...known, tiny])).toBe(rateScale(known));
    expect(rateScale(known)).toBe(128);
  });

  it("shows a wide interval as far as twice the highest rate", () =>
    expect(rateScale([{ grade: "quiet", rate: rate(10, 80) }])).toBe(20));

  it("goes by all of them where none is known yet, and has a length where nothing failed", () => {
    expect(rateScale([{ grade: "notYetKnown", rate: rate(40, 50) }])).toBe(50);
    expect(rateScale([{ grade: "notYetKnown", rate: null }])).toBe(1);
    expect(rateScale([])).toBe(1);
  });
});
