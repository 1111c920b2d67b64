import { describe, expect, it } from "vitest";
import {
  contactWarning,
  hotSpotMarginKelvin,
  INSULATION_CLASSES,
  insulationLifeFactor,
  permittedMeanCelsius,
  touchCaution,
} from "@/lib/evidence/thermal-limits";

describe("insulation classes", () => {
  // Limits and the rises of 130, 155 and 180: a motor manual quoting IEC 60034-1 (seen); rises of 105 and 120 from memory.
  it.each([
    ["105 (A)", 105, 60, 5],
    ["120 (E)", 120, 75, 5],
    ["130 (B)", 130, 80, 10],
    ["155 (F)", 155, 105, 10],
    ["180 (H)", 180, 125, 15],
  ] as const)("%s: limit %i °C, rise %i K, margin %i K", (insulation, limitCelsius, riseKelvin, margin) => {
    expect(INSULATION_CLASSES[insulation]).toEqual({ limitCelsius, riseKelvin });
    expect(hotSpotMarginKelvin(insulation)).toBe(margin);
  });

  // Seen in the same manual.
  it.each([
    ["155 (F)", 145],
    ["130 (B)", 120],
    ["180 (H)", 165],
  ] as const)("%s in air of 40 °C permits a mean of %i °C", (insulation, celsius) => {
    expect(permittedMeanCelsius(insulation, 40)).toBe(celsius);
  });

  // The rule of halving per 10 K is from memory; the factors are computed.
  it("life falls to a quarter 20 K over and grows 2.83 times 15 K under", () => {
    expect(insulationLifeFactor(20)).toBeCloseTo(0.25, 10);
    expect(insulationLifeFactor(-15)).toBeCloseTo(2.83, 2);
  });
});

describe("touch cautions (thresholds from memory, a warning only)", () => {
  it("bare metal at 52 °C warns for a contact of a minute, not for less", () => {
    expect(contactWarning("bareMetal", 52)).toBe("oneMinute");
    expect(contactWarning("plastic", 52)).toBe("tenMinutes");
    expect(contactWarning("bareMetal", 42.9)).toBeNull();
  });

  it("warns from 48 °C and alarms from 60 °C", () => {
    expect([47.9, 48, 59.9, 60].map(touchCaution)).toEqual(["none", "warn", "warn", "alarm"]);
  });
});
