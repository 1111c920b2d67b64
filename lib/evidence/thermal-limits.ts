/**
 * Insulation classes with their limit and the mean rise permitted by the resistance method over 40 °C air, in K.
 * Limits of all and rises of 130, 155 and 180 as makers' manuals quote the rotating-machine standard; rises of 105
 * and 120 from memory. Defaults for the Rule book, which carries the figure that counts for a part.
 */
export const INSULATION_CLASSES = {
  "105 (A)": { limitCelsius: 105, riseKelvin: 60 },
  "120 (E)": { limitCelsius: 120, riseKelvin: 75 },
  "130 (B)": { limitCelsius: 130, riseKelvin: 80 },
  "155 (F)": { limitCelsius: 155, riseKelvin: 105 },
  "180 (H)": { limitCelsius: 180, riseKelvin: 125 },
} as const;
export type InsulationClass = keyof typeof INSULATION_CLASSES;

/** What the hottest spot lies above the mean at 40 °C air, in K: limit - 40 - rise. */
export const hotSpotMarginKelvin = (insulation: InsulationClass): number =>
  INSULATION_CLASSES[insulation].limitCelsius - 40 - INSULATION_CLASSES[insulation].riseKelvin;

/** Highest mean winding temperature a class permits in air of that temperature, in °C. */
export const permittedMeanCelsius = (insulation: InsulationClass, ambientCelsius = 40): number =>
  INSULATION_CLASSES[insulation].riseKelvin + ambientCelsius;

/** Rule of thumb (from memory): insulation life halves per 10 K above its limit and doubles per 10 K below. */
export const insulationLifeFactor = (kelvinAboveLimit: number): number => 2 ** (-kelvinAboveLimit / 10);

/** Touched surfaces by material. The figures are burn thresholds, from memory, for a caution alone. */
export const TOUCH_MATERIALS = ["bareMetal", "coatedMetal", "ceramic", "plastic", "wood"] as const;
export type TouchMaterial = (typeof TOUCH_MATERIALS)[number];

export type TouchContact = "oneMinute" | "tenMinutes" | "eightHours";

/**
 * Burn thresholds in °C after ISO 13732-1, all from memory except 48 °C for ten minutes on bare metal. Below a
 * minute the standard gives bands by material, not single figures, so they are left out. A warning, never a
 * statement that a part is safe.
 */
const TOUCH_THRESHOLDS: Readonly<Record<TouchMaterial, Readonly<Record<TouchContact, number>>>> = {
  bareMetal: { oneMinute: 51, tenMinutes: 48, eightHours: 43 },
  coatedMetal: { oneMinute: 51, tenMinutes: 48, eightHours: 43 },
  ceramic: { oneMinute: 56, tenMinutes: 48, eightHours: 43 },
  plastic: { oneMinute: 60, tenMinutes: 48, eightHours: 43 },
  wood: { oneMinute: 60, tenMinutes: 48, eightHours: 43 },
};

const CONTACTS_SHORTEST_FIRST: readonly TouchContact[] = ["oneMinute", "tenMinutes", "eightHours"];

/** The shortest contact time at which a surface is over its threshold, or null where it is under all of them. */
export const contactWarning = (material: TouchMaterial, surfaceCelsius: number): TouchContact | null =>
  CONTACTS_SHORTEST_FIRST.find((contact) => surfaceCelsius >= TOUCH_THRESHOLDS[material][contact]) ?? null;

/** Where the product warns: a leg or hand may rest on a cover, and the rider may not feel it. */
const TOUCH_CAUTION = { warnFromCelsius: 48, alarmFromCelsius: 60 } as const;

/** The grade of caution a surface temperature earns; both limits are part of their grade. */
export const touchCaution = (surfaceCelsius: number): "none" | "warn" | "alarm" =>
  surfaceCelsius >= TOUCH_CAUTION.alarmFromCelsius
    ? "alarm"
    : surfaceCelsius >= TOUCH_CAUTION.warnFromCelsius
      ? "warn"
      : "none";
