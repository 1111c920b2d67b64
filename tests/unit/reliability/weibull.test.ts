import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Observation } from "@/lib/reliability/observation";
import { conditionalFailure, noFailureBound, weibullFit, weibullSurvival } from "@/lib/reliability/weibull";
import { livesFromStart, unitByUnit } from "./made-lives";
import { fitted, logLikelihood } from "./weibull-written-out";
import { BALL_BEARINGS, BEARING_CAGES, FANS, NIST_8413, SHOCK_ABSORBERS } from "./published-lives";

const CONFIDENCE = { confidence: 0.95 };
const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe("the Weibull fit as printed", () => {
  it("handbook 8.4.1.3 (seen): shape 1.7208, scale 606.528, log-likelihood -75.135", () => {
    const fit = fitted(NIST_8413);
    expect(fit.shape.toFixed(4)).toBe("1.7208");
    // The page's own maximum is off in its last digits: the slope is zero at 606.52756.
    expect(Math.abs(fit.scaleDays - 606.528)).toBeLessThan(6e-4);
    expect(fit.logLikelihood.toFixed(3)).toBe("-75.135");
  });

  it("fans, Nelson (1982), estimates as a reliability procedure's guide prints them (from memory)", () => {
    const { shape, scaleDays, shapeLimits, scaleLimits } = fitted(FANS);
    const printed = [shape, scaleDays, ...shapeLimits, ...scaleLimits].map((value) => value.toFixed(4));
    expect(printed).toEqual(["1.0584", "26.2968", "0.6441", "1.7394", "10.5521", "65.5344"]);
  });

  it("bearing cages (from memory): shape 2.035, scale 11792, B10 3903 with likelihood limits 2094 and 22144", () => {
    const fit = fitted(BEARING_CAGES);
    expect(fit.shape).toBeCloseTo(2.035, 3);
    const printed = [fit.scaleDays, fit.b10Days, ...(fit.profileB10Limits ?? [])].map(Math.round);
    expect(printed).toEqual([11_792, 3903, 2094, 22_144]);
  });

  it("bearing cages: 5.06 more failures in the next 300 hours (5.057 in the book from rounded estimates, from memory)", () => {
    const fit = fitted(BEARING_CAGES);
    const running = BEARING_CAGES.filter(({ failed }) => !failed);
    const expected = running.reduce(
      (sum, { ageDays, count = 1 }) => sum + count * conditionalFailure(fit, ageDays, 300),
      0,
    );
    expect(expected).toBeCloseTo(5.05820884570861, 8);
  });

  it("shock absorbers (from memory): shape 3.16, scale 27719; ball bearings: shape 2.10", () => {
    expect([fitted(SHOCK_ABSORBERS).shape.toFixed(2), Math.round(fitted(SHOCK_ABSORBERS).scaleDays)]).toEqual(
      ["3.16", 27_719],
    );
    expect(fitted(BALL_BEARINGS).shape.toFixed(2)).toBe("2.10");
  });
});

describe("the Weibull fit against R 4.2.2, survival 3.5-3", () => {
  it.each([
    [
      "handbook",
      NIST_8413,
      [1.72079726080136, 606.527558003572, -75.1346181644749, 0.291812763149642, 0.205943908987726],
      [164.022438660012, 83.8751295254903, 320.754919082434, 59.8545542494175, 271.949517557335],
    ],
    [
      "shock absorbers",
      SHOCK_ABSORBERS,
      [3.16047031453457, 27718.7181285151, -123.995361188833, 0.231237227964011, 0.109890477953458],
      [13600.0347150565, 10221.8418299879, 18094.6787601545, 9371.20239405868, 17291.2379356224],
    ],
    [
      "fans",
      FANS,
      [1.05844584994376, 26.2968451748205, -52.2596565955708, 0.253438535079932, 0.46588966104184],
      [3.13724077789284, 1.68620737203932, 5.83693314456946, 1.42024657676683, 5.66248431408345],
    ],
    [
      "bearing cages",
      BEARING_CAGES,
      [2.0353186101056, 11792.1781734443, -76.4368963559849, 0.327061769655709, 0.835140596803416],
      [3903.12666983329, 1488.54125204531, 10234.4478393402, 2094.28078318064, 22144.4267619602],
    ],
    [
      "ball bearings",
      BALL_BEARINGS,
      [2.10184686376488, 81.8745587241081, -113.69195908769, 0.156365971727747, 0.105050049892343],
      [28.0650889629313, 18.0564494823865, 43.6214893335246, 16.2849293398376, 40.7599756342054],
    ],
  ] as const)("%s", (_, rows, [shape, scale, likelihood, shapeError, scaleError], b10s) => {
    const fit = fitted(rows);
    expect(relative(fit.shape, shape)).toBeLessThan(1e-8);
    expect(relative(fit.scaleDays, scale)).toBeLessThan(1e-8);
    expect(relative(fit.logLikelihood, likelihood)).toBeLessThan(1e-10);
    expect(relative(Math.sqrt(fit.covariance.logShape), shapeError)).toBeLessThan(1e-7);
    expect(relative(Math.sqrt(fit.covariance.logScale), scaleError)).toBeLessThan(1e-7);
    const found = [fit.b10Days, ...fit.b10Limits, ...(fit.profileB10Limits ?? [])];
    for (const [at, value] of b10s.entries()) expect(relative(found[at] ?? 0, value)).toBeLessThan(1e-7);
  });
});

describe("no estimate exists", () => {
  it.each<[string, Observation[]]>([
    ["noFailures", [{ ageDays: 10, failed: false, count: 500 }]],
    ["noFailures", []],
    ["noFailures", [{ ageDays: 10, failed: true, count: 0 }]],
    [
      "failureAtAgeZero",
      [
        { ageDays: 0, failed: true },
        { ageDays: 10, failed: true },
      ],
    ],
    [
      "allFailuresAtGreatestAge",
      [
        { ageDays: 10, failed: true, count: 3 },
        { ageDays: 9, failed: false, count: 40 },
      ],
    ],
    [
      "allFailuresAtGreatestAge",
      [
        { ageDays: 10, failed: true },
        { ageDays: 10, failed: false, count: 40 },
      ],
    ],
    [
      "noMaximum",
      [
        { ageDays: 11, entryDays: 10, failed: true, count: 10 },
        { ageDays: 5000, entryDays: 10, failed: false, count: 5 },
      ],
    ],
  ])("and says so: %s", (reason, rows) =>
    expect(weibullFit(rows, CONFIDENCE)).toMatchObject({ kind: "none", reason }),
  );

  it("units that only just started are no failures at age 0", () => {
    const young: Observation = { ageDays: 0, failed: false, count: 7 };
    expect(fitted([...NIST_8413, young])).toEqual(fitted(NIST_8413));
  });

  it("profile limits are given from five failures up", () => {
    const failing = (count: number): Observation[] => [
      ...Array.from({ length: count }, (_, at): Observation => ({ ageDays: 100 * (at + 1), failed: true })),
      { ageDays: 900, failed: false, count: 20 },
    ];
    expect(fitted(failing(4))).toMatchObject({ profileShapeLimits: null, profileB10Limits: null });
    expect(fitted(failing(5)).profileShapeLimits).not.toBeNull();
  });
});

describe("the Weibull fit, whatever the rows", () => {
  const fits = livesFromStart.filter((rows) => weibullFit(rows, CONFIDENCE).kind === "fit");

  it("does not change with the order of rows or with how counts are split", () =>
    fc.assert(
      fc.property(fits, fc.nat(), (rows, seed) => {
        const [one, other] = [fitted(rows), fitted(unitByUnit(rows, seed))];
        for (const key of ["shape", "scaleDays", "b10Days", "logLikelihood"] as const)
          expect(Math.abs(one[key] - other[key])).toBeLessThan(1e-9 * (1 + Math.abs(one[key])));
      }),
    ));

  it("on another time scale has the same shape and a scale, B10 and limits in proportion", () =>
    fc.assert(
      fc.property(fits, fc.double({ min: 0.01, max: 1000, noNaN: true }), (rows, factor) => {
        const [one, other] = [
          fitted(rows),
          fitted(rows.map((row) => ({ ...row, ageDays: row.ageDays * factor }))),
        ];
        expect(relative(other.shape, one.shape)).toBeLessThan(1e-9);
        const pairs = [
          [other.scaleDays, one.scaleDays],
          [other.b10Days, one.b10Days],
          [other.b10Limits[0], one.b10Limits[0]],
          [other.profileB10Limits?.[1] ?? factor, one.profileB10Limits?.[1] ?? 1],
        ] as const;
        for (const [scaled, plain] of pairs) expect(relative(scaled, plain * factor)).toBeLessThan(1e-7);
      }),
    ));

  it("lies at the top of the likelihood written out row by row", () =>
    fc.assert(
      fc.property(fits, (rows) => {
        const { shape, scaleDays, logLikelihood: top } = fitted(rows);
        expect(Math.abs(top - logLikelihood(rows, shape, scaleDays))).toBeLessThan(
          1e-9 * (1 + Math.abs(top)),
        );
        for (const [up, along] of [
          [1.01, 1],
          [0.99, 1],
          [1, 1.01],
          [1, 0.99],
          [1.01, 1.01],
          [1.01, 0.99],
        ] as const)
          expect(logLikelihood(rows, shape * up, scaleDays * along)).toBeLessThan(
            top + 1e-12 * (1 + Math.abs(top)),
          );
      }),
    ));

  it("has limits within those of a greater confidence, and the estimate within its limits", () =>
    fc.assert(
      fc.property(fits, (rows) => {
        const [fit, wide] = [fitted(rows), weibullFit(rows, { confidence: 0.99 })];
        if (wide.kind === "none") throw new Error(wide.reason);
        const nested = [
          [wide.shapeLimits, fit.shapeLimits, fit.shape],
          [wide.scaleLimits, fit.scaleLimits, fit.scaleDays],
          [wide.b10Limits, fit.b10Limits, fit.b10Days],
          [wide.profileShapeLimits, fit.profileShapeLimits, fit.shape],
          [wide.profileB10Limits, fit.profileB10Limits, fit.b10Days],
        ] as const;
        for (const [outer, inner, value] of nested) {
          if (!outer || !inner) continue;
          const places = [outer[0], inner[0], value, inner[1], outer[1]];
          expect(places).toEqual(places.toSorted((a, b) => a - b));
        }
      }),
    ));
});

describe("what follows from a fit", () => {
  const curve = { shape: 2, scaleDays: 1000 };

  it("survival is 1 at the start and 1/e at the scale", () => {
    expect(weibullSurvival(curve, 0)).toBe(1);
    expect(weibullSurvival(curve, 1000)).toBeCloseTo(Math.exp(-1), 14);
  });

  it("the conditional failure is 1 - S(a + h)/S(a), and keeps its digits where it is tiny", () => {
    expect(conditionalFailure(curve, 400, 300)).toBeCloseTo(
      1 - weibullSurvival(curve, 700) / weibullSurvival(curve, 400),
      13,
    );
    expect(relative(conditionalFailure({ shape: 1, scaleDays: 1e12 }, 0, 1), 1e-12)).toBeLessThan(1e-11);
  });
});

describe("units without a failure", () => {
  it("with shape 1 give the chi-square bound: time / -log(0.05), factor 0.3338 (handbook 8.4.5.1)", () => {
    const bound = noFailureBound([{ ageDays: 100, failed: false, count: 10 }], {
      confidence: 0.95,
      shape: 1,
    });
    expect((bound?.scaleAtLeastDays ?? 0) / 1000).toBeCloseTo(0.333808200695334, 12);
    expect(bound?.b10AtLeastDays).toBeCloseTo(333.808200695334 * -Math.log(0.9), 9);
  });

  it("leave so many without failure at the bound with probability 0.05, for any shape", () => {
    const rows: Observation[] = [
      { ageDays: 300, failed: false, count: 4 },
      { ageDays: 500, entryDays: 100, failed: false },
    ];
    const bound = noFailureBound(rows, { confidence: 0.95, shape: 2.5 });
    const curve = { shape: 2.5, scaleDays: bound?.scaleAtLeastDays ?? 0 };
    const all =
      weibullSurvival(curve, 300) ** 4 * (weibullSurvival(curve, 500) / weibullSurvival(curve, 100));
    expect(all).toBeCloseTo(0.05, 12);
    expect(weibullSurvival(curve, bound?.b10AtLeastDays ?? 0)).toBeCloseTo(0.9, 12);
  });

  it("say nothing once one has failed, or before any time in service", () => {
    expect(noFailureBound(NIST_8413, { confidence: 0.95, shape: 2 })).toBeNull();
    expect(noFailureBound([{ ageDays: 0, failed: false }], { confidence: 0.95, shape: 2 })).toBeNull();
    expect(() => noFailureBound([], { confidence: 0.95, shape: 0 })).toThrow(RangeError);
  });
});
