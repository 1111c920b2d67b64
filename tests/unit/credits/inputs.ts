import { creditFor, type Credit, type CreditInput, type CreditLineInput } from "@/lib/credits/credit";
import type { InvoicedLine } from "@/lib/credits/credit";
import { fraction, ONE } from "@/lib/kernel/fraction";
import type { Terms } from "@/lib/rule-book/terms-shape";
import { termsWith } from "../coverage/facts";

/** A motor at 218.33, taxed at 20 %; one piece, nothing given back yet. */
export const invoiced = (change: Partial<InvoicedLine> = {}): InvoicedLine => ({
  invoiceNumber: "R-1001",
  lineNumber: 4,
  unitPriceMinor: 218_33n,
  lineNetMinor: 218_33n,
  alreadyCreditedMinor: 0n,
  taxCategory: "S",
  taxRate: "20.000",
  exemptionReason: null,
  ...change,
});

/** Terms in pounds: 24 months in a straight line, labour for 12 at 48.00 an hour and 45 minutes, caps 20, 5 and 12. */
export const terms = (change: Partial<Terms> = {}, version = "Rule 4, 1 January 2025") =>
  termsWith(change, version);

/** Upheld whole, 8 months used, nothing asked besides the part. */
export const lineWith = (change: Partial<CreditLineInput> = {}): CreditLineInput => ({
  lineNumber: 1,
  outcome: "upheld",
  invoice: invoiced(),
  typedPrice: null,
  quantity: 1,
  monthsUsed: 8,
  coverTerms: terms(),
  repairTerms: terms({}, "Rule 5, 1 January 2026"),
  labourAskedMinutes: 0,
  diagnosisAskedMinor: 0n,
  consumablesAskedMinor: 0n,
  carriageAskedMinor: 0n,
  lateFiling: null,
  attribution: { shares: { maker: "1" }, creditedShare: ONE },
  goodwill: false,
  ...change,
});

export const inputWith = (
  lines: readonly CreditLineInput[],
  change: Partial<CreditInput> = {},
): CreditInput => ({
  currency: "GBP",
  rounding: "halfUp",
  lines,
  claimCapMinor: null,
  handling: null,
  ...change,
});

/** Half on maker and carrier, half on the user. */
export const halved = {
  outcome: "upheldInPart",
  attribution: { shares: { maker: "1/3", carrier: "1/6", user: "1/2" }, creditedShare: fraction(1, 2) },
} as const;

/** The net of each line by its kind. */
export const nets = ({ lines }: Credit) => lines.map(({ kind, netMinor }) => [kind, netMinor]);
/** What was taken, with its reason. */
export const lost = ({ notGiven }: Credit) =>
  notGiven.map(({ reason, askedMinor, givenMinor }) => [reason, askedMinor, givenMinor]);
/** Rules and printed results of one line. */
export const ruled = ({ lines }: Credit, place = 0) =>
  (lines[place]?.steps ?? []).map(({ rule, result }) => [rule, result]);
/** The credit of a claim with one line. */
export const one = (change: Partial<CreditLineInput>, more: Parameters<typeof inputWith>[1] = {}) =>
  creditFor(inputWith([lineWith(change)], more));
