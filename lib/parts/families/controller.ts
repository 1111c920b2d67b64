import { modes, reading, symptom, type PartFamily } from "../family";

/** The drive controller: takes the throttle or joystick, feeds the motors and releases the brakes. */
export const controller = {
  code: "controller",
  safetyCritical: true,
  symptoms: [
    symptom("dead"),
    symptom("faultShown"),
    symptom("cutsOutWhenWarm", "safety", "heat"),
    symptom("brakeNotReleased"),
    symptom("movesByItself", "reportable"),
    symptom("willNotStop", "reportable"),
    symptom("smokeOrSmell", "reportable"),
  ],
  readings: [
    reading("voltageUnderLoad", "voltage"),
    reading("brakeOutputOpen", "voltage"),
    reading("brakeOutputLoaded", "voltage"),
    reading("brakeCoilResistance", "resistance", { temperature: "copperTo20" }),
    reading("motorResistance", "resistance", { temperature: "copperTo20" }),
    reading("surfaceTemperature", "temperature"),
    reading("runningHours", "duration", { unit: "h" }),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("electrical", "noPower", "brakeOutputDead", "motorOutputDead", "outputShorted", "inputFaulty"),
    ...modes("heat", "cutsOutHot"),
    ...modes("contamination", "waterInside"),
    ...modes("material", "pinBurnt", "solderCracked"),
    ...modes("software", "settingsWrong", "programVersionOld"),
  ],
  ruledOut: [
    "supplyGoodUnderLoad",
    "brakeCoilMeasured",
    "motorMeasured",
    "throttleGood",
    "wiringSound",
    "settingsChecked",
    "chargerInhibitClear",
  ],
  conditionAsFound: [
    "coverCracked",
    "screwMissing",
    "sealBroken",
    "plugDamaged",
    "pinBent",
    "waterTrace",
    "leadPinched",
    "openedBefore",
  ],
  cautions: ["outOfUse", "raisedWheels", "brakeBeforeController", "hotSurface", "supplyOff", "makersManual"],
} as const satisfies PartFamily;
