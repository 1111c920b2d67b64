import type { TermsInForce } from "@/lib/coverage/facts";
import type { Currency } from "@/lib/kernel/currency";
import type { Fraction } from "@/lib/kernel/fraction";
import type { TaxTreatment } from "./tax";

/** What a line of a credit pays for, in the order it is reckoned and printed. */
export const CREDIT_KINDS = ["part", "labour", "diagnosis", "consumables", "carriage"] as const;
export type CreditKind = (typeof CREDIT_KINDS)[number];

/** By which document a kind is settled; only `creditNote` stands on ours. */
export const SETTLEMENTS = ["creditNote", "workshopInvoice", "selfBilling", "outsideTax"] as const;
export type Settlement = (typeof SETTLEMENTS)[number];
export type SettlementByKind = Readonly<Record<CreditKind, Settlement>>;

/** Until the distributor has asked a tax adviser: labour is the workshop's own supply, so it sends its own invoice. */
export const DEFAULT_SETTLEMENT: SettlementByKind = {
  part: "creditNote",
  labour: "workshopInvoice",
  diagnosis: "workshopInvoice",
  consumables: "creditNote",
  carriage: "creditNote",
};

/** Half up is half away from zero, so that a reversal is the mirror of its credit. */
export type RoundingName = "halfUp" | "halfEven";

/** The line of the original invoice: its price as invoiced, its tax, and what earlier notes gave back of it. */
export type InvoicedLine = TaxTreatment & {
  readonly invoiceNumber: string;
  readonly lineNumber: number;
  readonly unitPriceMinor: bigint;
  /** Net of the whole invoice line, all pieces and rebates in: the most that all notes together give back. */
  readonly lineNetMinor: bigint;
  /** Net given back on this invoice line by notes that stand, so not by countered ones. */
  readonly alreadyCreditedMinor: bigint;
};

/** A price without its invoice: taken from a dated list or typed, always with the reason. */
type TypedPrice = TaxTreatment & { readonly unitPriceMinor: bigint; readonly reason: string };

/** Shares by cause as text ("3/4"); a cause left out has none. */
export const SHARE_CAUSES = ["maker", "carrier", "fitter", "user", "wear"] as const;
export type ShareCause = (typeof SHARE_CAUSES)[number];
export type CauseShares = Readonly<Partial<Record<ShareCause, string>>>;

/** One line of a claim with its verdict. Amounts are in minor units of the claim's currency and not negative. */
export type CreditLineInput = {
  readonly lineNumber: number;
  readonly outcome: "upheld" | "upheldInPart" | "declined";
  /** Null where the invoice is not known; then `typedPrice` says what the part cost, and null there: nobody knows. */
  readonly invoice: InvoicedLine | null;
  readonly typedPrice: TypedPrice | null;
  readonly quantity: number;
  /** Completed months in service at the failure, and the terms whose schedule they are for (`Coverage`). */
  readonly monthsUsed: number | null;
  readonly coverTerms: TermsInForce;
  /** Terms of the repair day: labour, and the caps on diagnosis, consumables and carriage. */
  readonly repairTerms: TermsInForce;
  readonly labourAskedMinutes: number;
  readonly diagnosisAskedMinor: bigint;
  readonly consumablesAskedMinor: bigint;
  readonly carriageAskedMinor: bigint;
  /** Filed late under terms that reduce: the share that is still paid, with the version that says so. */
  readonly lateFiling: { readonly fraction: Fraction; readonly version: string } | null;
  readonly attribution: { readonly shares: CauseShares; readonly creditedShare: Fraction };
  /** A person gave cover after the term: it counts as a failure in the last month of the term. */
  readonly goodwill: boolean;
};

/** Taken off the credit for handling; the reason is printed on the document (BR-33 of EN 16931 asks for one). */
export type Handling = { readonly amountMinor: bigint; readonly reason: string };

/** All that a credit of one claim is reckoned from; nothing is looked up and nothing is converted. */
export type CreditInput = {
  readonly currency: Currency;
  readonly rounding: RoundingName;
  readonly lines: readonly CreditLineInput[];
  /** The most that is paid for the whole claim, all kinds together, net. */
  readonly claimCapMinor: bigint | null;
  readonly handling: Handling | null;
  /** The distributor's setting; left out, `DEFAULT_SETTLEMENT`. */
  readonly settlement?: SettlementByKind;
};
