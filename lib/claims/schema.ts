import { z } from "zod";

const id = z.union([z.uuid(), z.literal("")]).default("");

/** What a claim starts from: a unit found by its serial, a purchase without serial, or a part chosen by hand. */
export const draftStartInput = z.strictObject({
  unitId: id,
  invoiceLineId: id,
  accountId: id,
  partId: id,
  serial: z.string().max(80).default(""),
});
export type DraftStart = z.infer<typeof draftStartInput>;

/** The eight digits of a claim, however they were typed. */
export const claimNumberInput = z
  .string()
  .transform((text) => text.replace(/\D/gu, ""))
  .pipe(z.string().regex(/^\d{8}$/u));

const reason = z.string().trim().min(1, "missing").max(4000, "tooLong");

export const claimInput = z.strictObject({ number: claimNumberInput });
export const reasonedInput = z.strictObject({ number: claimNumberInput, reason });
export const parkInput = z.strictObject({
  number: claimNumberInput,
  colleagueId: z.uuid(),
  question: reason,
});
export const askInput = z.strictObject({
  number: claimNumberInput,
  question: reason,
  rowIds: z.array(z.string().max(60)).max(40).default([]),
});
