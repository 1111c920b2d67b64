import type { Dimension } from "@/lib/parts/family";
import { plainText } from "./plain-text";

/**
 * A unit a person or a logger may write. A value in it times `factor` plus `offset` is the value in the base unit
 * of its dimension: ohm, V, A, °C, mm, km, s, Ah.
 */
export type Unit = {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly factor: number;
  readonly offset: number;
};

const unit = (dimension: Dimension, symbol: string, scale: Partial<Unit> = {}): Unit => ({
  symbol,
  dimension,
  factor: 1,
  offset: 0,
  ...scale,
});

const UNITS = {
  ohm: unit("resistance", "ohm"),
  milliohm: unit("resistance", "mohm", { factor: 1e-3 }),
  kiloohm: unit("resistance", "kohm", { factor: 1e3 }),
  megaohm: unit("resistance", "Mohm", { factor: 1e6 }),
  volt: unit("voltage", "V"),
  millivolt: unit("voltage", "mV", { factor: 1e-3 }),
  ampere: unit("current", "A"),
  milliampere: unit("current", "mA", { factor: 1e-3 }),
  celsius: unit("temperature", "°C"),
  fahrenheit: unit("temperature", "°F", { factor: 5 / 9, offset: -160 / 9 }),
  kelvin: unit("temperature", "K", { factor: 1, offset: -273.15 }),
  millimetre: unit("length", "mm"),
  centimetre: unit("length", "cm", { factor: 10 }),
  micrometre: unit("length", "um", { factor: 1e-3 }),
  kilometre: unit("distance", "km"),
  mile: unit("distance", "mi", { factor: 1.609344 }),
  millisecond: unit("duration", "ms", { factor: 1e-3 }),
  second: unit("duration", "s"),
  minute: unit("duration", "min", { factor: 60 }),
  hour: unit("duration", "h", { factor: 3600 }),
  day: unit("duration", "d", { factor: 86_400 }),
  ampereHour: unit("charge", "Ah"),
  milliampereHour: unit("charge", "mAh", { factor: 1e-3 }),
} as const;

// Spellings that mean one unit whatever their capitals.
const ANY_CASE: Readonly<Record<string, Unit>> = {
  ohm: UNITS.ohm,
  ohms: UNITS.ohm,
  ω: UNITS.ohm,
  milliohm: UNITS.milliohm,
  kohm: UNITS.kiloohm,
  kiloohm: UNITS.kiloohm,
  kω: UNITS.kiloohm,
  megohm: UNITS.megaohm,
  megaohm: UNITS.megaohm,
  v: UNITS.volt,
  volt: UNITS.volt,
  volts: UNITS.volt,
  a: UNITS.ampere,
  amp: UNITS.ampere,
  amps: UNITS.ampere,
  ampere: UNITS.ampere,
  "°c": UNITS.celsius,
  c: UNITS.celsius,
  degc: UNITS.celsius,
  "grad c": UNITS.celsius,
  celsius: UNITS.celsius,
  "°f": UNITS.fahrenheit,
  f: UNITS.fahrenheit,
  degf: UNITS.fahrenheit,
  fahrenheit: UNITS.fahrenheit,
  kelvin: UNITS.kelvin,
  mm: UNITS.millimetre,
  cm: UNITS.centimetre,
  um: UNITS.micrometre,
  μm: UNITS.micrometre,
  km: UNITS.kilometre,
  mi: UNITS.mile,
  miles: UNITS.mile,
  msec: UNITS.millisecond,
  s: UNITS.second,
  sec: UNITS.second,
  sek: UNITS.second,
  second: UNITS.second,
  seconds: UNITS.second,
  sekunde: UNITS.second,
  sekunden: UNITS.second,
  min: UNITS.minute,
  mins: UNITS.minute,
  minute: UNITS.minute,
  minutes: UNITS.minute,
  minuten: UNITS.minute,
  h: UNITS.hour,
  hr: UNITS.hour,
  hrs: UNITS.hour,
  hour: UNITS.hour,
  hours: UNITS.hour,
  std: UNITS.hour,
  stunde: UNITS.hour,
  stunden: UNITS.hour,
  d: UNITS.day,
  day: UNITS.day,
  days: UNITS.day,
  tag: UNITS.day,
  tage: UNITS.day,
  ah: UNITS.ampereHour,
};

// Where a capital M would turn "a thousandth" into "a million", capitals decide.
const EXACT_CASE: Readonly<Record<string, Unit>> = {
  mohm: UNITS.milliohm,
  mΩ: UNITS.milliohm,
  Mohm: UNITS.megaohm,
  MOhm: UNITS.megaohm,
  MΩ: UNITS.megaohm,
  mV: UNITS.millivolt,
  mv: UNITS.millivolt,
  mA: UNITS.milliampere,
  ma: UNITS.milliampere,
  mAh: UNITS.milliampereHour,
  mah: UNITS.milliampereHour,
  ms: UNITS.millisecond,
  K: UNITS.kelvin,
};

/** The unit a text names; "ambiguous" where its capitals leave milli or mega open (MOHM, MV); null where unknown. */
export function unitNamed(text: string): Unit | "ambiguous" | null {
  const name = plainText(text);
  if (Object.hasOwn(EXACT_CASE, name)) return EXACT_CASE[name] ?? null;
  const folded = name.toLowerCase();
  if (Object.hasOwn(ANY_CASE, folded)) return ANY_CASE[folded] ?? null;
  return Object.keys(EXACT_CASE).some((known) => known.toLowerCase() === folded) ? "ambiguous" : null;
}

// Twelve digits are far beyond any meter and drop the noise of binary fractions (0.32 * 1000).
const tidy = (value: number): number => Number(value.toPrecision(12));

/** A value in one unit, written in another of the same dimension. */
export const inUnit = (value: number, from: Unit, to: Unit): number =>
  from === to ? value : tidy((value * from.factor + from.offset - to.offset) / to.factor);

/** A value in the base unit of its dimension (s, °C, A, V, ohm, mm, km, Ah). */
export const inBaseUnit = (value: number, from: Unit): number =>
  from.factor === 1 && from.offset === 0 ? value : tidy(value * from.factor + from.offset);
