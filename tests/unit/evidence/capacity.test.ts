import { describe, expect, it } from "vitest";
import {
  capacityAt25,
  chargeGiven,
  hoursAtCurrent,
  pairDifference,
  shareOfRated,
} from "@/lib/evidence/capacity";
import { valueOf } from "./outcome-value";

// Correction factor 0.006 per kelvin for slow rates: standby-battery practice, from memory; the figures are computed.
describe("battery capacity", () => {
  const given = chargeGiven({ ampere: 1.65, seconds: (15 * 60 + 20) * 60 }).value;
  const share = (ampereHoursAt25: number) =>
    valueOf(shareOfRated({ ampereHoursAt25, ratedAmpereHours: 33, testHours: 20, ratedHours: 20 }));

  it("33 Ah at 1.65 A cut off after 15 h 20 min gives 25.30 Ah, 76.7 %: below 80", () => {
    expect(given).toBeCloseTo(25.3, 2);
    expect(share(given)).toBeCloseTo(76.7, 1);
  });

  it("the same test at 15 °C is worth 26.91 Ah, 81.6 %: the temperature decides the claim", () => {
    const at25 = valueOf(capacityAt25({ ampereHours: given, celsius: 15 }));
    expect(at25).toBeCloseTo(26.91, 2);
    expect(share(at25)).toBeCloseTo(81.6, 1);
  });

  it("is never compared across discharge times", () => {
    const across = shareOfRated({ ampereHoursAt25: 25, ratedAmpereHours: 33, testHours: 5, ratedHours: 20 });
    expect(across).toMatchObject({ code: "ratesDiffer", detail: { testHours: 5, ratedHours: 20 } });
  });

  it("by Peukert's rule lasts 3.789 h and gives 25.0 Ah at 6.6 A (exponent 1.2)", () => {
    const hours = hoursAtCurrent({ ratedAmpereHours: 33, ratedHours: 20, ampere: 6.6, exponent: 1.2 });
    expect(hours).toBeCloseTo(3.789, 3);
    expect(hours * 6.6).toBeCloseTo(25.0, 1);
  });

  it("shows a dead block in a pair that looks well together: 12.89 and 11.97 V", () => {
    expect(12.89 + 11.97).toBeCloseTo(24.86, 10);
    expect(pairDifference(12.89, 11.97).value).toBeCloseTo(0.92, 10);
  });

  it("refuses a capacity of zero and a temperature the rule does not reach", () => {
    expect(capacityAt25({ ampereHours: 0, celsius: 20 })).toMatchObject({ code: "capacityNotPositive" });
    expect(capacityAt25({ ampereHours: 20, celsius: -150 })).toMatchObject({ code: "temperatureImpossible" });
  });
});
