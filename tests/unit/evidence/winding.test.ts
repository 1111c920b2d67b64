import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  coefficientAt20,
  CONDUCTOR_K,
  resistanceAt,
  resistanceAt20,
  riseOverAmbient,
  windingTemperature,
  withinTolerance,
} from "@/lib/evidence/winding";
import { resistanceAtSwitchOff } from "@/lib/evidence/switch-off";
import { valueOf } from "./outcome-value";

// Formula: IEC 60034-1 resistance method, from memory; the figures below are computed, so they hold the arithmetic.
describe("winding temperature by the resistance method (computed)", () => {
  it("finds 99.64 °C and a rise of 74.64 K for copper, 57.6 ohm at 22 °C and 75.0 ohm hot", () => {
    const celsius = valueOf(windingTemperature({ coldOhm: 57.6, coldCelsius: 22, hotOhm: 75 }));
    expect(celsius).toBeCloseTo(99.64, 2);
    expect(riseOverAmbient(celsius, 25).value).toBeCloseTo(74.64, 2);
  });

  it("finds 109.25 °C with k = 235 and 109.08 °C with k = 234.5, the linear 0.00393 giving 109.06", () => {
    const winding = { coldOhm: 10, coldCelsius: 20, hotOhm: 13.5 };
    expect(valueOf(windingTemperature(winding))).toBeCloseTo(109.25, 2);
    expect(valueOf(windingTemperature({ ...winding, k: 234.5 }))).toBeCloseTo(109.08, 2);
    // The choice of k moves the answer by some 0.2 K, as the quoted linear coefficient shows.
    expect(20 + 0.35 / 0.00393).toBeCloseTo(109.06, 2);
  });

  it("finds 93.50 °C for aluminium", () => {
    const winding = { coldOhm: 10, coldCelsius: 20, hotOhm: 13, k: CONDUCTOR_K.aluminium };
    expect(valueOf(windingTemperature(winding))).toBeCloseTo(93.5, 2);
  });

  it("finds 97.03 °C from a log line of 24.0 V and 0.320 A on a coil of 57.6 ohm at 20 °C", () => {
    expect(24 / 0.32).toBeCloseTo(75, 10);
    expect(valueOf(windingTemperature({ coldOhm: 57.6, coldCelsius: 20, hotOhm: 24 / 0.32 }))).toBeCloseTo(
      97.03,
      2,
    );
  });

  it("moves by 3.3 K for an error of 1 % in the hot resistance near 97 °C", () => {
    const at = (hotOhm: number) => valueOf(windingTemperature({ coldOhm: 57.6, coldCelsius: 20, hotOhm }));
    expect(at(75 * 1.01) - at(75)).toBeCloseTo(3.3, 1);
  });

  it("undoes what warming does, for any copper coil", () => {
    const celsius = fc.double({ min: -40, max: 200, noNaN: true });
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 1e4, noNaN: true }),
        celsius,
        celsius,
        (ohmAt20, first, second) => {
          const [cold, hot] = [Math.min(first, second), Math.max(first, second)];
          const coldOhm = valueOf(resistanceAt({ ohmAt20, celsius: cold }));
          const hotOhm = Math.max(coldOhm, valueOf(resistanceAt({ ohmAt20, celsius: hot })));
          expect(valueOf(windingTemperature({ coldOhm, coldCelsius: cold, hotOhm }))).toBeCloseTo(hot, 6);
          expect(valueOf(resistanceAt20({ ohm: hotOhm, celsius: hot }))).toBeCloseTo(ohmAt20, 6);
        },
      ),
    );
  });
});

describe("resistance at 20 °C (computed)", () => {
  it("brings 59.5 ohm at 28 °C to 57.69 ohm", () => {
    expect(valueOf(resistanceAt20({ ohm: 59.5, celsius: 28 }))).toBeCloseTo(57.69, 2);
  });

  it.each([
    [40, 1.0784],
    [60, 1.1569],
    [80, 1.2353],
    [100, 1.3137],
    [120, 1.3922],
    [155, 1.5294],
  ])("at %i °C copper has %f times its resistance at 20 °C", (celsius, factor) => {
    expect(valueOf(resistanceAt({ ohmAt20: 1, celsius }))).toBeCloseTo(factor, 4);
  });

  it("has coefficients 0.003922 with 235 and 0.003929 with 234.5", () => {
    expect(coefficientAt20(235)).toBeCloseTo(0.003922, 6);
    expect(coefficientAt20(234.5)).toBeCloseTo(0.003929, 6);
  });

  it("a healthy coil of 57.6 ohm reads 61.9 ohm at 39 °C, and is in tolerance only once it is corrected", () => {
    const read = valueOf(resistanceAt({ ohmAt20: 57.6, celsius: 39 }));
    expect(read).toBeCloseTo(61.9, 1);
    expect(withinTolerance({ ohmAt20: read, ratedOhm: 57.6, tolerancePercent: 5 }).position).toBe("above");
    const corrected = valueOf(resistanceAt20({ ohm: read, celsius: 39 }));
    expect(withinTolerance({ ohmAt20: corrected, ratedOhm: 57.6, tolerancePercent: 5 }).position).toBe(
      "inside",
    );
  });

  // Usual tolerance of 5 to 8 % at 20 °C: from memory; the bands are computed.
  it.each([
    [8, 52.99, 62.21],
    [5, 54.72, 60.48],
  ])("the band of 57.6 ohm with %i %% runs from %f to %f ohm", (tolerancePercent, from, to) => {
    const band = withinTolerance({ ohmAt20: 50, ratedOhm: 57.6, tolerancePercent });
    expect(band.fromOhm).toBeCloseTo(from, 2);
    expect(band.toOhm).toBeCloseTo(to, 2);
    expect(band.position).toBe("below");
  });

  it("explains itself with the figures a person can redo", () => {
    expect(resistanceAt20({ ohm: 59.5, celsius: 28 })).toMatchObject({
      value: { step: { rule: "resistanceAt20", result: "57.69", input: { ohm: 59.5, celsius: 28, k: 235 } } },
    });
  });
});

describe("traps", () => {
  it.each([
    [{ coldOhm: 0, coldCelsius: 20, hotOhm: 75 }, "resistanceNotPositive"],
    [{ coldOhm: 57.6, coldCelsius: 20, hotOhm: -1 }, "resistanceNotPositive"],
    [{ coldOhm: 57.6, coldCelsius: 20, hotOhm: Number.NaN }, "resistanceNotPositive"],
    [{ coldOhm: 57.6, coldCelsius: 20, hotOhm: Number.POSITIVE_INFINITY }, "resistanceNotPositive"],
    [{ coldOhm: 57.6, coldCelsius: -235, hotOhm: 75 }, "temperatureImpossible"],
    [{ coldOhm: 57.6, coldCelsius: Number.NaN, hotOhm: 75 }, "temperatureImpossible"],
    [{ coldOhm: 75, coldCelsius: 20, hotOhm: 57.6 }, "hotBelowCold"],
  ])("%o is refused as %s", (winding, code) => {
    expect(windingTemperature(winding)).toMatchObject({ ok: false, code });
  });

  it("refuses a resistance or a temperature that cannot be, before correcting it", () => {
    expect(resistanceAt20({ ohm: 0, celsius: 20 })).toMatchObject({ code: "resistanceNotPositive" });
    expect(resistanceAt20({ ohm: 50, celsius: -240 })).toMatchObject({ code: "temperatureImpossible" });
    expect(resistanceAt20({ ohm: 50, celsius: -230, k: 225 })).toMatchObject({
      code: "temperatureImpossible",
    });
  });
});

describe("resistance carried back to switch-off (computed)", () => {
  const cooling = [74.151, 73.344, 72.576, 71.846].map((ohm, index) => ({
    secondsAfter: 30 * (index + 1),
    ohm,
  }));

  it("a plain semilog line reads 74.92 ohm, slightly low; with the cold resistance known it reads the true 75.00", () => {
    expect(valueOf(resistanceAtSwitchOff(cooling))).toBeCloseTo(74.92, 2);
    expect(valueOf(resistanceAtSwitchOff(cooling, 57.6))).toBeCloseTo(75.0, 2);
  });

  it("refuses one point, a coil that does not cool, and a point under the cold resistance", () => {
    expect(resistanceAtSwitchOff(cooling.slice(0, 1))).toMatchObject({ code: "tooFewPoints" });
    expect(resistanceAtSwitchOff(cooling, 72)).toMatchObject({ code: "resistanceNotPositive" });
    const twice = [
      { secondsAfter: 30, ohm: 70 },
      { secondsAfter: 30, ohm: 70 },
    ];
    expect(resistanceAtSwitchOff(twice)).toMatchObject({ code: "notCooling" });
  });
});
