import { modes, reading, symptom, type PartFamily } from "../family";

/** A drive battery: one block of a lead pair, or a lithium pack. */
export const battery = {
  code: "battery",
  safetyCritical: true,
  symptoms: [
    symptom("shortRange"),
    symptom("willNotCharge"),
    symptom("losesChargeStanding"),
    symptom("cutsOutUnderLoad", "safety"),
    symptom("tooHot", "safety", "heat"),
    symptom("swollen", "reportable"),
    symptom("leaksOrSmokes", "reportable"),
  ],
  readings: [
    reading("restVoltageFirst", "voltage", { temperature: "recorded" }),
    reading("restVoltageSecond", "voltage", { temperature: "recorded" }),
    reading("voltageUnderLoad", "voltage", { temperature: "recorded" }),
    reading("capacityGiven", "charge", { temperature: "capacityTo25" }),
    reading("dischargeCurrent", "current"),
    reading("endVoltage", "voltage"),
    reading("surfaceTemperature", "temperature"),
    reading("storageTime", "duration", { unit: "d" }),
    reading("cycleCount", "count"),
    reading("timeToFault", "duration"),
  ],
  failureModes: [
    ...modes("material", "capacityLost", "sulphated", "separatorFailed"),
    ...modes("electrical", "cellShorted", "cellOpen", "protectionTripped", "cellsApart"),
    ...modes("mechanical", "caseCracked", "terminalLoose"),
    ...modes("heat", "caseSwollen", "overheated"),
    ...modes("contamination", "leaking"),
  ],
  ruledOut: [
    "chargerGood",
    "chargerTypeMatches",
    "terminalsTight",
    "standingDrainNone",
    "blocksMeasuredAlone",
    "storedCharged",
  ],
  conditionAsFound: [
    "caseCracked",
    "caseSwollen",
    "terminalBurnt",
    "terminalLoose",
    "wetOrLeaking",
    "labelMissing",
    "openedBefore",
  ],
  cautions: ["outOfUse", "heavy", "shortCircuit", "swollenLithium", "ventilate", "makersManual"],
} as const satisfies PartFamily;
