import { modes, reading, symptom, type PartFamily } from "../family";

/** The spring-applied brake on the drive motor: without voltage it holds, the coil releases it. */
export const brake = {
  code: "brake",
  safetyCritical: true,
  symptoms: [
    symptom("willNotHold", "reportable"),
    symptom("grabsWhenWarm", "safety", "heat"),
    symptom("drags", "heat"),
    symptom("noise"),
    symptom("willNotRelease"),
    symptom("tooHot", "heat"),
    symptom("smokeOrSmell", "reportable"),
  ],
  readings: [
    reading("coilResistance", "resistance", { temperature: "copperTo20" }),
    reading("releaseVoltage", "voltage", { temperature: "recorded" }),
    reading("voltageUnderLoad", "voltage"),
    reading("coilCurrent", "current", { temperature: "recorded" }),
    reading("airGap", "length"),
    reading("surfaceTemperature", "temperature"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("heat", "losesReleaseHot"),
    ...modes("electrical", "coilOpen", "coilShortedTurns", "suppressionMissing", "switchFaulty"),
    ...modes("material", "liningWorn", "magnetCracked", "leadChafed"),
    ...modes("mechanical", "gapBeyondLimit", "plateStuck", "handReleaseJammed"),
    ...modes("contamination", "oilOnFace", "waterInside"),
  ],
  ruledOut: [
    "supplyGoodUnderLoad",
    "controllerOutputGood",
    "wiringSound",
    "handReleaseFree",
    "faceCleanAndDry",
    "motorTurnsFreely",
    "otherSideCompared",
  ],
  conditionAsFound: [
    "coverCracked",
    "screwMissing",
    "leadPinched",
    "plugDamaged",
    "wrongScrews",
    "gapReset",
    "oilOrGrease",
    "openedBefore",
  ],
  cautions: [
    "outOfUse",
    "wheelsChocked",
    "hotSurface",
    "raisedWheels",
    "goodControllerAtRisk",
    "makersManual",
  ],
} as const satisfies PartFamily;
