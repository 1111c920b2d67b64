import type { FamilyCode } from "@/lib/parts/families";
import type { Limits } from "@/lib/rule-book/limits-shape";
import type { Part } from "./catalogue";

type ReadingLimit = Limits["readings"][number];

const PRACTICE = "Common practice, no source";
const LABEL = "Label of the part";
const TOUCH = "Burn threshold, ten minutes on bare metal, 48 °C; a caution, not a limit of the part";

const limit = (
  readingKind: string,
  [low, high]: readonly [number | null, number | null],
  unit: string,
): ReadingLimit => ({
  readingKind,
  low,
  high,
  unit,
  source: PRACTICE,
});

const READINGS: Readonly<Record<FamilyCode, readonly ReadingLimit[]>> = {
  brake: [
    limit("voltageUnderLoad", [21.6, 28], "V"),
    limit("releaseVoltage", [null, 18], "V"),
    limit("airGap", [0.1, 0.4], "mm"),
  ],
  motor: [
    limit("noLoadCurrent", [0.8, 3.5], "A"),
    limit("insulationResistance", [1e6, null], "ohm"),
    limit("brushLength", [8, null], "mm"),
  ],
  controller: [limit("voltageUnderLoad", [23, 28], "V"), limit("brakeOutputLoaded", [21, 28], "V")],
  charger: [limit("openVoltage", [26.5, 29.5], "V"), limit("chargeVoltage", [28, 29.5], "V")],
  battery: [limit("restVoltageFirst", [12.4, 13.2], "V"), limit("restVoltageSecond", [12.4, 13.2], "V")],
  gearbox: [limit("playAtRim", [0, 6], "mm"), limit("motorCurrentRaised", [1, 4], "A")],
  throttle: [limit("trackResistance", [4000, 6000], "ohm"), limit("supplyVoltage", [4.75, 5.25], "V")],
};

const CAUTIONS: Limits["surfaceCautions"] = [
  { grade: "warn", fromCelsius: 48, source: TOUCH },
  { grade: "alarm", fromCelsius: 60, source: PRACTICE },
];

/** What is usual for a family where a part says nothing of its own. */
export const familyLimits = (family: FamilyCode): Limits => ({
  readings: [...READINGS[family]],
  surfaceCautions: CAUTIONS,
  insulationClass: null,
  coil: null,
});

/** The limits of a part with a coil or a winding, from its label; null where the family's are enough. */
export function partLimits(part: Part): Limits | null {
  const { coilOhm, coilTolerance, windingOhm, windingTolerance } = part.rated;
  const ratedOhm = coilOhm ?? windingOhm;
  const toleranceFraction = coilTolerance ?? windingTolerance;
  if (typeof ratedOhm !== "number" || typeof toleranceFraction !== "string") return null;
  const insulationClass = part.rated["insulationClass"] === "155" ? "155 (F)" : "130 (B)";
  return {
    ...familyLimits(part.family),
    insulationClass,
    coil: { ratedOhm, toleranceFraction, source: LABEL },
  };
}
