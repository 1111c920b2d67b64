import { z } from "zod";
import { currencyFrom, isCurrency } from "@/lib/kernel/currency";
import type { Credit } from "./credit";
import { CREDIT_KINDS, SETTLEMENTS } from "./credit-input";
import { NOT_GIVEN_REASONS } from "./steps";
import { TAX_CATEGORIES } from "./tax";

/** A whole amount in minor units, kept as digits: JSON has no integers of that size. */
export const minorDigitsText = z
  .string()
  .regex(/^-?\d{1,18}$/u)
  .transform((digits) => BigInt(digits));
export const currencyCode = z.string().refine(isCurrency).transform(currencyFrom);

export const stepShape = z
  .object({
    rule: z.string(),
    input: z.record(z.string(), z.union([z.string(), z.number()])),
    result: z.string(),
    source: z.string().optional(),
  })
  .transform(({ source, ...step }) => (source === undefined ? step : { ...step, source }));

export const taxShape = {
  taxCategory: z.enum(TAX_CATEGORIES),
  taxRate: z.string(),
  exemptionReason: z.string().nullable(),
};
export const taxGroupShape = z.object({
  ...taxShape,
  baseMinor: minorDigitsText,
  taxMinor: minorDigitsText,
});
export const allowanceShape = z.object({ ...taxShape, amountMinor: minorDigitsText, reason: z.string() });
export const elsewhereShape = z.object({ settledBy: z.enum(SETTLEMENTS), netMinor: minorDigitsText });
export const notGivenShape = z.object({
  lineNumber: z.int(),
  kind: z.enum(CREDIT_KINDS),
  askedMinor: minorDigitsText,
  givenMinor: minorDigitsText,
  reason: z.enum(NOT_GIVEN_REASONS),
});

const creditLine = z.object({
  lineNumber: z.int(),
  kind: z.enum(CREDIT_KINDS),
  settledBy: z.enum(SETTLEMENTS),
  askedMinor: minorDigitsText,
  netMinor: minorDigitsText,
  taxCategory: z.enum(TAX_CATEGORIES).nullable(),
  taxRate: z.string().nullable(),
  exemptionReason: z.string().nullable(),
  invoice: z.object({ invoiceNumber: z.string(), lineNumber: z.int() }).nullable(),
  steps: z.array(stepShape),
});

/** A credit as a verdict keeps it: word for word what was reckoned, amounts as digits. */
const frozenCredit: z.ZodType<Credit> = z.object({
  currency: currencyCode,
  rounding: z.enum(["halfUp", "halfEven"]),
  lines: z.array(creditLine),
  linesMinor: minorDigitsText,
  allowances: z.array(allowanceShape),
  separateCharge: z.object({ amountMinor: minorDigitsText, reason: z.string() }).nullable(),
  netMinor: minorDigitsText,
  taxGroups: z.array(taxGroupShape),
  taxMinor: minorDigitsText,
  totalMinor: minorDigitsText,
  elsewhere: z.array(elsewhereShape),
  steps: z.array(stepShape),
  notGiven: z.array(notGivenShape),
});

/** The text a credit or a document is kept as. */
export const frozenText = (value: unknown): string =>
  JSON.stringify(value, (_name, inner: unknown) => (typeof inner === "bigint" ? String(inner) : inner));

/** The credit a verdict was kept with; null for one from before credits were reckoned. Throws where it does not fit. */
export const thawedCredit = (kept: unknown): Credit | null =>
  kept === null || kept === undefined ? null : frozenCredit.parse(kept);
