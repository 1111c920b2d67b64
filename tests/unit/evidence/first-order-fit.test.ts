import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fitFirstOrder, studentT95 } from "@/lib/evidence/first-order-fit";
import { celsiusAfter, secondsToReach, shareReached, threePointCurve } from "@/lib/evidence/thermal-curve";
import { given } from "./outcome-value";
import { normalFrom } from "./seeded-noise";

const points = (x: readonly number[], y: readonly number[]) =>
  x.map((timeS, index) => ({ timeS, celsius: y[index] ?? Number.NaN }));

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe("the first-order course (computed)", () => {
  it.each([
    [1, 0.6321],
    [2, 0.8647],
    [3, 0.9502],
    [5, 0.9933],
  ])("after %i time constants %f of the rise is reached", (taus, share) => {
    expect(shareReached(taus * 1200, 1200)).toBeCloseTo(share, 4);
  });

  const curve = { startCelsius: 25, finalCelsius: 120, tauS: 1200 };

  it.each([
    [10, 62.3796],
    [20, 85.0515],
    [30, 98.8026],
  ])("from 25 towards 120 °C with 20 min: after %i min %f °C", (minutes, celsius) => {
    expect(celsiusAfter(curve, minutes * 60)).toBeCloseTo(celsius, 4);
  });

  it.each([
    [60, 9.191],
    [90, 23.054],
    [100, 31.163],
    [110, 45.026],
  ])("reaches %i °C after %f min", (celsius, minutes) => {
    expect((secondsToReach(curve, celsius) ?? Number.NaN) / 60).toBeCloseTo(minutes, 3);
  });

  it("never reaches what lies beyond its end or before its start", () => {
    expect([120, 121, 24].map((celsius) => secondsToReach(curve, celsius))).toEqual([null, null, null]);
  });
});

describe("the three-point formula (computed)", () => {
  it.each([
    [[60, 80, 90], 100, 14.427],
    [[40, 64, 78.4], 100, 19.576],
    [[62.3796, 85.0515, 98.8026], 120, 20],
  ] as const)("%j at 10 min steps end at %f °C with %f min", (celsius, finalCelsius, minutes) => {
    const curve = given(threePointCurve(celsius, 600));
    expect(curve.finalCelsius).toBeCloseTo(finalCelsius, 2);
    expect(curve.tauS / 60).toBeCloseTo(minutes, 3);
  });

  it("is sensitive to noise: the same points rounded to 0.1 °C give 119.65 and 19.80", () => {
    const curve = given(threePointCurve([62.4, 85.1, 98.8], 600));
    expect(curve.finalCelsius).toBeCloseTo(119.65, 1);
    expect(curve.tauS / 60).toBeCloseTo(19.8, 1);
  });

  it.each([[[60, 70, 80]], [[60, 70, 85]], [[60, 70, 69]], [[60, 60, 60]]] as const)(
    "refuses %j",
    (celsius) => {
      expect(threePointCurve(celsius, 600)).toMatchObject({ code: "threePointsNotSettling" });
    },
  );
});

// Certified values of NIST's Statistical Reference Datasets, nonlinear regression, Misra1a and BoxBOD, for the model
// y = b1 (1 - exp(-b2 x)): our course with the start given as 0 at 0, b1 the final value and b2 = 1/tau. Data and
// values from memory; that they agree with each other to nine digits is itself the proof that they were remembered right.
describe("against certified nonlinear regressions", () => {
  it.each([
    {
      name: "Misra1a",
      x: [77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0],
      y: [10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47, 81.78],
      b1: [2.3894212918e2, 2.7070075241],
      b2: [5.5015643181e-4, 7.2668688436e-6],
      residual: 1.018787633e-1,
    },
    {
      name: "BoxBOD",
      x: [1, 2, 3, 5, 7, 10],
      y: [109, 149, 149, 191, 213, 224],
      b1: [2.1380940889e2, 1.2354515176e1],
      b2: [5.4723748542e-1, 1.0455993237e-1],
      residual: 1.7088072423e1,
    },
  ])("$name", ({ x, y, b1, b2, residual }) => {
    const fit = given(fitFirstOrder(points(x, y), { celsius: 0, atS: 0 }));
    const [b1Value = 0, b1Error = 0] = b1;
    const [b2Value = 0, b2Error = 0] = b2;
    expect(relative(fit.curve.finalCelsius, b1Value)).toBeLessThan(1e-7);
    expect(relative(1 / fit.curve.tauS, b2Value)).toBeLessThan(1e-7);
    expect(relative(fit.standardErrors.finalCelsius, b1Error)).toBeLessThan(1e-6);
    // An error of tau is that of b2 carried over: tau² times it.
    expect(relative(fit.standardErrors.tauS, b2Error / b2Value ** 2)).toBeLessThan(1e-6);
    expect(relative(fit.residualKelvin, residual)).toBeLessThan(1e-8);
  });
});

describe("a fit", () => {
  const run = (
    curve: { startCelsius: number; finalCelsius: number; tauS: number },
    spanS: number,
    count: number,
  ) =>
    Array.from({ length: count }, (_, index) => {
      const timeS = (spanS * index) / (count - 1);
      return { timeS, celsius: celsiusAfter(curve, timeS) };
    });

  it("recovers a noiseless course to one part in a million, from a third of a time constant to eight", () => {
    const truth = fc.record({
      startCelsius: fc.double({ min: 5, max: 40, noNaN: true }),
      rise: fc.double({ min: 5, max: 150, noNaN: true }),
      tauS: fc.double({ min: 60, max: 5000, noNaN: true }),
      taus: fc.double({ min: 0.33, max: 8, noNaN: true }),
      count: fc.integer({ min: 20, max: 200 }),
      startKnown: fc.boolean(),
    });
    fc.assert(
      fc.property(truth, ({ startCelsius, rise, tauS, taus, count, startKnown }) => {
        const curve = { startCelsius, finalCelsius: startCelsius + rise, tauS };
        const start = startKnown ? { celsius: startCelsius, atS: 0 } : null;
        const fit = given(fitFirstOrder(run(curve, taus * tauS, count), start));
        expect(relative(fit.curve.finalCelsius, curve.finalCelsius)).toBeLessThan(1e-6);
        expect(relative(fit.curve.startCelsius, startCelsius)).toBeLessThan(1e-6);
        expect(relative(fit.curve.tauS, tauS)).toBeLessThan(1e-6);
        if (Math.abs(taus - 1) > 1e-6) expect(fit.longEnough).toBe(taus > 1);
      }),
    );
  });

  it("says why a run is too short to read an end from it", () => {
    const short = given(fitFirstOrder(run({ startCelsius: 22, finalCelsius: 120, tauS: 1800 }, 900, 91)));
    expect(short.longEnough).toBe(false);
    expect(short.why).toEqual({
      rule: "fitTooShort",
      result: "no",
      input: { ranMinutes: 15, tauMinutes: 30 },
    });
    expect(
      given(fitFirstOrder(run({ startCelsius: 22, finalCelsius: 120, tauS: 1800 }, 2700, 271))).longEnough,
    ).toBe(true);
  });

  it("has limits that hold the truth about 95 times in 100 (2000 simulated runs, noise of 0.5 K)", () => {
    const curve = { startCelsius: 22, finalCelsius: 95, tauS: 900 };
    const clean = run(curve, 2700, 91);
    const noise = normalFrom(20_270_503);
    const hits = { finalCelsius: 0, tauS: 0 };
    for (let trial = 0; trial < 2000; trial += 1) {
      const fit = given(
        fitFirstOrder(clean.map(({ timeS, celsius }) => ({ timeS, celsius: celsius + 0.5 * noise() }))),
      );
      const { finalCelsius, tauS } = fit.interval95;
      if (finalCelsius.from <= curve.finalCelsius && curve.finalCelsius <= finalCelsius.to)
        hits.finalCelsius += 1;
      if (tauS.from <= curve.tauS && curve.tauS <= tauS.to) hits.tauS += 1;
    }
    for (const share of [hits.finalCelsius / 2000, hits.tauS / 2000]) {
      expect(share).toBeGreaterThan(0.935);
      expect(share).toBeLessThan(0.965);
    }
  });

  it("shows when neighbouring errors are alike, as with two bodies that warm at different speeds", () => {
    const two = run({ startCelsius: 0, finalCelsius: 40, tauS: 200 }, 3600, 181).map(
      ({ timeS, celsius }) => ({
        timeS,
        celsius: celsius + celsiusAfter({ startCelsius: 22, finalCelsius: 70, tauS: 2000 }, timeS),
      }),
    );
    expect(given(fitFirstOrder(two)).neighbourLikeness).toBeGreaterThan(0.8);
  });

  it("gives a reason instead of a number where there is none", () => {
    const straight = Array.from({ length: 50 }, (_, index) => ({
      timeS: index * 10,
      celsius: 20 + index * 0.1,
    }));
    const flat = straight.map(({ timeS }) => ({ timeS, celsius: 22 }));
    const jump = straight.map(({ timeS }, index) => ({ timeS, celsius: index === 0 ? 20 : 60 }));
    const noise = normalFrom(7);
    const noisy = straight.map(({ timeS }) => ({ timeS, celsius: 22 + noise() }));
    expect(fitFirstOrder(straight.slice(0, 5))).toMatchObject({ code: "fitTooFewSamples" });
    expect(fitFirstOrder(flat)).toMatchObject({ code: "fitFlat" });
    expect(fitFirstOrder(straight)).toMatchObject({ code: "fitStraightLine" });
    expect(fitFirstOrder(jump)).toMatchObject({ code: "fitStep" });
    expect(fitFirstOrder(noisy)).toMatchObject({ code: "fitFlat" });
    expect(fitFirstOrder(straight.map(({ celsius }) => ({ timeS: 5, celsius })))).toMatchObject({
      ok: false,
    });
    expect(fitFirstOrder([...straight, { timeS: 600, celsius: Number.NaN }])).toMatchObject({
      code: "fitNotFinite",
    });
  });

  it("never answers with a figure that is not finite", () => {
    const sample = fc.record({
      timeS: fc.double({ min: 0, max: 1e5, noNaN: true }),
      celsius: fc.double({ min: -50, max: 500, noNaN: true }),
    });
    fc.assert(
      fc.property(fc.array(sample, { maxLength: 30 }), (samples) => {
        const outcome = fitFirstOrder(samples.toSorted((first, second) => first.timeS - second.timeS));
        if (!outcome.ok) return;
        const { curve, standardErrors, interval95, residualKelvin } = outcome.value;
        const figures = [
          ...Object.values(curve),
          residualKelvin,
          standardErrors.finalCelsius,
          standardErrors.tauS,
        ];
        const limits = [interval95.finalCelsius, interval95.tauS].flatMap((interval) => [
          interval.from,
          interval.to,
        ]);
        expect([...figures, ...limits].filter((figure) => !Number.isFinite(figure))).toEqual([]);
      }),
    );
  });
});

// Two-sided 5 % points of Student's t, as any table prints them.
it.each([
  [3, 3.182],
  [5, 2.571],
  [10, 2.228],
  [30, 2.042],
  [120, 1.98],
])("Student's t for %i degrees of freedom is %f", (freedom, value) => {
  expect(studentT95(freedom)).toBeCloseTo(value, freedom < 5 ? 1 : freedom < 10 ? 2 : 3);
});
