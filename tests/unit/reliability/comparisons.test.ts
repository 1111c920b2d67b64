import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { benjaminiHochberg } from "@/lib/reliability/false-discovery";
import { logRank } from "@/lib/reliability/log-rank";
import { clopperPearson, compareRates, garwood } from "@/lib/reliability/rates";
import { binomialTails } from "@/lib/reliability/special/incomplete-beta";
import { anyLives, livesFromStart, unitByUnit } from "./made-lives";
import { AML_MAINTAINED, AML_NOT_MAINTAINED, LARYNX, PLACEBO, REMISSIONS } from "./published-lives";

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe("log-rank against published results", () => {
  it("leukaemia (seen): chi-square 3.4, p 0.0653, expected 10.69 and 7.31", () => {
    const { chiSquare, p, groups, degreesOfFreedom } = logRank([AML_MAINTAINED, AML_NOT_MAINTAINED]);
    expect(degreesOfFreedom).toBe(1);
    expect(relative(chiSquare ?? 0, 3.3963886989776)).toBeLessThan(1e-11);
    expect(relative(p ?? 0, 0.0653393220405052)).toBeLessThan(1e-10);
    expect(groups.map(({ expected }) => expected.toFixed(2))).toEqual(["10.69", "7.31"]);
  });

  it("remissions with heavy ties (from memory): 16.79, expected 10.75 and 19.25", () => {
    const { chiSquare, p, groups } = logRank([PLACEBO, REMISSIONS]);
    expect(chiSquare).toBeCloseTo(16.79294099, 8);
    expect(relative(p ?? 0, 4.168809109e-5)).toBeLessThan(1e-8);
    expect(groups.map(({ expected }) => expected.toFixed(2))).toEqual(["10.75", "19.25"]);
  });

  it("larynx, four stages (from memory): 22.76 with 3 degrees of freedom", () => {
    const { chiSquare, degreesOfFreedom } = logRank(LARYNX);
    expect(chiSquare).toBeCloseTo(22.76275706, 8);
    expect(degreesOfFreedom).toBe(3);
  });
});

describe("log-rank, whatever the groups", () => {
  const three = fc.tuple(anyLives, anyLives, livesFromStart);

  it("gives each group the same figures in any order of groups, and the same chi-square", () =>
    fc.assert(
      fc.property(three, ([a, b, c]) => {
        const [one, other] = [logRank([a, b, c]), logRank([c, a, b])];
        expect(other.degreesOfFreedom).toBe(one.degreesOfFreedom);
        expect([other.groups[1], other.groups[2], other.groups[0]]).toEqual(one.groups);
        // Next to singular, one order may still find a figure where the other gives up; none is shown then.
        if (one.chiSquare !== null && other.chiSquare !== null)
          expect(Math.abs(one.chiSquare - other.chiSquare)).toBeLessThan(1e-6 * (1 + one.chiSquare));
      }),
    ));

  it("expects as many failures in all as there were", () =>
    fc.assert(
      fc.property(three, (groups) => {
        const found = logRank(groups).groups;
        const sumOf = (key: "observed" | "expected") => found.reduce((sum, group) => sum + group[key], 0);
        expect(sumOf("expected")).toBeCloseTo(sumOf("observed"), 9);
      }),
    ));

  it("does not change with the order of rows or with how counts are split", () =>
    fc.assert(
      fc.property(three, fc.nat(), (groups, seed) => {
        expect(logRank(groups.map((rows) => unitByUnit(rows, seed)))).toEqual(logRank(groups));
      }),
    ));

  it("leaves out a group that was never at risk at a failure", () => {
    const { chiSquare, degreesOfFreedom } = logRank([
      AML_MAINTAINED,
      AML_NOT_MAINTAINED,
      [{ ageDays: 1, failed: false, count: 9 }],
    ]);
    expect(degreesOfFreedom).toBe(1);
    expect(chiSquare).toBeCloseTo(3.3963886989776, 10);
  });

  it("finds no difference between equal groups, and none at all where there is nothing to compare", () => {
    expect(logRank([AML_MAINTAINED, AML_MAINTAINED])).toMatchObject({ chiSquare: 0, p: 1 });
    expect(logRank([AML_MAINTAINED])).toMatchObject({ degreesOfFreedom: 0, chiSquare: null, p: null });
    expect(logRank([])).toMatchObject({ groups: [], chiSquare: null, p: null });
    const apart = [[{ ageDays: 5, failed: true }], [{ ageDays: 9, entryDays: 6, failed: true }]];
    expect(logRank(apart)).toMatchObject({ degreesOfFreedom: 1, chiSquare: null, p: null });
  });
});

describe("exact limits", () => {
  // Garwood (1936): x = 0 and 10 seen, the others as in Ulm (1990), from memory; the digits beyond are R's.
  it.each([
    [0, 0, 3.68887945411394],
    [1, 0.0253178079842899, 5.5716433909389],
    [2, 0.242209278543965, 7.22468766772396],
    [3, 0.618672122895602, 8.76727306974232],
    [5, 1.62348639011842, 11.6683320793227],
    [10, 4.79538869613243, 18.3903560420178],
    [20, 12.2165195854039, 30.8883779026746],
  ])("of a rate with %i failures: %f to %f", (failures, lower, upper) => {
    const limits = garwood({ failures, exposure: 1 }, 0.95);
    expect(limits[0]).toBeCloseTo(lower, 11);
    expect(limits[1]).toBeCloseTo(upper, 11);
    expect(garwood({ failures, exposure: 400 }, 0.95)[1]).toBeCloseTo(upper / 400, 12);
  });

  // Clopper and Pearson (1934), usual tables, from memory; the digits beyond are R's.
  it.each([
    [0, 20, 0, 0.168433470983085],
    [1, 10, 0.00252857854446179, 0.445016117028195],
    [4, 20, 0.0573339970500328, 0.436614002996668],
    [20, 20, 1 - 0.168433470983085, 1],
    [0, 0, 0, 1],
  ])("of a share of %i in %i: %f to %f", (x, n, lower, upper) => {
    const limits = clopperPearson(x, n, 0.95);
    expect(limits[0]).toBeCloseTo(lower, 12);
    expect(limits[1]).toBeCloseTo(upper, 12);
  });

  it("of a share leave half the rest in each tail, for any count up to 30,000", () =>
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 30_000 }), fc.nat(), (n, at) => {
        const x = 1 + (at % (n - 1));
        const [lower, upper] = clopperPearson(x, n, 0.95);
        expect(relative(binomialTails(x, n, [lower, 1 - lower]).upper, 0.025)).toBeLessThan(1e-8);
        expect(relative(binomialTails(x, n, [upper, 1 - upper]).lower, 0.025)).toBeLessThan(1e-8);
      }),
    ));

  it("hold the true share in at least 95 of 100 samples, worked out exactly", () => {
    for (const share of [0.01, 0.1, 0.37]) {
      let held = 0;
      for (let x = 0; x <= 40; x += 1) {
        const [lower, upper] = clopperPearson(x, 40, 0.95);
        const above = x === 0 ? 0 : binomialTails(x - 1, 40, [share, 1 - share]).lower;
        if (lower <= share && share <= upper) held += binomialTails(x, 40, [share, 1 - share]).lower - above;
      }
      expect(held).toBeGreaterThanOrEqual(0.95);
    }
  });

  it("refuse what cannot be", () => {
    expect(() => clopperPearson(3, 2, 0.95)).toThrow(RangeError);
    expect(() => clopperPearson(0.5, 2, 0.95)).toThrow(RangeError);
    expect(() => garwood({ failures: -1, exposure: 1 }, 0.95)).toThrow(RangeError);
    expect(() => garwood({ failures: 1, exposure: 0 }, 0.95)).toThrow(RangeError);
    expect(() => garwood({ failures: 1, exposure: 1 }, 1)).toThrow(RangeError);
  });
});

describe("two Poisson rates", () => {
  it("60 in 51,477.5 against 30 in 54,308.7 (Gu et al. 2008, exact values seen)", () => {
    const found = compareRates(
      { failures: 60, exposure: 51_477.5 },
      { failures: 30, exposure: 54_308.7 },
      0.95,
    );
    const seen = [found.ratio ?? 0, found.pMinlike, ...found.limits];
    for (const [at, value] of [
      2.10999757175465, 0.000675182658686321, 1.33973572177265, 3.388365573616252,
    ].entries())
      expect(relative(seen[at] ?? 0, value)).toBeLessThan(1e-10);
    expect(relative(found.pGreater, 0.000428052694050125)).toBeLessThan(1e-10);
    expect(relative(found.pCentral, 0.000856105388100249)).toBeLessThan(1e-10);
  });

  // R's poisson.test; the second is the example of its help page, from memory.
  it.each([
    [41, 28_010, 15, 19_017, 0.0408520262865018, 1.00568406268926, 3.60930031107791],
    [11, 800, 21, 3011, 0.0796686330333295, 0.858426403391639, 4.27726594365407],
  ])("%i in %i against %i in %i", (x, exposure, y, other, minlike, lower, upper) => {
    const found = compareRates({ failures: x, exposure }, { failures: y, exposure: other }, 0.95);
    expect(relative(found.pMinlike, minlike)).toBeLessThan(1e-10);
    expect(relative(found.limits[0], lower)).toBeLessThan(1e-10);
    expect(relative(found.limits[1], upper)).toBeLessThan(1e-10);
  });

  const rate = fc.record({ failures: fc.nat(60), exposure: fc.double({ min: 0.1, max: 100, noNaN: true }) });

  it("exchanged give the mirrored tails and limits, and the same two-sided p", () =>
    fc.assert(
      fc.property(rate, rate, (one, other) => {
        const [there, back] = [compareRates(one, other, 0.95), compareRates(other, one, 0.95)];
        expect(relative(1 + there.pGreater, 1 + back.pLess)).toBeLessThan(1e-12);
        expect(relative(1 + there.pCentral, 1 + back.pCentral)).toBeLessThan(1e-12);
        expect(Math.abs(there.pMinlike - back.pMinlike)).toBeLessThan(1e-9);
        if (there.limits[0] > 0) expect(relative(1 / there.limits[0], back.limits[1])).toBeLessThan(1e-9);
      }),
    ));

  it("differ at 5 % by the central p exactly where the limits leave out 1", () =>
    fc.assert(
      fc.property(rate, rate, (one, other) => {
        const { pCentral, limits } = compareRates(one, other, 0.95);
        if (Math.abs(pCentral - 0.05) < 1e-9) return;
        expect(pCentral < 0.05).toBe(limits[0] > 1 || limits[1] < 1);
      }),
    ));

  it("of equal exposure have twice the tail as p of either kind: the mirrored outcome is as likely", () => {
    for (const [failures, others] of [
      [7, 3],
      [3, 7],
      [14, 9],
      [201, 160],
    ] as const) {
      const { pMinlike, pCentral } = compareRates(
        { failures, exposure: 3.3 },
        { failures: others, exposure: 3.3 },
        0.95,
      );
      expect(relative(pMinlike, pCentral)).toBeLessThan(1e-11);
    }
  });

  it("have a p of 1 by likelihood where the outcome is as likely as the likeliest, whatever the last digit says", () => {
    for (let x = 0; x <= 60; x += 1) {
      const found = compareRates({ failures: x, exposure: 1 }, { failures: 2 * x + 2, exposure: 2 }, 0.95);
      expect(found.pMinlike).toBe(1);
    }
  });

  it("say nothing where nothing failed", () =>
    expect(compareRates({ failures: 0, exposure: 3 }, { failures: 0, exposure: 5 }, 0.95)).toEqual({
      ratio: null,
      limits: [0, Number.POSITIVE_INFINITY],
      pGreater: 1,
      pLess: 1,
      pCentral: 1,
      pMinlike: 1,
    }));
});

describe("false discovery rate", () => {
  // Benjamini and Hochberg (1995), section 3.2 (seen); the adjusted values are R's.
  const P = [
    0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278, 0.0298, 0.0344, 0.0459, 0.324, 0.4262, 0.5719, 0.6528,
    0.759, 1,
  ];
  const ADJUSTED = [
    0.0015, 0.003, 0.0095, 0.035625, 0.0603, 0.0638571428571429, 0.0638571428571429, 0.0645, 0.0765, 0.486,
    0.581181818181818, 0.714875, 0.753230769230769, 0.813214285714286, 1,
  ];

  it("rejects four of the paper's fifteen at 0.05", () =>
    expect(benjaminiHochberg(P).filter((p) => p <= 0.05)).toHaveLength(4));

  it("adjusts them as R does, in whatever order they come", () =>
    fc.assert(
      fc.property(fc.shuffledSubarray([...P.keys()], { minLength: P.length }), (order) => {
        const adjusted = benjaminiHochberg(order.map((at) => P[at] ?? -1));
        for (const [place, at] of order.entries())
          expect(adjusted[place]).toBeCloseTo(ADJUSTED[at] ?? -1, 12);
      }),
    ));

  it("refuses what is no probability", () => {
    expect(() => benjaminiHochberg([0.1, 1.1])).toThrow(RangeError);
    expect(() => benjaminiHochberg([Number.NaN])).toThrow(RangeError);
    expect(benjaminiHochberg([])).toEqual([]);
  });
});
