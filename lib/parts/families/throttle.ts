import { modes, reading, symptom, type PartFamily } from "../family";

/** The hand control that asks for speed: lever, knob or joystick. */
export const throttle = {
  code: "throttle",
  safetyCritical: true,
  symptoms: [
    symptom("dead"),
    symptom("jumps", "safety"),
    symptom("doesNotReturn", "reportable"),
    symptom("slowOnly"),
    symptom("cutsOutWhenWarm", "safety", "heat"),
    symptom("damaged"),
  ],
  readings: [
    reading("trackResistance", "resistance"),
    reading("wiperAtNeutral", "resistance"),
    reading("wiperAtFull", "resistance"),
    reading("supplyVoltage", "voltage"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("electrical", "trackOpen", "wiperJumps", "sensorDead"),
    ...modes("mechanical", "springBroken", "leverStuck", "neutralShifted"),
    ...modes("material", "trackWorn", "leadBroken"),
    ...modes("contamination", "waterInside"),
  ],
  ruledOut: ["supplyGood", "controllerGood", "wiringSound", "neutralSetRight", "leverFree"],
  conditionAsFound: [
    "leverBent",
    "coverCracked",
    "screwMissing",
    "leadPinched",
    "plugDamaged",
    "waterTrace",
    "blowMark",
    "openedBefore",
  ],
  cautions: ["outOfUse", "raisedWheels", "suddenStart", "makersManual"],
} as const satisfies PartFamily;
