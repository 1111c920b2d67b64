import { z } from "zod";
import { ALLOCATION_WAYS } from "@/lib/credits/ledger";
import { isNoteNumber, ISSUE_REFUSALS, NOTE_VIEWS } from "./views";

/** The number of a note as it is printed. */
const noteNumber = z.string().trim().refine(isNoteNumber);

/** One claim to issue a note for, and how many notes it had when the page was drawn: `41073826.0`. */
const toIssue = z
  .string()
  .regex(/^\d{8}\.\d{1,3}$/u)
  .transform((text) => ({ number: text.slice(0, 8), issuedBefore: Number(text.slice(9)) }));

export const issueInput = z.strictObject({ claims: z.array(toIssue).min(1, "nothingTicked").max(100) });
export type IssueOne = z.infer<typeof toIssue>;

export const allocateInput = z.strictObject({
  number: noteNumber,
  how: z.enum(ALLOCATION_WAYS, "missing"),
  amount: z.string().trim().min(1, "missing").max(24, "tooLong"),
  reference: z.string().trim().min(1, "missing").max(80, "tooLong"),
  /** How many allocations the note had when the page was drawn: pressed twice, it is allocated once. */
  rowsBefore: z.coerce.number().int().min(0).max(100_000),
});
export type AllocateInput = z.infer<typeof allocateInput>;

export const takeBackInput = z.strictObject({ number: noteNumber, allocationId: z.uuid() });
export type TakeBackInput = z.infer<typeof takeBackInput>;

export const counterInput = z.strictObject({
  number: noteNumber,
  reason: z.string().trim().min(1, "missing").max(1000, "tooLong"),
});
export type CounterInput = z.infer<typeof counterInput>;

/** Whose note an address means; a workshop may have two of one number. */
export const noteQuery = z.object({
  of: z
    .union([z.uuid(), z.literal("")])
    .default("")
    .catch(""),
});

const before = z
  .string()
  .regex(/^\d{1,18}$/u)
  .optional()
  .catch(undefined);

export const notesQuery = z.object({
  view: z.enum(NOTE_VIEWS).optional().catch(undefined),
  /** The day and the number of the last note of the page before. */
  before: z
    .string()
    .regex(/^\d{4}-\d\d-\d\d\.\d{1,9}$/u)
    .optional()
    .catch(undefined),
});

const refusedOne = z
  .string()
  .regex(/^\d{8}\.[A-Za-z]+$/u)
  .transform((text) => ({ number: text.slice(0, 8), code: text.slice(9) }))
  .pipe(z.object({ number: z.string(), code: z.enum(ISSUE_REFUSALS) }));
const list = z
  .string()
  .max(4000)
  .default("")
  .transform((text) => text.split(",").filter((one) => one !== ""));

/** What the page of credits was just told: the notes that were issued, and the claims that were refused. */
export const issuedQuery = z.object({
  done: list.pipe(z.array(noteNumber)).catch([]),
  refused: list.pipe(z.array(refusedOne)).catch([]),
});

export const bookQuery = z.object({
  workshop: z
    .union([z.uuid(), z.literal("")])
    .default("")
    .catch(""),
  month: z
    .union([z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/u), z.literal("")])
    .default("")
    .catch(""),
  /** The number of the last entry of the page before. */
  before,
});
export type BookQuery = z.infer<typeof bookQuery>;
