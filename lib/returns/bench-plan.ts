import type { FamilyCode } from "@/lib/parts/families";

/**
 * A step at the bench: something looked at, a reading of the family taken, or the warm run. Its words stand under
 * `returns.steps`; a reading's are its kind's own.
 */
export type BenchStep =
  | { readonly id: string; readonly does: "look" }
  | { readonly id: string; readonly does: "read"; readonly reading: string }
  | { readonly id: string; readonly does: "run" };

const look = (id: string): BenchStep => ({ id, does: "look" });
const read = (reading: string): BenchStep => ({ id: reading, does: "read", reading });
const RUN: BenchStep = { id: "warmRun", does: "run" };

// What can be seen without opening comes first, cold readings before the run, hot ones after it.
const PLANS = {
  brake: [
    look("sameUnit"),
    look("marksOfWork"),
    read("coilResistance"),
    read("airGap"),
    look("frictionFace"),
    read("releaseVoltage"),
    RUN,
    read("surfaceTemperature"),
  ],
  motor: [
    look("sameUnit"),
    look("marksOfWork"),
    read("windingResistance"),
    look("brushesAndCommutator"),
    read("noLoadCurrent"),
    RUN,
    read("surfaceTemperature"),
  ],
  controller: [
    look("sameUnit"),
    look("marksOfWork"),
    look("pinsAndWater"),
    look("faultCodes"),
    read("voltageUnderLoad"),
    read("brakeOutputLoaded"),
    RUN,
    read("surfaceTemperature"),
  ],
  charger: [
    look("sameUnit"),
    look("marksOfWork"),
    look("plugAndFuse"),
    look("lampState"),
    read("openVoltage"),
    read("chargeCurrent"),
    RUN,
    read("surfaceTemperature"),
  ],
  battery: [look("sameUnit"), look("caseAndTerminals"), read("restVoltageFirst"), RUN, read("capacityGiven")],
  gearbox: [
    look("sameUnit"),
    look("marksOfWork"),
    look("shaftAndKey"),
    look("oilTrace"),
    read("playAtRim"),
    RUN,
    read("surfaceTemperature"),
  ],
  throttle: [
    look("sameUnit"),
    look("marksOfWork"),
    look("plugAndLead"),
    look("returnsToNeutral"),
    read("trackResistance"),
    RUN,
  ],
} as const satisfies Record<FamilyCode, readonly BenchStep[]>;

/** What the bench does for each family, in order. */
export const BENCH_PLANS: Readonly<Record<FamilyCode, readonly BenchStep[]>> = PLANS;
