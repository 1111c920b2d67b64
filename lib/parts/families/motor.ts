import { modes, reading, symptom, type PartFamily } from "../family";

/** The drive motor with its brushes and commutator, without brake and gearbox. */
export const motor = {
  code: "motor",
  safetyCritical: false,
  symptoms: [
    symptom("dead"),
    symptom("weakWhenWarm", "heat"),
    symptom("runsRough"),
    symptom("noise"),
    symptom("tooHot", "heat"),
    symptom("smokeOrSmell", "reportable"),
  ],
  readings: [
    reading("noLoadCurrent", "current"),
    reading("supplyVoltage", "voltage"),
    reading("windingResistance", "resistance", { temperature: "copperTo20" }),
    reading("otherSideResistance", "resistance", { temperature: "copperTo20" }),
    reading("insulationResistance", "resistance"),
    reading("brushLength", "length"),
    reading("surfaceTemperature", "temperature"),
    reading("runningHours", "duration", { unit: "h" }),
    reading("distance", "distance"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("electrical", "windingOpen", "windingShortedTurns", "shortToFrame"),
    ...modes("material", "brushesWorn", "commutatorBurnt", "bearingWorn", "leadBroken"),
    ...modes("mechanical", "brushStuck", "shaftDamaged", "magnetLoose"),
    ...modes("heat", "overheated"),
    ...modes("contamination", "waterInside", "brushDust"),
  ],
  ruledOut: [
    "supplyGoodUnderLoad",
    "commutatorCleanAndFree",
    "wiringSound",
    "brakeReleases",
    "gearboxTurnsFreely",
    "controllerOutputGood",
    "otherSideCompared",
  ],
  conditionAsFound: [
    "coverCracked",
    "screwMissing",
    "brushCapLoose",
    "keyOutOfSeat",
    "leadPinched",
    "plugDamaged",
    "waterTrace",
    "openedBefore",
  ],
  cautions: ["outOfUse", "hotSurface", "raisedWheels", "supplyOff", "makersManual"],
} as const satisfies PartFamily;
