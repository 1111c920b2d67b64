import { z } from "zod";
import { code, share, sourceNote } from "./shape-parts";

/** Insulation classes as labels write them, by limit in °C. */
const INSULATION_CODES = ["105 (A)", "120 (E)", "130 (B)", "155 (F)", "180 (H)"] as const;

/** What is usual for one kind of reading, both ends included; null leaves an end open. In the kind's own unit. */
const readingLimit = z
  .strictObject({
    readingKind: code,
    low: z.number().nullable(),
    high: z.number().nullable(),
    unit: z.string().max(12),
    source: sourceNote,
  })
  .refine(({ low, high }) => low === null || high === null || low <= high, "limitsCrossed");

/** A caution about a hot surface: a warning, never a statement that a part is safe. */
const surfaceCaution = z.strictObject({
  grade: z.enum(["warn", "alarm"]),
  fromCelsius: z.number().min(-60).max(1000),
  source: sourceNote,
});

/** Limits of readings for a part or a family; which of the two stands on the version, not in its body. */
export const limitsShape = z.strictObject({
  readings: z
    .array(readingLimit)
    .max(60)
    .refine((list) => new Set(list.map((one) => one.readingKind)).size === list.length, "readingKindTwice"),
  surfaceCautions: z.array(surfaceCaution).max(6),
  insulationClass: z.enum(INSULATION_CODES).nullable(),
  /** Coil or winding at 20 °C with its tolerance to either side as a share of it. */
  coil: z
    .strictObject({ ratedOhm: z.number().positive(), toleranceFraction: share, source: sourceNote })
    .nullable(),
});

export type Limits = z.infer<typeof limitsShape>;
