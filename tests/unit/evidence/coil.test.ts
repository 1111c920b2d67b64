import { describe, expect, it } from "vitest";
import {
  coilOhmFor,
  coilPower,
  criticalTemperature,
  currentAvailable,
  dragPower,
  pullInVoltage,
  releaseMargin,
} from "@/lib/evidence/coil";
import { resistanceAt } from "@/lib/evidence/winding";
import { valueOf } from "./outcome-value";

// The physics of a brake coil. All figures are computed from the formulas, with k = 235.
describe("coil power and current, cold and at 100 °C, at 24 V (computed)", () => {
  it.each([
    [6, 96.0, 0.25, 126.1, 4.57, 0.19],
    [8, 72.0, 0.333, 94.6, 6.09, 0.254],
    [10, 57.6, 0.417, 75.7, 7.61, 0.317],
    [12, 48.0, 0.5, 63.1, 9.13, 0.381],
    [15, 38.4, 0.625, 50.4, 11.42, 0.476],
    [20, 28.8, 0.833, 37.8, 15.22, 0.634],
    [25, 23.04, 1.042, 30.3, 19.03, 0.793],
    [30, 19.2, 1.25, 25.2, 22.84, 0.951],
  ])(
    "a coil of %i W has %f ohm and draws %f A cold; hot %f ohm, %f W, %f A",
    (watt, ohm, cold, hotOhm, hotWatt, hot) => {
      const ohmAt20 = valueOf(coilOhmFor({ volt: 24, watt }));
      expect(ohmAt20).toBeCloseTo(ohm, 2);
      expect(valueOf(currentAvailable({ volt: 24, ohmAt20, celsius: 20 }))).toBeCloseTo(cold, 3);
      const ohmHot = valueOf(resistanceAt({ ohmAt20, celsius: 100 }));
      expect(ohmHot).toBeCloseTo(hotOhm, 1);
      expect(valueOf(coilPower({ volt: 24, ohm: ohmHot }))).toBeCloseTo(hotWatt, 2);
      expect(valueOf(currentAvailable({ volt: 24, ohmAt20, celsius: 100 }))).toBeCloseTo(hot, 3);
    },
  );

  // The resistances are the normal values three vehicle makers' service manuals print (seen); the powers are computed.
  it.each([
    [45, 12.8],
    [80, 7.2],
    [100, 5.76],
  ])("%i ohm take %f W at 24 V", (ohm, watt) => {
    expect(valueOf(coilPower({ volt: 24, ohm }))).toBeCloseTo(watt, 2);
  });

  it("held at 12 V a coil of 57.6 ohm takes 2.5 W, a quarter of its 10 W", () => {
    expect(valueOf(coilPower({ volt: 12, ohm: 57.6 }))).toBeCloseTo(2.5, 10);
  });
});

describe("release when hot (computed)", () => {
  it.each([
    [60, 17.35],
    [100, 19.71],
    [120, 20.88],
  ])("a brake that pulls in at 15 V cold needs more at %i °C: %f V", (celsius, volt) => {
    expect(valueOf(pullInVoltage({ voltAt20: 15, celsius }))).toBeCloseTo(volt, 2);
  });

  it.each([
    [21.6, 15, 132.2],
    [21.6, 18, 71.0],
    [20, 15, 105.0],
    [20, 18, 48.3],
  ])(
    "with %f V at the plug a brake that needs %f V cold is lost above %f °C",
    (availableVolt, pullInVoltAt20, celsius) => {
      expect(valueOf(criticalTemperature({ availableVolt, pullInVoltAt20 }))).toBeCloseTo(celsius, 1);
    },
  );

  it("reaches exactly the voltage at hand at the critical temperature", () => {
    const celsius = valueOf(criticalTemperature({ availableVolt: 21.6, pullInVoltAt20: 18 }));
    expect(valueOf(pullInVoltage({ voltAt20: 18, celsius }))).toBeCloseTo(21.6, 10);
  });

  it("compares the current at hand with the current needed", () => {
    const needed = 15 / 57.6;
    const at = (celsius: number) => valueOf(currentAvailable({ volt: 21.6, ohmAt20: 57.6, celsius }));
    expect(valueOf(releaseMargin({ availableAmpere: at(20), neededAmpere: needed }))).toBeCloseTo(1.44, 2);
    expect(valueOf(releaseMargin({ availableAmpere: at(140), neededAmpere: needed }))).toBeLessThan(1);
    expect(releaseMargin({ availableAmpere: 0.3, neededAmpere: 0 })).toMatchObject({
      code: "currentNotPositive",
    });
  });

  it.each([
    [0.3, 94.2],
    [2, 628],
  ])("a lining dragging with %f Nm at 3000 rpm makes %f W of heat", (newtonMetre, watt) => {
    expect(dragPower({ newtonMetre, rpm: 3000 }).value).toBeCloseTo(watt, newtonMetre < 1 ? 1 : 0);
  });
});

it("refuses voltages and resistances that cannot be", () => {
  expect(coilPower({ volt: 24, ohm: 0 })).toMatchObject({ code: "resistanceNotPositive" });
  expect(coilPower({ volt: Number.NaN, ohm: 50 })).toMatchObject({ code: "voltageNotPositive" });
  expect(coilOhmFor({ volt: 24, watt: -1 })).toMatchObject({ code: "resistanceNotPositive" });
  expect(currentAvailable({ volt: 24, ohmAt20: 50, celsius: -300 })).toMatchObject({
    code: "temperatureImpossible",
  });
  expect(pullInVoltage({ voltAt20: 0, celsius: 20 })).toMatchObject({ code: "voltageNotPositive" });
  expect(criticalTemperature({ availableVolt: 21.6, pullInVoltAt20: 0 })).toMatchObject({
    code: "voltageNotPositive",
  });
});
