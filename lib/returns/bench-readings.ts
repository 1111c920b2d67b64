import { readReading, type Reading } from "@/lib/evidence/reading";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { reading, readingKindOf, type PartFamily } from "@/lib/parts/family";

export type TypedReading = {
  readonly raw: string;
  readonly temperature: string;
  readonly instrument: string;
};
export type BenchReading = {
  readonly kind: string;
  readonly rawText: string;
  readonly unit: string;
  readonly canonicalValue: number | null;
  readonly temperatureCelsius: number | null;
  readonly instrument: string;
};

const TEMPERATURE = reading("benchTemperature", "temperature");
const RUN_TIME = reading("benchRun", "duration");
const LONGEST_RUN_MINUTES = 9999;

const valueOf = (read: Reading): number | null => (read.openCircuit ? null : read.canonicalValue);

/** The minutes of a run as typed; null where nothing was. Refuses `readingUnread` at its field. */
export function readRunMinutes(text: string): Outcome<number | null, "readingUnread"> {
  if (text.trim() === "") return ok(null);
  const read = readReading(text, RUN_TIME);
  const minutes = read.ok ? valueOf(read.value) : null;
  return minutes === null || minutes < 0 || minutes > LONGEST_RUN_MINUTES
    ? refuse("readingUnread", {}, "runMinutes")
    : ok(minutes);
}

function readOne(
  kind: string,
  typed: TypedReading,
  family: PartFamily,
): Outcome<BenchReading, "readingUnread"> {
  const known = readingKindOf(family, kind);
  const read = known && readReading(typed.raw, known);
  if (!read?.ok) return refuse("readingUnread", {}, `readings.${kind}.raw`);
  const hasTemperature = typed.temperature.trim() !== "";
  const celsius = hasTemperature ? readReading(typed.temperature, TEMPERATURE) : null;
  if (celsius && !celsius.ok) return refuse("readingUnread", {}, `readings.${kind}.temperature`);
  return ok({
    kind,
    rawText: read.value.rawText,
    unit: read.value.canonicalUnit,
    canonicalValue: valueOf(read.value),
    temperatureCelsius: celsius ? valueOf(celsius.value) : null,
    instrument: typed.instrument,
  });
}

/** The readings that were typed; those left empty are left out. Refuses the first that cannot be read, at its field. */
export function readBenchReadings(
  typed: Readonly<Record<string, TypedReading>>,
  family: PartFamily,
): Outcome<BenchReading[], "readingUnread"> {
  const found: BenchReading[] = [];
  for (const [kind, one] of Object.entries(typed)) {
    if (one.raw.trim() === "") continue;
    const read = readOne(kind, one, family);
    if (!read.ok) return read;
    found.push(read.value);
  }
  return ok(found);
}
