import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { Dimension, ReadingKind } from "@/lib/parts/family";
import { decimalFrom } from "./decimal-text";
import { plainText } from "./plain-text";
import { inUnit, unitNamed, type Unit } from "./units";

type ReadingText = {
  /** Exactly what was typed; kept for ever beside the value. */
  readonly rawText: string;
  /** The unit as understood, for example "kohm". */
  readonly unit: string;
  /** True where nothing was typed behind the number and the pad's unit was taken. */
  readonly unitAssumed: boolean;
  readonly canonicalUnit: string;
};

/** A reading as kept. An open circuit (the meter shows OL) has no value and is evidence all the same. */
export type Reading = ReadingText &
  (
    | { readonly openCircuit: false; readonly canonicalValue: number }
    | { readonly openCircuit: true; readonly canonicalValue: null }
  );

export type ReadingRefusal =
  | "readingEmpty"
  | "readingTooLong"
  | "readingNotANumber"
  | "readingAmbiguous"
  | "readingUnitUnknown"
  | "readingUnitUnclear"
  | "readingUnitOtherKind"
  | "readingImpossible";

const LONGEST_TEXT = 60;
const OPEN_CIRCUIT = /^(?:o\.?l\.?|0\.?l\.?|overload|open|∞|inf|offen|unendlich)$/iu;
const NUMBER_THEN_UNIT = /^([+\-−–]?\s*(?:\d(?:[\d.,'’ ]*\d)?|[.,]\d+))\s*(\D.*)?$/su;

/**
 * What a value of a dimension can be at all, in the unit a kind is kept in. Far wider than anything usual: it only
 * catches slips and settles what "24.125 V" means. What is usual stands in the Rule book and never blocks.
 */
const POSSIBLE: Readonly<Record<Dimension, readonly [from: number, to: number]>> = {
  resistance: [0, 1e10],
  voltage: [0, 1000],
  current: [0, 1000],
  temperature: [-60, 1000],
  length: [0, 500],
  distance: [0, 1e6],
  duration: [0, 1e7],
  charge: [0, 1000],
  count: [0, 1e6],
};

/**
 * Reads what was typed on the pad for one kind of reading, with or without a unit behind it.
 * Decimal comma and point are both taken; a text that can be read two ways is refused with both readings.
 * Refuses: empty, over 60 characters, no number, two meanings, unit unknown, unit of another kind, impossible value.
 */
export function readReading(rawText: string, kind: ReadingKind): Outcome<Reading, ReadingRefusal> {
  const text = plainText(rawText);
  if (text === "") return refuse("readingEmpty");
  if (text.length > LONGEST_TEXT) return refuse("readingTooLong", { limit: LONGEST_TEXT });
  if (OPEN_CIRCUIT.test(text)) return openCircuit(rawText, kind);

  const parts = NUMBER_THEN_UNIT.exec(text);
  if (!parts) return refuse("readingNotANumber", { text });
  const unit = unitFor(parts[2] ?? "", kind);
  if (!unit.ok) return unit;
  const value = valueIn({ typed: parts[1] ?? "", text }, kind, unit.value);
  if (!value.ok) return value;
  return ok({
    rawText,
    unit: unit.value?.symbol ?? kind.unit,
    unitAssumed: (parts[2] ?? "") === "",
    canonicalUnit: kind.unit,
    openCircuit: false,
    canonicalValue: value.value,
  });
}

function openCircuit(rawText: string, kind: ReadingKind): Outcome<Reading, ReadingRefusal> {
  if (kind.dimension !== "resistance") return refuse("readingNotANumber", { text: rawText.trim() });
  const text = { rawText, unit: kind.unit, unitAssumed: true, canonicalUnit: kind.unit };
  return ok({ ...text, openCircuit: true, canonicalValue: null });
}

/** The unit typed, the kind's own where none was, or null for a kind that is a bare count. */
function unitFor(typed: string, kind: ReadingKind): Outcome<Unit | null, ReadingRefusal> {
  const own = unitNamed(kind.unit);
  if (typed === "") return ok(own === "ambiguous" ? null : own);
  const named = unitNamed(typed);
  if (named === "ambiguous") return refuse("readingUnitUnclear", { unit: typed });
  if (named === null) return refuse("readingUnitUnknown", { unit: typed, expected: kind.unit || "none" });
  if (named.dimension !== kind.dimension)
    return refuse("readingUnitOtherKind", { unit: typed, expected: kind.unit || "none" });
  return ok(named);
}

function valueIn(
  { typed, text }: { typed: string; text: string },
  kind: ReadingKind,
  unit: Unit | null,
): Outcome<number, ReadingRefusal> {
  const own = unitNamed(kind.unit);
  const canonical = (value: number): number =>
    unit === null || own === null || own === "ambiguous" ? value : inUnit(value, unit, own);
  const [from, to] = POSSIBLE[kind.dimension];
  const possible = (value: number): boolean => canonical(value) >= from && canonical(value) <= to;

  const reading = decimalFrom(typed);
  if (reading.kind === "notANumber") return refuse("readingNotANumber", { text });
  const candidates = reading.kind === "number" ? [reading.value] : [reading.asDecimal, reading.asThousands];
  const left = candidates.filter(possible);
  const only = left[0];
  if (only === undefined) return refuse("readingImpossible", { text, from, to, unit: kind.unit });
  if (reading.kind === "ambiguous" && left.length > 1)
    return refuse("readingAmbiguous", {
      text: typed,
      decimal: reading.asDecimal,
      whole: reading.asThousands,
    });
  return ok(canonical(only));
}
