import fc from "fast-check";
import type { CreditInput, CreditLineInput, InvoicedLine } from "@/lib/credits/credit";
import { SETTLEMENTS, SHARE_CAUSES } from "@/lib/credits/credit-input";
import type { DocumentContent, DocumentTotals } from "@/lib/credits/document";
import { fraction, ZERO } from "@/lib/kernel/fraction";
import { roundHalfAwayFromZero, roundHalfEven } from "@/lib/kernel/money";
import type { CoverFractionSchedule } from "@/lib/rule-book/terms-shape";
import { inputWith, terms } from "./inputs";

/** Half away from zero by whole numbers alone: written anew here, so that the engine is not checked with itself. */
export function halfUpOf(numerator: bigint, denominator: bigint): bigint {
  const size = numerator < 0n ? -numerator : numerator;
  const whole = size / denominator + ((size % denominator) * 2n >= denominator ? 1n : 0n);
  return numerator < 0n ? -whole : whole;
}

/** All figures of a document as one text, times a sign, so that two documents can be compared. */
export const turned = ({ taxGroups, ...sums }: DocumentTotals, sign = 1n): string =>
  [
    ...Object.values(sums).map((minor) => sign * minor),
    ...taxGroups.flatMap((group) => [
      group.taxCategory,
      group.taxRate,
      sign * group.baseMinor,
      sign * group.taxMinor,
    ]),
  ].join(" ");

export const anyRounding = fc.constantFrom(roundHalfAwayFromZero, roundHalfEven);

const anyTax = fc.constantFrom(
  { taxCategory: "S", taxRate: "25", exemptionReason: null } as const,
  { taxCategory: "S", taxRate: "20", exemptionReason: null } as const,
  { taxCategory: "S", taxRate: "7", exemptionReason: null } as const,
  { taxCategory: "Z", taxRate: "0", exemptionReason: null } as const,
  { taxCategory: "K", taxRate: "0", exemptionReason: "Intra-community supply" } as const,
);
const anyAmounts = (maxLength: number) =>
  fc.array(
    fc.tuple(anyTax, fc.bigInt(-(10n ** 9n), 10n ** 9n)).map(([tax, netMinor]) => ({ ...tax, netMinor })),
    { maxLength },
  );

export const anyContent: fc.Arbitrary<DocumentContent> = fc.record({
  lines: anyAmounts(8),
  allowances: anyAmounts(2),
  charges: anyAmounts(2),
  paidMinor: fc.bigInt(0n, 10n ** 6n),
  roundingMinor: fc.bigInt(-5n, 5n),
});

const upTo = (max: number) => fc.integer({ min: 0, max });
const minorUpTo = (max: bigint) => fc.bigInt(0n, max);

const anySchedule: fc.Arbitrary<CoverFractionSchedule> = fc.constantFrom(
  { kind: "full" },
  { kind: "straightLine" },
  {
    kind: "step",
    steps: [
      { fromMonth: 0, fraction: "1" },
      { fromMonth: 7, fraction: "2/3" },
      { fromMonth: 19, fraction: "1/7" },
    ],
  },
);

const anyTerms = fc
  .record({
    coverFraction: anySchedule,
    labour: fc.option(
      fc.record({ months: upTo(30), standardMinutes: upTo(200), hourlyRateMinor: upTo(9000) }),
    ),
    caps: fc.record({
      diagnosisMinor: upTo(3000),
      consumablesMinor: upTo(900),
      carriageMinor: upTo(1500),
      claimMinor: fc.constant(null),
    }),
    currency: fc.constantFrom<("GBP" | "EUR")[]>("GBP", "GBP", "GBP", "EUR"),
  })
  .map((change) => terms(change));

/** Five weights make five shares that add to one; the first two are credited. */
const anyAttribution = fc
  .array(fc.constantFrom<number[]>(0, 0, 1, 2, 3), { minLength: 5, maxLength: 5 })
  .map((weights) => {
    const whole = weights.reduce((so, weight) => so + weight, 0);
    const parts = whole === 0 ? [1, 0, 0, 0, 0] : weights;
    const [maker = 0, carrier = 0] = parts;
    const shares = Object.fromEntries(
      SHARE_CAUSES.map((cause, place) => [cause, `${parts[place] ?? 0}/${whole || 1}`]),
    );
    return { shares, creditedShare: fraction(maker + carrier, whole || 1) };
  });

const anyInvoice = (lineNumber: number): fc.Arbitrary<InvoicedLine> =>
  fc
    .tuple(anyTax, minorUpTo(50_000n), minorUpTo(90_000n), minorUpTo(30_000n))
    .map(([tax, unitPriceMinor, lineNetMinor, alreadyCreditedMinor]): InvoicedLine => ({
      ...tax,
      invoiceNumber: "R-1",
      lineNumber,
      unitPriceMinor,
      lineNetMinor,
      alreadyCreditedMinor,
    }));

const anyLine = (lineNumber: number, invoices: readonly InvoicedLine[]): fc.Arbitrary<CreditLineInput> =>
  fc
    .record({
      lineNumber: fc.constant(lineNumber),
      outcome: fc.constantFrom<CreditLineInput["outcome"][]>(
        "upheld",
        "upheldInPart",
        "upheldInPart",
        "declined",
      ),
      invoice: fc.option(fc.constantFrom(...invoices), { freq: 8 }),
      typedPrice: fc.option(
        fc
          .tuple(anyTax, minorUpTo(50_000n))
          .map(([tax, unitPriceMinor]) => ({ ...tax, unitPriceMinor, reason: "List" })),
      ),
      quantity: fc.integer({ min: 1, max: 4 }),
      monthsUsed: fc.option(upTo(30), { freq: 12 }),
      coverTerms: anyTerms,
      repairTerms: anyTerms,
      labourAskedMinutes: fc.oneof(fc.constant(0), upTo(300)),
      diagnosisAskedMinor: fc.oneof(fc.constant(0n), minorUpTo(5000n)),
      consumablesAskedMinor: fc.oneof(fc.constant(0n), minorUpTo(2000n)),
      carriageAskedMinor: fc.oneof(fc.constant(0n), minorUpTo(3000n)),
      lateFiling: fc.option(
        fc.constantFrom(
          { fraction: fraction(1, 2), version: "v" },
          { fraction: fraction(7, 9), version: "v" },
        ),
        { freq: 2 },
      ),
      attribution: anyAttribution,
      goodwill: fc.boolean(),
    })
    .map((line) =>
      line.outcome === "declined"
        ? { ...line, attribution: { ...line.attribution, creditedShare: ZERO } }
        : line,
    );

const anySettlement = fc.constantFrom(...SETTLEMENTS, "creditNote" as const, "creditNote" as const);

/** Claims of up to five lines on three invoice lines, so that lines meet on one of them; with and without limits. */
export const anyCreditInput: fc.Arbitrary<CreditInput> = fc
  .tuple(anyInvoice(1), anyInvoice(2), anyInvoice(3))
  .chain((invoices) =>
    fc.record({
      lines: fc
        .integer({ min: 1, max: 5 })
        .chain((count) =>
          fc.tuple(...Array.from({ length: count }, (_, place) => anyLine(place + 1, invoices))),
        ),
      claimCapMinor: fc.option(minorUpTo(60_000n)),
      handling: fc.option(minorUpTo(20_000n).map((amountMinor) => ({ amountMinor, reason: "Handling" }))),
      rounding: fc.constantFrom<CreditInput["rounding"][]>("halfUp", "halfEven"),
      settlement: fc.record({
        part: anySettlement,
        labour: anySettlement,
        diagnosis: anySettlement,
        consumables: anySettlement,
        carriage: anySettlement,
      }),
    }),
  )
  .map(({ lines, ...change }) => inputWith(lines, change));
