import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { GRADE_LIMITS } from "@/lib/reliability/batch-grade";
import { batchScreen, type BatchRow, type ScreenedBatch } from "@/lib/reliability/batch-screen";
import { expectedExposure, type GroupedObservation } from "@/lib/reliability/expected-exposure";
import { compareRates } from "@/lib/reliability/rates";
import { among } from "./batch-rows";
import { uniformFrom, weibullLife } from "./made-lives";

const OPTIONS = { confidence: 0.95 };

const screened = (batch: Partial<BatchRow>, options: object = {}): ScreenedBatch => {
  const found = batchScreen(among(batch), { ...OPTIONS, ...options }).batches[0];
  if (!found) throw new Error("No batch");
  return found;
};

describe("a batch against the others pooled", () => {
  const row = fc.record({ failures: fc.nat(30), exposure: fc.double({ min: 0.5, max: 40, noNaN: true }) });
  const anyRows = fc
    .array(row, { minLength: 2, maxLength: 12 })
    .map((rows) => rows.map((one, at): BatchRow => ({ ...one, id: `${at}` })));

  it("has the exact one-sided p, ratio and limits of two rates, the expected number being that of the others' rate", () =>
    fc.assert(
      fc.property(anyRows, (rows) => {
        for (const [at, found] of batchScreen(rows, OPTIONS).batches.entries()) {
          const [own, others] = [rows.slice(at, at + 1), rows.filter((_, place) => place !== at)];
          const sum = (of: BatchRow[], key: "failures" | "exposure") =>
            of.reduce((total, one) => total + one[key], 0);
          const rest = { failures: sum(others, "failures"), exposure: sum(others, "exposure") };
          const pair = compareRates(
            { failures: sum(own, "failures"), exposure: sum(own, "exposure") },
            rest,
            0.95,
          );
          expect(found.p).toBeCloseTo(pair.pGreater, 10);
          expect(found.limits?.[0]).toBeCloseTo(pair.limits[0], 8);
          expect(found.adjustedP ?? -1).toBeGreaterThanOrEqual((found.p ?? 2) - 1e-15);
          if (found.ratio !== null)
            expect(found.ratio * (found.expected ?? 0)).toBeCloseTo(found.failures, 9);
        }
      }),
    ));

  it("comes out the same in any order of batches", () =>
    fc.assert(
      fc.property(anyRows, (rows) => {
        const there = batchScreen(rows, OPTIONS).batches;
        const back = batchScreen(rows.toReversed(), OPTIONS).batches.toReversed();
        expect(back.map(({ grade, reason }) => [grade, reason])).toEqual(
          there.map(({ grade, reason }) => [grade, reason]),
        );
        for (const [at, { adjustedP }] of back.entries())
          expect(adjustedP).toBeCloseTo(there[at]?.adjustedP ?? -1, 9);
      }),
    ));

  it("is not compared with batches already acted on", () => {
    const rows: BatchRow[] = [
      { id: "a", failures: 5, exposure: 5 },
      { id: "b", failures: 5, exposure: 5 },
      { id: "c", failures: 90, exposure: 5 },
    ];
    const expected = (onAct: string[]) =>
      batchScreen(rows, { ...OPTIONS, onAct }).batches.map((batch) => batch.expected);
    expect(expected([])).toEqual([47.5, 47.5, 5]);
    expect(expected(["c"])).toEqual([5, 5, 5]);
  });

  it("refuses an id given twice, and counts or exposures that cannot be", () => {
    const wrong: BatchRow[] = [
      { id: "other 1", failures: 1, exposure: 1 },
      { id: "x", failures: 0.5, exposure: 1 },
      { id: "x", failures: -1, exposure: 1 },
      { id: "x", failures: 1, exposure: -1 },
      { id: "x", failures: 1, exposure: Number.NaN },
    ];
    for (const one of wrong) expect(() => batchScreen([...among({}), one], OPTIONS)).toThrow(RangeError);
  });
});

describe("grades", () => {
  it("a batch like the others is quiet", () =>
    expect(screened({})).toMatchObject({ grade: "quiet", reason: "within" }));

  it("a strong batch is looked into on the first look and acted on the second", () => {
    expect(screened({ failures: 16 })).toMatchObject({
      grade: "lookInto",
      reason: "firstLook",
      isStrong: true,
    });
    expect(screened({ failures: 16, strongBefore: true })).toMatchObject({ grade: "act", reason: "strong" });
  });

  it("a look before does not act for a batch that is not strong now", () =>
    expect(screened({ failures: 9, strongBefore: true }).grade).not.toBe("act"));

  it("up to an adjusted p of 0.10 a batch is looked into", () => {
    const limits = { ...GRADE_LIMITS, lookP: screened({ failures: 10 }).adjustedP ?? 0 };
    expect(screened({ failures: 10 }, { limits })).toMatchObject({ grade: "lookInto", reason: "raised" });
    expect(screened({ failures: 10 }, { limits: { ...limits, lookP: limits.lookP * 0.999 } }).grade).toBe(
      "quiet",
    );
  });

  it("two failures are not acted on, however unlikely", () => {
    const rows: BatchRow[] = [
      { id: "B", failures: 2, exposure: 1, strongBefore: true },
      { id: "rest", failures: 10, exposure: 900 },
    ];
    const limits = { ...GRADE_LIMITS, leastExpected: 0 };
    expect(batchScreen(rows, { ...OPTIONS, limits }).batches[0]).toMatchObject({
      grade: "lookInto",
      reason: "fewFailures",
    });
  });

  it("a lower limit of the ratio of 1.5 or less is not acted on, however small the p", () => {
    const rows: BatchRow[] = [
      { id: "B", failures: 1300, exposure: 1000, strongBefore: true },
      { id: "rest", failures: 10_000, exposure: 10_000 },
    ];
    expect(batchScreen(rows, OPTIONS).batches[0]).toMatchObject({
      grade: "lookInto",
      reason: "raised",
      isStrong: false,
    });
  });

  it("with less than one failure expected a batch is not yet known", () =>
    expect(screened({ failures: 0, exposure: 0.9 })).toMatchObject({
      grade: "notYetKnown",
      reason: "expectedLow",
    }));

  it("with an oldest unit younger than the usual first failure a batch is not yet known", () => {
    expect(screened({ oldestDays: 89 }, { usualFirstFailureDays: 90 })).toMatchObject({
      grade: "notYetKnown",
      reason: "tooYoung",
    });
    expect(screened({ oldestDays: 90 }, { usualFirstFailureDays: 90 }).grade).toBe("quiet");
  });

  it("a strong batch is known, however young it is and however little was expected", () => {
    const rows: BatchRow[] = [
      { id: "B", failures: 4, exposure: 0.02, oldestDays: 3 },
      { id: "rest", failures: 20, exposure: 20 },
    ];
    const graded = (strongBefore: boolean) =>
      batchScreen(
        rows.map((row) => ({ ...row, strongBefore })),
        { ...OPTIONS, usualFirstFailureDays: 90 },
      ).batches[0];
    expect(graded(false)).toMatchObject({ grade: "lookInto", reason: "firstLook" });
    expect(graded(true)).toMatchObject({ grade: "act", reason: "strong" });
  });

  it("a batch that alone has failures is not hidden by the others having none", () => {
    const rows: BatchRow[] = [
      { id: "B", failures: 12, exposure: 3, strongBefore: true },
      { id: "rest", failures: 0, exposure: 9 },
    ];
    expect(batchScreen(rows, OPTIONS).batches[0]).toMatchObject({ grade: "act", expected: 0, ratio: null });
  });

  it("a batch without others, or never at risk where others failed, is not yet known", () => {
    expect(batchScreen([{ id: "B", failures: 9, exposure: 2 }], OPTIONS).batches[0]).toMatchObject({
      reason: "alone",
      p: null,
      limits: null,
    });
    expect(screened({ failures: 0, exposure: 0 })).toMatchObject({
      grade: "notYetKnown",
      reason: "expectedLow",
      p: null,
    });
    expect(batchScreen([], OPTIONS)).toEqual({ batches: [], prior: null });
  });
});

describe("simulated screens, from seeds", () => {
  /** Batches of one part that wears out; the first are far older than the last. */
  function parts(seed: number, badFrom = Number.POSITIVE_INFINITY): GroupedObservation[] {
    const uniform = uniformFrom(seed);
    return Array.from({ length: 10 * 150 }, (_, unit) => {
      const batch = Math.floor(unit / 150);
      const life = weibullLife(uniform, 2.5, batch >= badFrom ? 900 : 2000);
      const end = 1200 - 80 * batch;
      return { group: `${batch}`, ageDays: Math.min(life, end), failed: life <= end };
    });
  }
  const gradesOf = (rows: readonly GroupedObservation[]) =>
    batchScreen(expectedExposure(rows), OPTIONS).batches;

  it("old batches of a part that wears out raise a false alarm in at most 10 of 100 screens", () => {
    const alarms = Array.from({ length: 200 }, (_, seed) =>
      gradesOf(parts(seed + 1)).some(({ adjustedP }) => (adjustedP ?? 1) <= 0.1),
    );
    expect(alarms.filter(Boolean).length / alarms.length).toBeLessThanOrEqual(0.1);
  });

  it("a bad young batch is found although old ones have more failures", () => {
    const found = gradesOf(parts(5, 9));
    expect(found[9]).toMatchObject({ isStrong: true, grade: "lookInto" });
    expect(found.slice(0, 9).filter(({ isStrong }) => isStrong)).toEqual([]);
  });
});
