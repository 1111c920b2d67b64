import type { Currency } from "@/lib/kernel/currency";
import type { Step } from "@/lib/kernel/explanation";
import { roundHalfAwayFromZero, roundHalfEven, type Rounding } from "@/lib/kernel/money";
import { withinClaimCap, withinInvoiceLines } from "./claim-limits";
import {
  DEFAULT_SETTLEMENT,
  SETTLEMENTS,
  type CreditInput,
  type CreditKind,
  type Handling,
  type RoundingName,
  type Settlement,
} from "./credit-input";
import { deductionFrom, type Allowance } from "./deduction";
import { documentTotals, type DocumentTotals, type TaxedAmount } from "./document";
import { textOf, type Entry, type NotGiven, type Sums } from "./entry";
import { entriesOf } from "./line-entries";
import { creditStep } from "./steps";
import type { TaxCategory, TaxGroup } from "./tax";

export type { CreditInput, CreditKind, CreditLineInput, Handling, InvoicedLine } from "./credit-input";
export type { RoundingName, Settlement, SettlementByKind } from "./credit-input";
export type { Allowance } from "./deduction";
export type { NotGiven } from "./entry";
export type { TaxCategory, TaxGroup } from "./tax";

/** The rounding rule of a setting. */
const ROUNDINGS: Readonly<Record<RoundingName, Rounding>> = {
  halfUp: roundHalfAwayFromZero,
  halfEven: roundHalfEven,
};

/** One kind of one line as it is given, with how it came about. The tax is null where another document settles it. */
export type CreditLine = {
  readonly lineNumber: number;
  readonly kind: CreditKind;
  readonly settledBy: Settlement;
  /** What was claimed: for labour the claimed minutes at the rate, 0 where no rate is known. */
  readonly askedMinor: bigint;
  readonly netMinor: bigint;
  readonly taxCategory: TaxCategory | null;
  readonly taxRate: string | null;
  readonly exemptionReason: string | null;
  /** The original invoice line; null where it is not known. */
  readonly invoice: { readonly invoiceNumber: string; readonly lineNumber: number } | null;
  readonly steps: readonly Step[];
};

/** What a claim is owed. Net, tax and total are those of the credit note; `elsewhere` is settled by other documents. */
export type Credit = {
  readonly currency: Currency;
  readonly rounding: RoundingName;
  /** In order of line and kind; those that give nothing are there too, with the steps that say why. */
  readonly lines: readonly CreditLine[];
  /** Sum of the lines on the credit note, before allowances. */
  readonly linesMinor: bigint;
  readonly allowances: readonly Allowance[];
  readonly separateCharge: Handling | null;
  readonly netMinor: bigint;
  readonly taxGroups: readonly TaxGroup[];
  readonly taxMinor: bigint;
  readonly totalMinor: bigint;
  readonly elsewhere: readonly { readonly settledBy: Settlement; readonly netMinor: bigint }[];
  /** Steps of the document; those of a line stand with it. */
  readonly steps: readonly Step[];
  readonly notGiven: readonly NotGiven[];
};

/**
 * What is owed for one claim, in the order: part, labour, other kinds with their caps, late filing, attribution, claim cap,
 * invoice line, deductions, settlement, tax, total. Each printed figure is rounded once and the next step starts from it.
 * The order of lines given does not matter: they are reckoned by line number. Throws RangeError for amounts that cannot be.
 */
export function creditFor(input: CreditInput): Credit {
  const sums: Sums = { currency: input.currency, rounding: ROUNDINGS[input.rounding] };
  const settlement = input.settlement ?? DEFAULT_SETTLEMENT;
  const byNumber = input.lines.toSorted((a, b) => a.lineNumber - b.lineNumber);
  const reckoned = byNumber.flatMap((line) => entriesOf(line, sums, settlement));
  const entries = withinInvoiceLines(withinClaimCap(reckoned, input.claimCapMinor, sums), sums);
  const lines = entries.map((entry) => lineFrom(entry, settlement[entry.kind]));

  const onNote = noteLines(lines);
  const before = documentTotals({ lines: onNote }, sums.rounding);
  const { allowances, separateCharge, steps } = deductionFrom(before.taxGroups, input.handling, sums);
  const taken = allowances.map(({ amountMinor, ...tax }) => ({ ...tax, netMinor: amountMinor }));
  const totals = documentTotals({ lines: onNote, allowances: taken }, sums.rounding);
  const { linesMinor, netMinor, taxMinor, totalMinor, taxGroups } = totals;
  const first = creditStep("noteLines", textOf(linesMinor, sums), { lines: onNote.length });
  return {
    currency: input.currency,
    rounding: input.rounding,
    lines,
    linesMinor,
    allowances,
    separateCharge,
    netMinor,
    taxGroups,
    taxMinor,
    totalMinor,
    elsewhere: elsewhereOf(lines),
    steps: [first, ...steps, ...totalSteps(totals, sums)],
    notGiven: entries.flatMap(({ notGiven }) => notGiven),
  };
}

/** The lines that are printed on the credit note: settled by it, with something to give. */
export const noteLines = (lines: readonly CreditLine[]): readonly (CreditLine & TaxedAmount)[] =>
  lines.flatMap((line) => {
    const { settledBy, netMinor, taxCategory, taxRate } = line;
    if (settledBy !== "creditNote" || netMinor === 0n || taxCategory === null || taxRate === null) return [];
    return [{ ...line, taxCategory, taxRate }];
  });

function lineFrom({ line, kind, askedMinor, minor, steps }: Entry, settledBy: Settlement): CreditLine {
  const tax = settledBy === "creditNote" ? (line.invoice ?? line.typedPrice) : null;
  return {
    lineNumber: line.lineNumber,
    kind,
    settledBy,
    askedMinor,
    netMinor: minor,
    taxCategory: tax?.taxCategory ?? null,
    taxRate: tax?.taxRate ?? null,
    exemptionReason: tax?.exemptionReason ?? null,
    invoice: line.invoice && {
      invoiceNumber: line.invoice.invoiceNumber,
      lineNumber: line.invoice.lineNumber,
    },
    steps,
  };
}

const elsewhereOf = (lines: readonly CreditLine[]): Credit["elsewhere"] =>
  SETTLEMENTS.filter((settledBy) => settledBy !== "creditNote")
    .map((settledBy) => ({
      settledBy,
      netMinor: lines
        .filter((line) => line.settledBy === settledBy)
        .reduce((so, { netMinor }) => so + netMinor, 0n),
    }))
    .filter(({ netMinor }) => netMinor > 0n);

const totalSteps = ({ netMinor, taxMinor, totalMinor, taxGroups }: DocumentTotals, sums: Sums): Step[] => [
  ...taxGroups.map((group) =>
    creditStep("taxGroup", textOf(group.taxMinor, sums), {
      taxCategory: group.taxCategory,
      taxRate: group.taxRate,
      baseAmount: textOf(group.baseMinor, sums),
    }),
  ),
  creditStep("total", textOf(totalMinor, sums), {
    netAmount: textOf(netMinor, sums),
    taxAmount: textOf(taxMinor, sums),
  }),
];
