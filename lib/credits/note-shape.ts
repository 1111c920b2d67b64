import { z } from "zod";
import { parseCalendarDay } from "@/lib/kernel/calendar-day";
import { CREDIT_KINDS } from "./credit-input";
import {
  allowanceShape,
  currencyCode,
  elsewhereShape,
  minorDigitsText,
  notGivenShape,
  stepShape,
  taxGroupShape,
  taxShape,
} from "./frozen-credit-shape";
import type { NoteDocument } from "./note-document";

const day = z.string().transform((text, context) => {
  const parsed = parseCalendarDay(text);
  if (parsed !== null) return parsed;
  context.addIssue({ code: "custom" });
  return z.NEVER;
});

const party = z.object({
  name: z.string(),
  legalName: z.string(),
  address: z.string(),
  country: z.string(),
  taxNumber: z.string().nullable(),
});

const line = z.object({
  ...taxShape,
  position: z.int().positive(),
  lineNumber: z.int(),
  kind: z.enum(CREDIT_KINDS),
  partNumber: z.string(),
  partName: z.string(),
  serial: z.string().nullable(),
  quantity: z.int().positive(),
  netMinor: minorDigitsText,
  invoice: z.object({ invoiceNumber: z.string(), lineNumber: z.int(), invoicedOn: day }).nullable(),
});

const noteDocument: z.ZodType<NoteDocument> = z.object({
  shape: z.literal(1),
  kind: z.enum(["credit", "counter"]),
  number: z.string(),
  issuedOn: day,
  currency: currencyCode,
  seller: party,
  buyer: party,
  accountNumber: z.string(),
  claim: z.object({ number: z.string(), filedOn: day, decidedOn: day }),
  counters: z.object({ number: z.string(), issuedOn: day }).nullable(),
  reason: z.string().nullable(),
  reasons: z.array(z.object({ lineNumber: z.int(), code: z.string(), text: z.string() })),
  lines: z.array(line),
  allowances: z.array(allowanceShape),
  taxGroups: z.array(taxGroupShape),
  linesMinor: minorDigitsText,
  netMinor: minorDigitsText,
  taxMinor: minorDigitsText,
  totalMinor: minorDigitsText,
  elsewhere: z.array(elsewhereShape),
  notGiven: z.array(notGivenShape),
  explained: z.array(
    z.object({ lineNumber: z.int(), kind: z.enum(CREDIT_KINDS), steps: z.array(stepShape) }),
  ),
  steps: z.array(stepShape),
});

/** A note as it was issued. Throws where what was kept does not fit: it was made by `noteDocument` and never changed. */
export const thawedNote = (kept: unknown): NoteDocument => noteDocument.parse(kept);
