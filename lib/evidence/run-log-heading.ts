import { plainText } from "./plain-text";
import type { MeasuredQuantity } from "./run-log";
import { unitNamed, type Unit } from "./units";

export type ColumnQuantity = MeasuredQuantity | "time" | "date" | "event";

/** What a heading says: the quantity, its unit where one is written, and for a time the shape of its cells. */
export type Heading = {
  readonly quantity: ColumnQuantity | null;
  readonly unit: Unit | null;
  /** The unit as written or as named by us ("rpm"); null where the heading names none. */
  readonly unitText: string | null;
  readonly clockShape: "mm:ss" | "hh:mm" | "hh:mm:ss" | null;
};

// Words of a heading, in English and German, whole or as the end of a compound ("Spulentemperatur").
const WORDS: Readonly<Record<ColumnQuantity, RegExp>> = {
  ambient:
    /^(?:ambient|amb|tamb|umgebung(?:stemperatur)?|raum(?:temperatur)?|raumluft|room|air|luft(?:temperatur)?)$/u,
  temperature: /^(?:temps?|.*temp|.*temperatur(?:e|en|es)?|thermocouple|thermoelement|t?c\d+|t\d+)$/u,
  current: /^(?:.*current|.*strom(?:stärke)?|i|i\d+|amps|amperage)$/u,
  voltage: /^(?:.*voltage|.*spannung|volts?|u|v|u\d+|v\d+)$/u,
  speed: /^(?:.*speed|.*drehzahl|revs)$/u,
  time: /^(?:.*time|.*zeit|zeit.*|elapsed|timestamp|seconds?|sekunden?|minutes?|minuten?|sec|sek|min|hours?|stunden?|t)$/u,
  date: /^(?:date|datum|day|tag)$/u,
  event:
    /^(?:events?|ereignis(?:se)?|notes?|notiz|remarks?|bemerkung(?:en)?|comments?|kommentar|marker?|marke|status|state|faults?|fehler|störung|stoerung|alarm|message|meldung)$/u,
};

// Places a probe sits at: they make a temperature only where nothing else speaks against it.
const PLACE =
  /^(?:coil|spule|case|gehäuse|gehaeuse|motor|brake|bremse|surface|oberfläche|oberflaeche|housing|winding|wicklung|cover|deckel|probe|sensor|fühler|fuehler)$/u;

const RPM = /(?:\b|_)(?:rpm|u\/min|1\/min|r\/min|upm|min\^?-1|min⁻¹)(?![\p{L}\d])/iu;
const CLOCK = /\b(hh?:mm:ss|hh?:mm|mm?:ss)\b/iu;
const UNUSABLE_UNIT = /km\/?h|mph|m\/s|hz\b|%/iu;

const QUANTITY_OF_DIMENSION: Readonly<Record<string, MeasuredQuantity | "time">> = {
  temperature: "temperature",
  current: "current",
  voltage: "voltage",
  duration: "time",
};

const SPOKEN_ORDER: readonly ColumnQuantity[] = [
  "ambient",
  "date",
  "time",
  "temperature",
  "current",
  "voltage",
  "speed",
  "event",
];

const LONGEST_HEADING = 80;

const NOTHING: Heading = { quantity: null, unit: null, unitText: null, clockShape: null };

/** Reads a heading such as "T_case [°C]", "t_s", "Strom in mA", "Zeit (hh:mm:ss)" or "U/min". */
export function readHeading(cell: string): Heading {
  // A degree sign that went through the wrong alphabet.
  const text = plainText(cell.replace(/Â°|\uFFFD(?=[CF]\b)/gu, "°"));
  if (text === "" || text.length > LONGEST_HEADING || UNUSABLE_UNIT.test(text)) return NOTHING;
  const clock = CLOCK.exec(text)?.[1]?.toLowerCase() ?? null;
  if (clock !== null) return { ...NOTHING, quantity: "time", clockShape: clockShapeOf(clock) };
  if (RPM.test(text)) return { ...NOTHING, quantity: "speed", unitText: "rpm" };

  const framed = framedUnit(text);
  if (framed) return withUnit(measuredIn(framed.unit, wordsOf(framed.rest)), framed.unit);
  const words = wordsOf(text);
  const last = unitNamed(words.at(-1) ?? "");
  return last === null || last === "ambiguous"
    ? spoken(words)
    : spokenWithUnit(words.slice(0, -1), words, last);
}

const clockShapeOf = (text: string): Heading["clockShape"] =>
  text.length > 5 ? "hh:mm:ss" : text.endsWith("ss") ? "mm:ss" : "hh:mm";

/** A unit in brackets, behind "in" or behind a slash at the end of a heading: nothing else can be meant by it. */
function framedUnit(text: string): { unit: Unit; rest: string } | null {
  const frame = /^(.*?)(?:[[(]\s*([^\])]{1,12})\s*[\])]|\s+in\s+(\S{1,12})|\s*\/\s*(°?\p{L}{1,4}))\s*$/u.exec(
    text,
  );
  const unit = frame ? unitNamed(frame[2] ?? frame[3] ?? frame[4] ?? "") : null;
  return frame && unit !== null && unit !== "ambiguous" ? { unit, rest: frame[1] ?? "" } : null;
}

/** Words and a last word that is also a unit ("I_mA"). It is the unit only where it fits what the words say. */
function spokenWithUnit(before: readonly string[], all: readonly string[], unit: Unit): Heading {
  if (before.length === 0)
    return says(all[0] ?? "", "date") ? spoken(all) : withUnit(measuredIn(unit, []), unit);
  if (/^T_?a$/u.test(all.join("_"))) return { ...NOTHING, quantity: "ambient" };
  if (before.join("") === "T" && unit.symbol === "s") return withUnit("time", unit);
  const quantity = spoken(before).quantity;
  const measured = measuredIn(unit, before);
  if (quantity === null) return measured === "time" ? NOTHING : withUnit(measured, unit);
  return measured === quantity ? withUnit(quantity, unit) : { ...NOTHING, quantity };
}

function spoken(words: readonly string[]): Heading {
  const found = SPOKEN_ORDER.find((quantity) => words.some((word) => says(word, quantity))) ?? null;
  const quantity = found === "date" && words.some((word) => says(word, "time")) ? "time" : found;
  return { ...NOTHING, quantity: quantity ?? (words.some(isPlace) ? "temperature" : null) };
}

/** What is measured in a unit: a temperature of the air is the ambient. */
function measuredIn(unit: Unit, words: readonly string[]): ColumnQuantity | null {
  const quantity = QUANTITY_OF_DIMENSION[unit.dimension] ?? null;
  const isAir = words.some((word) => says(word, "ambient")) || words.join("_") === "T_a";
  return quantity === "temperature" && isAir ? "ambient" : quantity;
}

const withUnit = (quantity: ColumnQuantity | null, unit: Unit): Heading =>
  quantity === null ? NOTHING : { quantity, unit, unitText: unit.symbol, clockShape: null };

const wordsOf = (text: string): string[] => text.split(/[^\p{L}\d°]+/u).filter((word) => word !== "");

// A lone capital T is a temperature, a lone small t the time.
const says = (word: string, quantity: ColumnQuantity): boolean =>
  word === "T" ? quantity === "temperature" : WORDS[quantity].test(word.toLowerCase());

const isPlace = (word: string): boolean => PLACE.test(word.toLowerCase());
