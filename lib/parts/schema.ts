import { z } from "zod";

/** Parts on one page of the catalogue. */
export const CATALOGUE_PAGE_SIZE = 50;

/** What the catalogue may say was just done. */
const NOTES = ["partAdded", "partChanged"] as const;

/** The state of the catalogue as it stands in the address; what cannot be read falls back to the first page. */
export const catalogueQuery = z.object({
  q: z.string().max(80).default("").catch(""),
  page: z.coerce.number().int().min(1).max(2000).default(1).catch(1),
  note: z.enum(NOTES).optional().catch(undefined),
});
export type CatalogueQuery = z.infer<typeof catalogueQuery>;

const oneLine = (text: string) => text.replace(/\s+/gu, " ").trim();
const line = (most: number) =>
  z.string().max(500, "tooLong").transform(oneLine).pipe(z.string().max(most, "tooLong"));
const neededLine = (most: number) => line(most).pipe(z.string().min(1, "missing"));
const partNumber = neededLine(40);

/** How units of a part are told apart: each by its serial, or not at all. */
const TRACKING = ["serial", "counted"] as const;

export const newPartInput = z.strictObject({
  partNumber,
  name: neededLine(120),
  family: z.string().min(1, "missing").max(40),
  maker: neededLine(120),
  tracking: z.enum(TRACKING, "missing"),
  supersededBy: line(40).default(""),
  back: z.string().max(500).default(""),
});
export type NewPart = z.infer<typeof newPartInput>;

export const changedPartInput = z.strictObject({
  partNumber,
  name: neededLine(120),
  supersededBy: line(40).default(""),
});
export type ChangedPart = z.infer<typeof changedPartInput>;
