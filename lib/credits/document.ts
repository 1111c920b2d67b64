import { fraction, multiplyFractions, ONE, type Fraction } from "@/lib/kernel/fraction";
import type { Rounding } from "@/lib/kernel/money";
import { compareTax, rateShare, taxedAlike, type TaxGroup, type TaxTreatment } from "./tax";

/** A net amount on a document with its tax; allowances lower and charges raise what the receiver of a credit gets. */
export type TaxedAmount = TaxTreatment & { readonly netMinor: bigint };

/** What the totals of a document are made of. Direction comes from the kind of document, so amounts stay as invoiced. */
export type DocumentContent = {
  readonly lines: readonly TaxedAmount[];
  readonly allowances?: readonly TaxedAmount[];
  readonly charges?: readonly TaxedAmount[];
  readonly paidMinor?: bigint;
  readonly roundingMinor?: bigint;
};

/** Totals of a document in minor units, with the terms of EN 16931 they are printed under. */
export type DocumentTotals = {
  /** BT-106, by BR-CO-10. */
  readonly linesMinor: bigint;
  /** BT-107, by BR-CO-11. */
  readonly allowancesMinor: bigint;
  /** BT-108, by BR-CO-12. */
  readonly chargesMinor: bigint;
  /** BT-109, by BR-CO-13: lines less allowances and with charges. */
  readonly netMinor: bigint;
  /** BT-110, by BR-CO-14. */
  readonly taxMinor: bigint;
  /** BT-112, by BR-CO-15. */
  readonly totalMinor: bigint;
  /** BT-115, by BR-CO-16: less what is paid, with the rounding amount. */
  readonly dueMinor: bigint;
  /** BG-23: one row for each category and rate, its tax by BR-CO-17. */
  readonly taxGroups: readonly TaxGroup[];
};

const sumOf = (amounts: readonly { readonly netMinor: bigint }[]): bigint =>
  amounts.reduce((so, { netMinor }) => so + netMinor, 0n);

/** The totals of a document by BR-CO-10 to BR-CO-17 of EN 16931, exact: tax is taken once per category and rate. */
export function documentTotals(content: DocumentContent, rounding: Rounding): DocumentTotals {
  const { lines, allowances = [], charges = [], paidMinor = 0n, roundingMinor = 0n } = content;
  const taxGroups = taxGroupsOf({ lines, allowances, charges }, rounding);
  const [linesMinor, allowancesMinor, chargesMinor] = [sumOf(lines), sumOf(allowances), sumOf(charges)];
  const netMinor = linesMinor - allowancesMinor + chargesMinor;
  const taxMinor = taxGroups.reduce((so, group) => so + group.taxMinor, 0n);
  const totalMinor = netMinor + taxMinor;
  const dueMinor = totalMinor - paidMinor + roundingMinor;
  return { linesMinor, allowancesMinor, chargesMinor, netMinor, taxMinor, totalMinor, dueMinor, taxGroups };
}

function taxGroupsOf(
  { lines, allowances = [], charges = [] }: DocumentContent,
  rounding: Rounding,
): readonly TaxGroup[] {
  const lowering = allowances.map((one) => ({ ...one, netMinor: -one.netMinor }));
  const groups: { tax: TaxTreatment; reasons: string[]; baseMinor: bigint }[] = [];
  for (const amount of [...lines, ...lowering, ...charges]) {
    let group = groups.find(({ tax }) => taxedAlike(tax, amount));
    if (!group) groups.push((group = { tax: amount, reasons: [], baseMinor: 0n }));
    group.baseMinor += amount.netMinor;
    if (amount.exemptionReason !== null && !group.reasons.includes(amount.exemptionReason))
      group.reasons.push(amount.exemptionReason);
  }
  return groups
    .toSorted((a, b) => compareTax(a.tax, b.tax))
    .map(({ tax: { taxCategory, taxRate }, reasons, baseMinor }) => ({
      taxCategory,
      taxRate,
      exemptionReason: reasons.length > 0 ? reasons.join("; ") : null,
      baseMinor,
      taxMinor: rounding(multiplyFractions(fraction(baseMinor), rateShare(taxRate))),
    }));
}

/** A line as it is priced: the net price in minor units may be finer than those, for so many pieces. */
export type PricedLine = {
  readonly priceMinor: Fraction;
  readonly priceFor?: Fraction;
  readonly quantity: Fraction;
  readonly chargesMinor?: bigint;
  readonly allowancesMinor?: bigint;
};

/** Net of a line (BT-131): price by quantity, rounded once, then its own charges and allowances. */
export const lineNetMinor = (line: PricedLine, rounding: Rounding): bigint => {
  const { numerator, denominator } = line.priceFor ?? ONE;
  const pieces = multiplyFractions(line.quantity, fraction(denominator, numerator));
  return (
    rounding(multiplyFractions(line.priceMinor, pieces)) +
    (line.chargesMinor ?? 0n) -
    (line.allowancesMinor ?? 0n)
  );
};

/** Net and tax of an amount with tax in it: the tax is what is left, so that both always add up to the gross. */
export const splitGross = (
  grossMinor: bigint,
  taxRate: string,
  rounding: Rounding,
): { readonly netMinor: bigint; readonly taxMinor: bigint } => {
  const { numerator, denominator } = rateShare(taxRate);
  const netMinor = rounding(
    multiplyFractions(fraction(grossMinor), fraction(denominator, denominator + numerator)),
  );
  return { netMinor, taxMinor: grossMinor - netMinor };
};

/** The document that takes a credit back to nothing: every amount with its sign turned. */
export const reversedContent = (content: DocumentContent): DocumentContent => {
  const turned = (amounts: readonly TaxedAmount[] = []) =>
    amounts.map((one) => ({ ...one, netMinor: -one.netMinor }));
  return {
    lines: turned(content.lines),
    allowances: turned(content.allowances),
    charges: turned(content.charges),
    paidMinor: -(content.paidMinor ?? 0n),
    roundingMinor: -(content.roundingMinor ?? 0n),
  };
};
