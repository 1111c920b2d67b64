import type { ClaimDraft } from "@/lib/claims/draft";
import type { Chance } from "../random";
import { ORGANISATIONS } from "../story/organisations";
import type { Case } from "./case";

type Typed = ClaimDraft["readings"][string];

/** A figure in the unit of its kind, as many decimals as a meter shows, and whether the air belongs beside it. */
type Figure = {
  readonly value: number;
  readonly places: number;
  readonly withTemperature?: boolean;
  readonly unit?: string;
};

type Known = { readonly one: Case; readonly draw: Chance; readonly roomCelsius: number };

const COPPER_K = 235;
/** Copper as the meter shows it at the temperature of the room: R = R20 (235 + T)/255. */
const copper = (ohmAt20: number, { roomCelsius }: Known): Figure => ({
  value: (ohmAt20 * (COPPER_K + roomCelsius)) / (COPPER_K + 20),
  places: ohmAt20 < 10 ? 2 : 1,
  withTemperature: true,
});

const rated = ({ one }: Known, name: string, otherwise: number): number => {
  const value = one.lines[0].part.rated[name];
  return typeof value === "number" ? value : otherwise;
};

const isBad = ({ one }: Known): boolean =>
  one.lines[0].unit?.batch.role === "bad" || one.twist === "heldElsewhere";

/** What a meter shows on the failed part, by kind of reading. */
const FIGURES: Readonly<Record<string, (known: Known) => Figure>> = {
  // Wound too thin, a coil of the bad batch still lies within its tolerance when cold.
  coilResistance: (known) =>
    copper(
      rated(known, "coilOhm", 57.6) *
        (isBad(known) ? known.draw.between(1.03, 1.07) : known.draw.between(0.97, 1.04)),
      known,
    ),
  releaseVoltage: (known) => ({
    value: isBad(known)
      ? known.draw.between(17.6, 19.2)
      : rated(known, "releaseVoltageV", 15) + known.draw.between(-0.8, 1),
    places: 1,
    withTemperature: true,
  }),
  voltageUnderLoad: ({ draw }) => ({ value: draw.between(23.8, 25.2), places: 1 }),
  airGap: ({ draw }) => ({ value: draw.between(0.18, 0.36), places: 2 }),
  noLoadCurrent: ({ draw }) => ({ value: draw.between(3.9, 6.4), places: 1 }),
  windingResistance: (known) => copper(rated(known, "windingOhm", 1) * known.draw.between(0.72, 0.88), known),
  otherSideResistance: (known) =>
    copper(rated(known, "windingOhm", 1) * known.draw.between(0.97, 1.04), known),
  surfaceTemperature: ({ draw }) => ({ value: draw.between(58, 83), places: 0 }),
  runningHours: ({ draw }) => ({ value: draw.between(90, 900), places: 0 }),
  distance: ({ draw }) => ({ value: draw.between(140, 2100), places: 0 }),
  brakeCoilResistance: (known) => copper(57.6 * known.draw.between(0.97, 1.03), known),
  openVoltage: ({ one, draw }) => ({
    value: one.symptom === "dead" ? draw.between(0, 0.4) : draw.between(27, 28.6),
    places: 1,
  }),
  chargeCurrent: ({ one, draw }) => ({
    value: one.symptom === "dead" ? 0 : draw.between(0.3, 0.7),
    places: 1,
  }),
  restVoltageFirst: ({ draw }) => ({ value: draw.between(12.6, 12.95), places: 2, withTemperature: true }),
  restVoltageSecond: ({ draw }) => ({ value: draw.between(11.7, 12.1), places: 2, withTemperature: true }),
  capacityGiven: (known) => ({
    value: rated(known, "capacityAh", 36) * known.draw.between(0.58, 0.74),
    places: 1,
    withTemperature: true,
  }),
  storageTime: ({ draw }) => ({ value: draw.between(5, 60), places: 0, unit: " d" }),
  trackResistance: ({ draw }) => ({ value: draw.between(4.6, 5.3), places: 2, unit: " kohm" }),
};

const ROOM: readonly [number, number] = [17, 24];
const INSTRUMENTS = {
  en: ["Bench meter 2", "Hand meter", "Clamp meter"],
  de: ["Tischgerät 1", "Handmessgerät"],
} as const;

/** A reading as somebody typed it on the pad: decimal comma or point by language, the room beside it where it matters. */
export function typedReading(kind: string, one: Case, chance: Chance): Typed {
  const draw = chance.fork(`reading ${kind} ${one.key}`);
  const { language } = ORGANISATIONS[one.workshop];
  const roomCelsius = Math.round(draw.between(...ROOM));
  const figure = FIGURES[kind]?.({ one, draw, roomCelsius }) ?? { value: draw.between(1, 9), places: 1 };
  const number = figure.value.toFixed(figure.places);
  return {
    raw: (language === "de" ? number.replace(".", ",") : number) + (figure.unit ?? ""),
    temperature: figure.withTemperature ? String(roomCelsius) : "",
    instrument: draw.pick<string>(INSTRUMENTS[language]),
  };
}
