import { resistanceAt20 } from "@/lib/evidence/winding";
import { approximate, fractionFrom } from "@/lib/kernel/fraction";
import { readingKindOf, type PartFamily } from "@/lib/parts/family";
import type { Limits } from "@/lib/rule-book/limits-shape";
import type { ClaimFacts } from "../facts-shape";
import type { Judgement, ReadingView } from "./view";

type Reading = ClaimFacts["readings"][number];
type Limit = { low: number | null; high: number | null; source: string };
export type LimitsInForce = { readonly limits: Limits; readonly rule: string };

/** The coil's band comes from its rated value and tolerance at 20 °C; every other kind has its own two ends. */
function limitFor(kind: string, isCopper: boolean, limits: Limits): Limit | null {
  const { coil } = limits;
  if (isCopper && coil) {
    const span = coil.ratedOhm * approximate(fractionFrom(coil.toleranceFraction));
    return { low: coil.ratedOhm - span, high: coil.ratedOhm + span, source: coil.source };
  }
  return limits.readings.find((limit) => limit.readingKind === kind) ?? null;
}

const judge = (value: number, { low, high }: Limit): Judgement => {
  if (low !== null && value < low) return "below";
  return high !== null && value > high ? "above" : "within";
};

/** The value that is compared: copper at 20 °C, everything else as measured. A copper value without temperature has none. */
function comparable({ canonicalValue, temperatureCelsius }: Reading, isCopper: boolean): number | null {
  if (canonicalValue === null || !isCopper) return canonicalValue;
  if (temperatureCelsius === null) return null;
  const corrected = resistanceAt20({ ohm: canonicalValue, celsius: temperatureCelsius });
  return corrected.ok ? corrected.value.value : null;
}

/** A reading beside the limits of the Rule book version in force on the fitting day. It informs; a person judges. */
export function judgeReading(
  reading: Reading,
  family: PartFamily,
  inForce: LimitsInForce | null,
): ReadingView {
  const isCopper = readingKindOf(family, reading.kind)?.temperature === "copperTo20";
  const value = comparable(reading, isCopper);
  const limit = inForce && limitFor(reading.kind, isCopper, inForce.limits);
  const isOpen = reading.canonicalValue === null;
  const judgement: Judgement = isOpen
    ? "openCircuit"
    : value === null
      ? "noTemperature"
      : limit
        ? judge(value, limit)
        : "noLimit";
  return {
    rowId: reading.rowId,
    kind: reading.kind,
    rawText: reading.rawText,
    unit: reading.unit,
    value: reading.canonicalValue,
    temperatureCelsius: reading.temperatureCelsius,
    instrument: reading.instrument,
    judgedValue: value,
    isCorrectedTo20: isCopper && value !== null,
    judgement,
    limit:
      limit && inForce
        ? { low: limit.low, high: limit.high, source: limit.source, rule: inForce.rule }
        : null,
  };
}
