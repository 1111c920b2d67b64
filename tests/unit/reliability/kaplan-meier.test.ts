import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { kaplanMeier } from "@/lib/reliability/kaplan-meier";
import type { Observation } from "@/lib/reliability/observation";
import { anyLives, livesFromStart, unitByUnit } from "./made-lives";
import {
  AML_MAINTAINED,
  AML_NOT_MAINTAINED,
  CHANNING_MEN,
  HEAT_EXCHANGERS,
  NIST_8215,
  REMISSIONS,
  SHOCK_ABSORBERS,
} from "./published-lives";

const CONFIDENCE = { confidence: 0.95 };
const curve = (rows: readonly Observation[]) => kaplanMeier(rows, CONFIDENCE);

function pointAt(rows: readonly Observation[], age: number) {
  const point = curve(rows).points.find(({ ageDays }) => ageDays === age);
  if (!point) throw new Error(`No event at ${age}`);
  return point;
}

/** Survival just after an age. */
const survivalAfter = (points: readonly { ageDays: number; survival: number }[], age: number): number =>
  points.findLast(({ ageDays }) => ageDays <= age)?.survival ?? 1;

describe("Kaplan-Meier against published tables", () => {
  it.each([
    [9, "0.9091", "0.0867"],
    [13, "0.8182", "0.1163"],
    [18, "0.7159", "0.1397"],
    [23, "0.6136", "0.1526"],
    [31, "0.4909", "0.1642"],
    [34, "0.3682", "0.1627"],
    [48, "0.1841", "0.1535"],
  ])("maintained arm at %i: survival %s, error %s as printed", (age, survival, error) => {
    const point = pointAt(AML_MAINTAINED, age);
    expect(point.survival.toFixed(4)).toBe(survival);
    expect(point.standardError?.toFixed(4)).toBe(error);
  });

  it.each([
    [5, "0.8333", "0.1076"],
    [12, "0.5833", "0.1423"],
    [27, "0.3889", "0.1470"],
    [43, "0.0972", "0.0919"],
  ])("the other arm at %i: survival %s, error %s as printed", (age, survival, error) => {
    const point = pointAt(AML_NOT_MAINTAINED, age);
    expect(point.survival.toFixed(4)).toBe(survival);
    expect(point.standardError?.toFixed(4)).toBe(error);
  });

  it.each([
    [6, "0.857", "0.0764"],
    [10, "0.753", "0.0963"],
    [16, "0.627", "0.1141"],
    [23, "0.448", "0.1346"],
  ])("remissions at %i: survival %s, error %s as printed", (age, survival, error) => {
    const point = pointAt(REMISSIONS, age);
    expect(point.survival.toFixed(3)).toBe(survival);
    expect(point.standardError?.toFixed(4)).toBe(error);
  });

  it.each([
    [32, 0.9],
    [56, (0.9 * 16) / 17],
    [98, (0.9 * 16 * 15) / 17 / 16],
    [181, (0.9 * 15 * 13 * 10) / 17 / 14 / 11],
  ])("the handbook's twenty units at %i: its fractions", (age, survival) =>
    expect(pointAt(NIST_8215, age).survival).toBeCloseTo(survival, 12),
  );

  // Failed shares as in the book's chapter 3, from memory.
  it.each([
    [1, 300, 0.0133, 0.00662],
    [2, 197, 0.0384, 0.0128],
    [3, 97, 0.0582, 0.0187],
  ])("heat exchangers in year %i: %i at risk, failed share %f, error %f", (year, atRisk, failed, error) => {
    const point = pointAt(HEAT_EXCHANGERS, year);
    expect(point.atRisk).toBe(atRisk);
    expect(1 - point.survival).toBeCloseTo(failed, 4);
    expect(point.standardError).toBeCloseTo(error, 4);
  });
});

describe("Kaplan-Meier against R 4.2.2, survival 3.5-3", () => {
  it.each([
    [
      "leukaemia",
      AML_MAINTAINED,
      9,
      0.0866784172041448,
      [0.739204333133848, 1],
      [0.50808020576993, 0.986673822667823],
    ],
    [
      "leukaemia",
      AML_MAINTAINED,
      31,
      0.164193267221136,
      [0.169096200651704, 0.812721981166478],
      [0.167330909776851, 0.753399790370811],
    ],
    [
      "leukaemia",
      AML_MAINTAINED,
      48,
      0.153492745786294,
      [0, 0.484931162720207],
      [0.0117384801231896, 0.525014842726641],
    ],
    [
      "leukaemia, the other arm",
      AML_NOT_MAINTAINED,
      23,
      0.148130062553483,
      [0.195781523478619, 0.776440698743603],
      [0.191876619618728, 0.729671569779485],
    ],
    [
      "leukaemia, the other arm",
      AML_NOT_MAINTAINED,
      43,
      0.0918663649675205,
      [0, 0.277276988949175],
      [0.00574630569586383, 0.34890386111075],
    ],
    [
      "shock absorbers",
      SHOCK_ABSORBERS,
      20_100,
      0.0966131108741492,
      [0.529081533532359, 0.907797969027774],
      [0.480094892596573, 0.861553893327093],
    ],
    [
      "shock absorbers",
      SHOCK_ABSORBERS,
      27_490,
      0.151089011936381,
      [0, 0.583504922367076],
      [0.0578827485259448, 0.579428506622388],
    ],
  ] as const)("%s: error and both kinds of limits", (_, rows, age, error, plain, logLog) => {
    const point = pointAt(rows, age);
    const found = [point.standardError, ...(point.plain ?? []), ...(point.logLog ?? [])];
    for (const [at, value] of [error, ...plain, ...logLog].entries())
      expect(found[at]).toBeCloseTo(value, 10);
  });

  it("a unit censored at the distance of a failure is still at risk there", () => {
    expect(pointAt(SHOCK_ABSORBERS, 20_100)).toMatchObject({ atRisk: 12 });
    expect(pointAt(SHOCK_ABSORBERS, 20_100).survival).toBeCloseTo(0.718439751280067, 12);
  });

  it("at a survival of 0 there is no error and no limit", () =>
    expect(pointAt(AML_NOT_MAINTAINED, 45)).toMatchObject({
      survival: 0,
      standardError: null,
      plain: null,
      logLog: null,
    }));

  it("medians are 31 and 23 (from memory)", () => {
    expect(curve(AML_MAINTAINED).medianDays).toBe(31);
    expect(curve(AML_NOT_MAINTAINED).medianDays).toBe(23);
  });
});

describe("late entry", () => {
  const channing = curve(CHANNING_MEN);

  it("an early risk set of one empties at 781 months, and survival stays at 0 (from memory)", () => {
    expect(channing.points.find(({ survival }) => survival === 0)?.ageDays).toBe(781);
    expect(survivalAfter(channing.points, 1000)).toBe(0);
  });

  it("then the curve of those alive later is given, which agrees with R conditional on 816 months", () => {
    expect(channing.conditional?.afterDays).toBe(781);
    const points = channing.conditional?.points ?? [];
    const to816 = survivalAfter(points, 816);
    expect(survivalAfter(points, 960) / to816).toBeCloseTo(0.637761403332263, 12);
    expect(survivalAfter(points, 1080) / to816).toBeCloseTo(0.222707313489307, 12);
  });

  it("goes by the last risk set that emptied, so that it does not stand at 0 too", () => {
    const rows: Observation[] = [
      { ageDays: 3, failed: true },
      { ageDays: 9, entryDays: 5, failed: true, count: 2 },
      { ageDays: 20, entryDays: 10, failed: true },
      { ageDays: 30, entryDays: 10, failed: false, count: 3 },
    ];
    const { afterDays, points } = curve(rows).conditional ?? {};
    expect(afterDays).toBe(9);
    expect(points?.map(({ ageDays, survival }) => [ageDays, survival])).toEqual([[20, 0.75]]);
  });

  it("without late entry there is no second curve, also where the last unit failed", () =>
    fc.assert(fc.property(livesFromStart, (rows) => void expect(curve(rows).conditional).toBeNull())));
});

describe("the median", () => {
  const halved = (last: boolean): Observation[] => [
    { ageDays: 10, failed: true },
    { ageDays: 20, failed: true },
    { ageDays: 40, failed: last },
    { ageDays: 50, failed: false },
  ];

  it("where survival is one half over a stretch: its first age, the middle of the stretch beside", () =>
    expect(curve(halved(true))).toMatchObject({ medianDays: 20, medianMiddleDays: 30 }));

  it("has no middle where the stretch does not end", () =>
    expect(curve(halved(false))).toMatchObject({ medianDays: 20, medianMiddleDays: null }));

  it("is found within rounding: twelve of twenty-four, whose product ends just above one half", () => {
    const rows = Array.from({ length: 24 }, (_, at): Observation => ({ ageDays: at + 1, failed: true }));
    expect(curve(rows).points[11]?.survival).toBeGreaterThan(0.5);
    expect(curve(rows).medianDays).toBe(12);
  });

  it("is not reached above one half, nor without units", () => {
    expect(curve(NIST_8215).medianDays).toBeNull();
    expect(curve([])).toMatchObject({ points: [], medianDays: null, total: 0, greatestAgeDays: 0 });
  });
});

describe("Kaplan-Meier, whatever the rows", () => {
  it("equals the product over event ages, worked out unit by unit", () =>
    fc.assert(
      fc.property(anyLives, (rows) => {
        const units = unitByUnit(rows, 1);
        const ages = [...new Set(units.flatMap(({ ageDays, failed }) => (failed ? [ageDays] : [])))].toSorted(
          (a, b) => a - b,
        );
        let survival = 1;
        const product = ages.map((age) => {
          const atRisk = units.filter((unit) => (unit.entryDays ?? -1) < age && age <= unit.ageDays).length;
          const failed = units.filter((unit) => unit.failed && unit.ageDays === age).length;
          survival *= 1 - failed / atRisk;
          return { ageDays: age, atRisk, failed, survival };
        });
        const { points } = curve(rows);
        expect(points.map(({ ageDays, atRisk, failed }) => ({ ageDays, atRisk, failed }))).toEqual(
          product.map(({ ageDays, atRisk, failed }) => ({ ageDays, atRisk, failed })),
        );
        for (const [at, point] of points.entries())
          expect(point.survival).toBeCloseTo(product[at]?.survival ?? -1, 10);
      }),
    ));

  it("without censoring is the share of units that live longer", () =>
    fc.assert(
      fc.property(livesFromStart, (rows) => {
        const units = unitByUnit(
          rows.map((row) => ({ ...row, failed: true })),
          2,
        );
        for (const { ageDays, survival } of curve(units).points)
          expect(survival).toBeCloseTo(
            units.filter((unit) => unit.ageDays > ageDays).length / units.length,
            10,
          );
      }),
    ));

  it("does not change with the order of rows or with how counts are split", () =>
    fc.assert(
      fc.property(
        anyLives,
        fc.nat(),
        (rows, seed) => void expect(curve(unitByUnit(rows, seed))).toEqual(curve(rows)),
      ),
    ));

  it("has limits around it that lie within those of a greater confidence", () =>
    fc.assert(
      fc.property(livesFromStart, (rows) => {
        const wide = kaplanMeier(rows, { confidence: 0.99 }).points;
        for (const [at, { plain, logLog, survival }] of curve(rows).points.entries())
          for (const [inner, outer] of [
            [plain, wide[at]?.plain],
            [logLog, wide[at]?.logLog],
          ] as const) {
            if (!inner || !outer) continue;
            const places = [0, outer[0], inner[0], survival, inner[1], outer[1], 1];
            expect(places).toEqual(places.toSorted((a, b) => a - b));
          }
      }),
    ));
});
