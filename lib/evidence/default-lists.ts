import { heatFaultsOf, type PartFamily } from "@/lib/parts/family";
import { FAMILIES, type FamilyCode } from "@/lib/parts/families";
import type { EvidenceList, EvidenceRow } from "@/lib/rule-book/evidence-list-shape";

// A row's words stand under its id: `evidence.rows.<id>.name` and `.why`. Rows that mean the same share an id.

type Need = EvidenceRow["need"];
/** A row as written here: its need may differ for some symptoms of the family. */
type ListRow = {
  readonly row: EvidenceRow;
  readonly instead?: { readonly need: Need; readonly symptoms: readonly string[] };
};

const asked = (accepts: EvidenceRow["accepts"], id: string, need: Need): ListRow => ({
  row: { id, need, accepts, readingKind: null, why: id },
});
const photo = (id: string, need: Need = "required"): ListRow => asked("photo", id, need);
const answer = (id: string, need: Need = "required"): ListRow => asked("answer", id, need);
const document = (id: string, need: Need = "required"): ListRow => asked("document", id, need);
const measured = (id: string, readingKind: string, need: Need = "required"): ListRow => ({
  row: { id, need, accepts: "reading", readingKind, why: id },
});
const unless = ({ row }: ListRow, need: Need, ...symptoms: readonly string[]): ListRow => ({
  row,
  instead: { need, symptoms },
});

/** What every family shows besides its own rows: the hot run, proof by exclusion, the swap, an earlier repairer's marks. */
const common = (family: PartFamily): ListRow[] => [
  unless(asked("runLog", "runLog", "useful"), "required", ...heatFaultsOf(family)),
  answer("ruledOut"),
  photo("conditionAsFound", "useful"),
  answer("swapProof", "useful"),
];

const OWN_ROWS: Readonly<Record<FamilyCode, readonly ListRow[]>> = {
  brake: [
    photo("label"),
    unless(measured("coilResistanceCold", "coilResistance"), "useful", "noise"),
    unless(measured("releaseVoltage", "releaseVoltage", "useful"), "required", "grabsWhenWarm", "drags"),
    unless(
      measured("voltageAtPlug", "voltageUnderLoad", "useful"),
      "required",
      "grabsWhenWarm",
      "drags",
      "willNotRelease",
    ),
    measured("airGap", "airGap"),
    photo("airGapPhoto"),
    photo("frictionFace"),
    answer("oilOrDirt"),
    answer("handReleaseLever"),
    photo("plugPhoto"),
  ],
  motor: [
    photo("label"),
    measured("noLoadCurrent", "noLoadCurrent"),
    measured("windingResistance", "windingResistance"),
    measured("otherSide", "otherSideResistance", "useful"),
    photo("brushesAndCommutator"),
    unless(
      measured("surfaceAfterFive", "surfaceTemperature", "useful"),
      "required",
      ...heatFaultsOf(FAMILIES.motor),
    ),
    measured("runningHours", "runningHours", "useful"),
    measured("distance", "distance", "useful"),
  ],
  controller: [
    photo("label"),
    answer("faultCode"),
    document("faultMemory", "useful"),
    measured("voltageUnderLoad", "voltageUnderLoad"),
    measured("brakeCoilFirst", "brakeCoilResistance"),
    photo("pinPhoto"),
    answer("waterTrace"),
    answer("programVersion", "useful"),
  ],
  charger: [
    photo("label"),
    measured("openVoltage", "openVoltage"),
    measured("chargeCurrent", "chargeCurrent"),
    answer("lampState"),
    photo("plugAndFuse"),
    answer("batteryTypeUsed"),
  ],
  battery: [
    photo("labelWithDate"),
    measured("restVoltageFirst", "restVoltageFirst"),
    measured("restVoltageSecond", "restVoltageSecond", "useful"),
    unless(document("capacityTest"), "notNeeded", "swollen", "leaksOrSmokes"),
    unless(measured("capacityGiven", "capacityGiven"), "notNeeded", "swollen", "leaksOrSmokes"),
    answer("chargerUsed"),
    photo("terminalPhoto"),
    measured("storageTime", "storageTime", "useful"),
  ],
  gearbox: [
    photo("label"),
    answer("noiseAndPlay"),
    answer("oilTrace"),
    photo("shaftAndKey"),
    answer("wheelFixing"),
    answer("motorSwapped"),
  ],
  throttle: [
    photo("label"),
    measured("trackEndToEnd", "trackResistance"),
    answer("wiperSweep"),
    answer("returnToNeutral"),
    photo("plugAndLead"),
    answer("waterTrace"),
    answer("faultCode", "useful"),
  ],
};

/** The list for every symptom, and a list of its own for each symptom that needs something else. */
function listOf(family: PartFamily, own: readonly ListRow[]): EvidenceList {
  const rows = [...own, ...common(family)];
  const special = family.symptoms.filter(({ code }) =>
    rows.some(({ instead }) => instead?.symptoms.includes(code)),
  );
  return {
    rows: rows.map(({ row }) => row),
    bySymptom: special.map(({ code }) => ({
      symptom: code,
      rows: rows.map(({ row, instead }) =>
        instead?.symptoms.includes(code) ? { ...row, need: instead.need } : row,
      ),
    })),
  };
}

/** The evidence lists a new Rule book starts with, family by family. A distributor edits them there. */
export const DEFAULT_EVIDENCE_LISTS: Readonly<Record<FamilyCode, EvidenceList>> = {
  brake: listOf(FAMILIES.brake, OWN_ROWS.brake),
  motor: listOf(FAMILIES.motor, OWN_ROWS.motor),
  controller: listOf(FAMILIES.controller, OWN_ROWS.controller),
  charger: listOf(FAMILIES.charger, OWN_ROWS.charger),
  battery: listOf(FAMILIES.battery, OWN_ROWS.battery),
  gearbox: listOf(FAMILIES.gearbox, OWN_ROWS.gearbox),
  throttle: listOf(FAMILIES.throttle, OWN_ROWS.throttle),
};
