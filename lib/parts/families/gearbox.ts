import { modes, reading, symptom, type PartFamily } from "../family";

/** The reduction gear between motor and wheel, with shaft, key and wheel fixing. */
export const gearbox = {
  code: "gearbox",
  safetyCritical: true,
  symptoms: [
    symptom("noise"),
    symptom("play"),
    symptom("leaksOil"),
    symptom("wheelNotDriven", "safety"),
    symptom("jams", "reportable"),
    symptom("tooHot", "heat"),
  ],
  readings: [
    reading("playAtRim", "length"),
    reading("motorCurrentRaised", "current"),
    reading("surfaceTemperature", "temperature"),
    reading("distance", "distance"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("mechanical", "toothBroken", "shaftBent", "keySheared", "wheelFixingLoose"),
    ...modes("material", "gearWorn", "bearingWorn", "sealWorn", "housingCracked"),
    ...modes("contamination", "waterInOil", "oilLost"),
    ...modes("heat", "overheated"),
  ],
  ruledOut: [
    "motorSwapped",
    "wheelFixingTight",
    "keySeated",
    "oilPresent",
    "tyreAndWheelFree",
    "brakeReleases",
  ],
  conditionAsFound: [
    "housingCracked",
    "screwMissing",
    "keyOutOfSeat",
    "keywayDamaged",
    "wheelNutLoose",
    "oilTrace",
    "blowMark",
    "openedBefore",
  ],
  cautions: ["outOfUse", "stopMotorFirst", "raisedWheels", "hotSurface", "makersManual"],
} as const satisfies PartFamily;
