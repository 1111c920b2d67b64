import { z } from "zod";
import { COLUMN_KEYS } from "./columns";

/** Which file is to be imported. */
export const importInput = z.object({ importId: z.uuid() });

const amount = z.object({ minor: z.string().regex(/^\d+$/u), currency: z.string().length(3) });

/** What an import wrote. */
export const importResult = z.object({
  invoiceLines: z.number(),
  units: z.number(),
  batches: z.number(),
  unchanged: z.number(),
  sums: z.array(amount),
});
export type ImportResult = z.infer<typeof importResult>;

/** How a file was read, and what came of it; kept with it. */
export const storedMapping = z.object({
  delimiter: z.string(),
  encoding: z.enum(["utf-8", "windows-1252"]),
  columns: z.array(z.enum(COLUMN_KEYS)),
  unread: z.array(z.string()),
  result: importResult.optional(),
});
export type StoredMapping = z.infer<typeof storedMapping>;

/** Why a file was not taken. The page says it again from its address, so that the form works without script. */
export const IMPORT_REFUSALS = [
  "notAllowed",
  "fileMissing",
  "fileEmpty",
  "importTooBig",
  "importNotCsv",
  "uploadBroken",
  "uploadTooMany",
  "importNotText",
  "importWithoutLines",
  "importQuoteOpen",
  "importLineTooLong",
  "importTooManyLines",
  "importTooManyColumns",
  "importColumnsMissing",
  "importColumnTwice",
] as const;
export type ImportRefusal = (typeof IMPORT_REFUSALS)[number];

const words = z.string().max(400).catch("");
const figure = z.coerce.number().catch(0);

/** A refusal as it stands in the address of the page. */
export const refusedQuery = z.object({
  refused: z.enum(IMPORT_REFUSALS).optional().catch(undefined),
  name: words,
  columns: words,
  first: words,
  second: words,
  line: figure,
  most: figure,
  limitMb: figure,
});
