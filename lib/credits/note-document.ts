import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Currency } from "@/lib/kernel/currency";
import type { Step } from "@/lib/kernel/explanation";
import { noteLines, type Allowance, type Credit, type NotGiven } from "./credit";
import type { CreditKind } from "./credit-input";
import { linesToExplain } from "./explained";
import type { TaxGroup, TaxTreatment } from "./tax";

export type NoteParty = {
  readonly name: string;
  readonly legalName: string;
  readonly address: string;
  /** ISO 3166-1, two letters. */
  readonly country: string;
  readonly taxNumber: string | null;
};

/** One line (BG-25): net (BT-131), and the line of the invoice it gives back on, whose tax it bears. */
export type NoteLine = TaxTreatment & {
  readonly position: number;
  /** Of the claim. */
  readonly lineNumber: number;
  readonly kind: CreditKind;
  readonly partNumber: string;
  readonly partName: string;
  readonly serial: string | null;
  readonly quantity: number;
  readonly netMinor: bigint;
  readonly invoice: {
    readonly invoiceNumber: string;
    readonly lineNumber: number;
    readonly invoicedOn: CalendarDay;
  } | null;
};

/**
 * A credit note word for word as it was issued; nothing on it is looked up again. Amounts are not negative: the direction
 * comes from the kind. Terms of EN 16931 in brackets: number (BT-1), day (BT-2), account (BT-10), invoices (BG-3), groups
 * (BG-23), allowances (BG-20), sum of lines (BT-106), net (BT-109), tax (BT-110), total (BT-112).
 */
export type NoteDocument = {
  readonly shape: 1;
  readonly kind: "credit" | "counter";
  readonly number: string;
  readonly issuedOn: CalendarDay;
  readonly currency: Currency;
  readonly seller: NoteParty;
  readonly buyer: NoteParty;
  readonly accountNumber: string;
  readonly claim: {
    /** As it is printed: `4107-3826`. */
    readonly number: string;
    readonly filedOn: CalendarDay;
    readonly decidedOn: CalendarDay;
  };
  /** The note a counter note takes back. */
  readonly counters: { readonly number: string; readonly issuedOn: CalendarDay } | null;
  /** Why a note was countered. */
  readonly reason: string | null;
  /** Why each line was decided as it was: a code of the verdicts, and the assessor's words. */
  readonly reasons: readonly { readonly lineNumber: number; readonly code: string; readonly text: string }[];
  readonly lines: readonly NoteLine[];
  readonly allowances: readonly Allowance[];
  readonly taxGroups: readonly TaxGroup[];
  readonly linesMinor: bigint;
  readonly netMinor: bigint;
  readonly taxMinor: bigint;
  readonly totalMinor: bigint;
  readonly elsewhere: Credit["elsewhere"];
  readonly notGiven: readonly NotGiven[];
  readonly explained: readonly {
    readonly lineNumber: number;
    readonly kind: CreditKind;
    readonly steps: readonly Step[];
  }[];
  readonly steps: readonly Step[];
};

/** What a claim line says on a note. */
export type ClaimLineOnNote = {
  readonly lineNumber: number;
  readonly partNumber: string;
  readonly partName: string;
  readonly serial: string | null;
  readonly quantity: number;
  /** The day of the original invoice (BT-26); null where no invoice is known. */
  readonly invoicedOn: CalendarDay | null;
  readonly reasonCode: string;
  readonly reason: string;
};

export type NoteContent = Pick<
  NoteDocument,
  "number" | "issuedOn" | "seller" | "buyer" | "accountNumber" | "claim"
> & { readonly credit: Credit; readonly claimLines: readonly ClaimLineOnNote[] };

/** The credit note of a verdict, ready to be frozen. Throws RangeError for a credit with a line the claim does not have. */
export function noteDocument({ credit, claimLines, ...head }: NoteContent): NoteDocument {
  const lines = noteLines(credit.lines).map((line, place): NoteLine => {
    const onClaim = claimLines.find(({ lineNumber }) => lineNumber === line.lineNumber);
    if (!onClaim) throw new RangeError(`the claim has no line ${line.lineNumber}`);
    const { partNumber, partName, serial, quantity, invoicedOn } = onClaim;
    return {
      position: place + 1,
      lineNumber: line.lineNumber,
      kind: line.kind,
      partNumber,
      partName,
      serial,
      // What is paid beside the part is one amount, however many parts were claimed.
      quantity: line.kind === "part" ? quantity : 1,
      netMinor: line.netMinor,
      taxCategory: line.taxCategory,
      taxRate: line.taxRate,
      exemptionReason: line.exemptionReason,
      invoice: line.invoice && invoicedOn ? { ...line.invoice, invoicedOn } : null,
    };
  });
  const { currency, allowances, taxGroups, elsewhere, notGiven, steps } = credit;
  const { linesMinor, netMinor, taxMinor, totalMinor } = credit;
  return {
    shape: 1,
    kind: "credit",
    ...head,
    currency,
    counters: null,
    reason: null,
    reasons: claimLines.map(({ lineNumber, reasonCode, reason }) => ({
      lineNumber,
      code: reasonCode,
      text: reason,
    })),
    lines,
    allowances,
    taxGroups,
    linesMinor,
    netMinor,
    taxMinor,
    totalMinor,
    elsewhere,
    notGiven,
    explained: linesToExplain(credit).map((line) => ({
      lineNumber: line.lineNumber,
      kind: line.kind,
      steps: line.steps,
    })),
    steps,
  };
}

type CounterHead = Pick<NoteDocument, "number" | "issuedOn"> & { readonly reason: string };

/** The document that takes a note back: the same amounts to the minor unit, in the other direction. */
export const counterDocument = (
  note: NoteDocument,
  { number, issuedOn, reason }: CounterHead,
): NoteDocument => ({
  ...note,
  kind: "counter",
  number,
  issuedOn,
  counters: { number: note.number, issuedOn: note.issuedOn },
  reason,
});

/** The original invoices a note gives back on (BG-3), each once, in the order of its lines. */
export const invoicesOf = ({
  lines,
}: Pick<NoteDocument, "lines">): readonly { invoiceNumber: string; invoicedOn: CalendarDay }[] => [
  ...new Map(
    lines.flatMap(({ invoice }) =>
      invoice
        ? [
            [
              invoice.invoiceNumber,
              { invoiceNumber: invoice.invoiceNumber, invoicedOn: invoice.invoicedOn },
            ] as const,
          ]
        : [],
    ),
  ).values(),
];
