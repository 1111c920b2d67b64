import {
  compareFractions,
  equalFractions,
  fraction,
  fractionFrom,
  type Fraction,
} from "@/lib/kernel/fraction";

/** Categories of EN 16931 (a part of UNCL5305) in which parts are invoiced: S is taxed, the others bear no tax. */
export const TAX_CATEGORIES = ["S", "Z", "E", "AE", "K", "G", "O"] as const;
export type TaxCategory = (typeof TAX_CATEGORIES)[number];

/** How an amount is taxed; the rate is per cent as text, for example "20.000". */
export type TaxTreatment = {
  readonly taxCategory: TaxCategory;
  readonly taxRate: string;
  readonly exemptionReason: string | null;
};

/** One row of the tax breakdown: what one category and rate adds up to on the document, and the tax on it. */
export type TaxGroup = TaxTreatment & { readonly baseMinor: bigint; readonly taxMinor: bigint };

/** The share a rate of so many per cent takes: 1/5 for "20.000". Throws RangeError for what is no rate. */
export const rateShare = (taxRate: string): Fraction => {
  const { numerator, denominator } = fractionFrom(taxRate);
  return fraction(numerator, denominator * 100n);
};

/** True for amounts that are taxed together: one category and one rate, however the rate is written. */
export const taxedAlike = (a: TaxTreatment, b: TaxTreatment): boolean =>
  a.taxCategory === b.taxCategory && equalFractions(fractionFrom(a.taxRate), fractionFrom(b.taxRate));

/** The order of groups on a document: by category, then the higher rate first; never by which line came first. */
export const compareTax = (a: TaxTreatment, b: TaxTreatment): number =>
  TAX_CATEGORIES.indexOf(a.taxCategory) - TAX_CATEGORIES.indexOf(b.taxCategory) ||
  compareFractions(fractionFrom(b.taxRate), fractionFrom(a.taxRate));
