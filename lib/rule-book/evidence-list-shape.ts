import { z } from "zod";
import { code } from "./shape-parts";

const EVIDENCE_NEEDS = ["required", "useful", "notNeeded"] as const;
const EVIDENCE_KINDS = ["photo", "runLog", "reading", "answer", "document"] as const;

/** One thing a claim must or may show. `why` names the sentence that says why an assessor needs it. */
const row = z
  .strictObject({
    id: code,
    need: z.enum(EVIDENCE_NEEDS),
    accepts: z.enum(EVIDENCE_KINDS),
    readingKind: code.nullable(),
    why: code,
  })
  .refine(
    ({ accepts, readingKind }) => (accepts === "reading") === (readingKind !== null),
    "readingKindNeeded",
  );

const noneTwice = (ids: readonly string[]): boolean => new Set(ids).size === ids.length;

const rows = z
  .array(row)
  .max(40)
  .refine((list) => noneTwice(list.map((one) => one.id)), "rowTwice");

/** What claims of one family must show: a list for every symptom, or lists for some symptoms that stand in its place. */
export const evidenceListShape = z.strictObject({
  rows,
  bySymptom: z
    .array(z.strictObject({ symptom: code, rows }))
    .max(40)
    .refine((lists) => noneTwice(lists.map((one) => one.symptom)), "symptomTwice"),
});

export type EvidenceList = z.infer<typeof evidenceListShape>;
export type EvidenceRow = z.infer<typeof row>;

/** The rows for a symptom: its own list where there is one, else the family's. */
export const evidenceRowsFor = (list: EvidenceList, symptom: string): readonly EvidenceRow[] =>
  list.bySymptom.find((one) => one.symptom === symptom)?.rows ?? list.rows;
