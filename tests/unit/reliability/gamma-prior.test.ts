import { describe, expect, it } from "vitest";
import { batchScreen } from "@/lib/reliability/batch-screen";
import { gammaPrior, shrunkenRatio } from "@/lib/reliability/gamma-prior";
import { among } from "./batch-rows";

const OPTIONS = { confidence: 0.95 };

describe("the shrunken ratio", () => {
  const failures = [4, 0, 7, 2, 15, 3, 1, 0, 6, 22];
  const expected = [5.2, 1.1, 3.9, 4, 6.5, 3.3, 2.8, 0.7, 8.8, 9.1];
  const made = failures.map((one, at) => ({ failures: one, expected: expected[at] ?? 0 }));

  it("has the prior that a general maximiser finds for the negative binomial likelihood (SciPy 1.17.1)", () => {
    const prior = gammaPrior(made);
    expect(prior?.shape).toBeCloseTo(3.35154246, 4);
    expect(prior?.mean).toBeCloseTo(1.16758703, 6);
  });

  it("lies between a batch's own ratio and the mean, nearer to its own the more is expected", () => {
    const prior = { mean: 2, shape: 3 };
    const ratios = [1, 10, 100].map((size) => shrunkenRatio(prior, { failures: 4 * size, expected: size }));
    expect(ratios).toEqual([7 / 2.5, 43 / 11.5, 403 / 101.5]);
  });

  it("is the mean where batches differ no more than chance has them, and absent without a failure", () => {
    expect(gammaPrior(Array.from({ length: 9 }, () => ({ failures: 4, expected: 4 })))).toEqual({
      mean: 1,
      shape: null,
    });
    expect(gammaPrior([{ failures: 0, expected: 3 }])).toBeNull();
    const { prior, batches } = batchScreen(among({}), OPTIONS);
    expect(prior).toEqual({ mean: 1, shape: null });
    expect(batches.map(({ shrunken }) => shrunken)).toEqual(Array.from({ length: 10 }, () => 1));
  });

  it("ranks a large bad batch above a tiny one with a worse ratio", () => {
    const rows = [...among({ failures: 30, exposure: 8 }), { id: "tiny", failures: 1, exposure: 0.05 }];
    const of = (id: string) => batchScreen(rows, OPTIONS).batches.find((batch) => batch.id === id);
    expect(of("tiny")?.ratio).toBeGreaterThan(of("B")?.ratio ?? Infinity);
    expect(of("B")?.shrunken).toBeGreaterThan(of("tiny")?.shrunken ?? Infinity);
  });
});
