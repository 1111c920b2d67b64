import { modes, reading, symptom, type PartFamily } from "../family";

/** The mains charger, on board or beside the vehicle. */
export const charger = {
  code: "charger",
  safetyCritical: false,
  symptoms: [
    symptom("dead"),
    symptom("chargesTooLittle"),
    symptom("neverFinishes"),
    symptom("cutsOutWhenWarm", "heat"),
    symptom("tooHot", "safety", "heat"),
    symptom("plugOrLead", "safety"),
    symptom("smokeOrSmell", "reportable"),
  ],
  readings: [
    reading("openVoltage", "voltage"),
    reading("chargeVoltage", "voltage"),
    reading("chargeCurrent", "current"),
    reading("surfaceTemperature", "temperature"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("electrical", "noOutput", "outputLow", "outputHigh", "doesNotSwitchToFloat", "fuseBlown"),
    ...modes("heat", "cutsOutHot"),
    ...modes("material", "leadBroken", "plugBurnt", "fanStopped"),
    ...modes("contamination", "waterInside"),
    ...modes("software", "curveWrong"),
  ],
  ruledOut: ["mainsGood", "fuseGood", "batteriesGood", "batteryTypeMatches", "wiringSound", "airFlowFree"],
  conditionAsFound: [
    "coverCracked",
    "screwMissing",
    "leadPinched",
    "plugDamaged",
    "fuseReplaced",
    "waterTrace",
    "openedBefore",
  ],
  cautions: ["outOfUse", "mainsInside", "hotSurface", "ventilate", "makersManual"],
} as const satisfies PartFamily;
