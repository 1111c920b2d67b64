/** What a reading measures. The units a person may type for each stand in `lib/evidence/units.ts`. */
export type Dimension =
  | "resistance"
  | "voltage"
  | "current"
  | "temperature"
  | "length"
  | "distance"
  | "duration"
  | "charge"
  | "count";

/**
 * What the temperature has to do with a reading.
 * `copperTo20`: a copper winding, brought to 20 °C before it is judged; without its temperature it is no evidence.
 * `capacityTo25`: a battery's capacity, brought to 25 °C.
 * `recorded`: judged as read, but the temperature belongs beside it. `notNeeded`: it does not matter.
 */
export type TemperatureRole = "copperTo20" | "capacityTo25" | "recorded" | "notNeeded";

/** One kind of reading. What is usual for it belongs to the part and stands in the Rule book, never here. */
export type ReadingKind = {
  readonly code: string;
  readonly dimension: Dimension;
  /** The unit the value is kept and shown in; written without signs the text face lacks ("ohm"). */
  readonly unit: string;
  readonly temperature: TemperatureRole;
};

/** How a person in the workshop names the fault. Words and tiles: `families.<code>.symptoms`. */
export type Symptom = {
  readonly code: string;
  /** Somebody may be hurt by it: the claim is urgent. */
  readonly safetyCritical: boolean;
  /** It shows only warm: the claim needs a run log, and a cold test proves nothing. */
  readonly heatFault: boolean;
  /** It moved by itself, did not stop, burnt, smoked or swelled: the maker is to be told the same day. */
  readonly mayBeReportable: boolean;
};

/** The physical process behind a failure, kept apart from how it shows (mode) and from why it came about (cause). */
export const MECHANISMS = [
  "mechanical",
  "material",
  "electrical",
  "contamination",
  "heat",
  "software",
] as const;
export type Mechanism = (typeof MECHANISMS)[number];

export type FailureMode = { readonly code: string; readonly mechanism: Mechanism };

/**
 * A part family. Everything drawn for a family (tiles, reading pads, exclusion list, bench findings) comes from here;
 * terms, limits, evidence lists and bench plans are Rule book data.
 */
export type PartFamily = {
  readonly code: string;
  readonly safetyCritical: boolean;
  readonly symptoms: readonly Symptom[];
  readonly readings: readonly ReadingKind[];
  readonly failureModes: readonly FailureMode[];
  /** What the technician confirms is not the cause. */
  readonly ruledOut: readonly string[];
  /** What an earlier repairer or a blow may have left, photographed apart from the failure. */
  readonly conditionAsFound: readonly string[];
  /** Cautions shown where the work is. */
  readonly cautions: readonly string[];
};

type SymptomMark = "safety" | "heat" | "reportable";

/** A symptom by its code and marks; whatever may be reportable is critical to safety too. */
export const symptom = (code: string, ...marks: readonly SymptomMark[]): Symptom => ({
  code,
  safetyCritical: marks.includes("safety") || marks.includes("reportable"),
  heatFault: marks.includes("heat"),
  mayBeReportable: marks.includes("reportable"),
});

const CANONICAL_UNIT = {
  resistance: "ohm",
  voltage: "V",
  current: "A",
  temperature: "°C",
  length: "mm",
  distance: "km",
  duration: "min",
  charge: "Ah",
  count: "",
} as const satisfies Record<Dimension, string>;

/** A reading kind in the usual unit of its dimension, the temperature not needed, unless said otherwise. */
export const reading = (
  code: string,
  dimension: Dimension,
  more: { readonly temperature?: TemperatureRole; readonly unit?: string } = {},
): ReadingKind => ({ code, dimension, unit: CANONICAL_UNIT[dimension], temperature: "notNeeded", ...more });

/** Failure modes that share a mechanism, in the order they are offered. */
export const modes = (mechanism: Mechanism, ...codes: readonly string[]): FailureMode[] =>
  codes.map((code) => ({ code, mechanism }));

/** The reading kind of that code, or null. */
export const readingKindOf = (family: PartFamily, code: string): ReadingKind | null =>
  family.readings.find((kind) => kind.code === code) ?? null;

/** The symptom of that code, or null. */
export const symptomOf = (family: PartFamily, code: string): Symptom | null =>
  family.symptoms.find((candidate) => candidate.code === code) ?? null;

/** Codes of the symptoms that show only warm. */
export const heatFaultsOf = (family: PartFamily): string[] =>
  family.symptoms.filter((candidate) => candidate.heatFault).map((candidate) => candidate.code);
