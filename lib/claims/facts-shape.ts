import { z } from "zod";

const day = z.iso.date();
const minor = z.string().regex(/^\d{1,18}$/);

const factLine = z.strictObject({
  lineNumber: z.int().positive(),
  part: z.strictObject({ id: z.uuid(), number: z.string(), name: z.string() }),
  unit: z.strictObject({ id: z.uuid(), serial: z.string(), batch: z.string().nullable() }).nullable(),
  serialTyped: z.string().nullable(),
  invoiceLine: z
    .strictObject({
      id: z.uuid(),
      invoiceNumber: z.string(),
      lineNumber: z.int(),
      invoicedOn: day,
      shippedOn: day,
      unitPriceMinor: minor,
      currency: z.string().length(3),
    })
    .nullable(),
  quantity: z.int().positive(),
  position: z.enum(["left", "right", "single"]),
  fittedOn: day.nullable(),
  installer: z.strictObject({ id: z.uuid(), code: z.string() }).nullable(),
  replacement: z
    .strictObject({ serial: z.string(), unitId: z.uuid().nullable(), fittedOn: day.nullable() })
    .nullable(),
  askedMinor: minor,
});

/**
 * What a claim contained when it was sent: frozen, hashed, never changed. Money in minor units as digits, days as
 * `YYYY-MM-DD`, readings with the text as typed beside the canonical value. An installer is a code: the name stays
 * with the workshop.
 */
export const claimFacts = z.strictObject({
  shape: z.literal(1),
  filedOn: day,
  family: z.string(),
  symptom: z.string(),
  note: z.string(),
  failedOn: day,
  repairedOn: day.nullable(),
  vehicle: z.strictObject({ frameSerial: z.string(), model: z.string() }),
  lines: z.array(factLine).min(1).max(8),
  readings: z.array(
    z.strictObject({
      rowId: z.string(),
      kind: z.string(),
      rawText: z.string(),
      unit: z.string(),
      // Null: the meter showed an open circuit, which is evidence and no number.
      canonicalValue: z.number().nullable(),
      temperatureCelsius: z.number().nullable(),
      instrument: z.string(),
    }),
  ),
  answers: z.array(z.strictObject({ rowId: z.string(), text: z.string() })),
  cannotGet: z.array(z.strictObject({ rowId: z.string(), reason: z.string() })),
  ruledOut: z.array(z.strictObject({ itemId: z.string(), note: z.string() })),
  condition: z.array(z.strictObject({ itemId: z.string(), found: z.boolean() })),
  conditionNote: z.string(),
  earlierWork: z.string(),
  swap: z
    .strictObject({
      minutes: z.number().nullable(),
      abnormalHeat: z.boolean().nullable(),
      testDrive: z.boolean().nullable(),
    })
    .nullable(),
  incident: z.strictObject({ note: z.string() }).nullable(),
  /** What is asked for besides the part; absent where nothing is. */
  asked: z
    .strictObject({
      labourMinutes: z.int().min(0).max(6000),
      diagnosisMinor: minor,
      consumablesMinor: minor,
      carriageMinor: minor,
    })
    .optional(),
  evidence: z.array(
    z.strictObject({
      id: z.uuid(),
      rowId: z.string(),
      kind: z.enum(["photo", "runLog", "document"]),
      sha256: z.string().length(64),
      originalName: z.string(),
    }),
  ),
  evidenceListId: z.uuid().nullable(),
});

export type ClaimFacts = z.infer<typeof claimFacts>;
export type AskedBesides = NonNullable<ClaimFacts["asked"]>;
export type FactLine = ClaimFacts["lines"][number];

/** The one text of some facts: keys in order, no spaces, so that the same facts always have the same hash. */
export function canonicalText(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalText).join(",")}]`;
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${entries.map(([key, inner]) => `${JSON.stringify(key)}:${canonicalText(inner)}`).join(",")}}`;
}
