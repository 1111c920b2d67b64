import type { Coverage } from "@/lib/coverage/coverage";
import type { TermsInForce } from "@/lib/coverage/facts";
import type { CreditInput, CreditLineInput, InvoicedLine } from "@/lib/credits/credit-input";
import type { Currency } from "@/lib/kernel/currency";
import { fractionFrom } from "@/lib/kernel/fraction";
import type { CreditRules } from "@/lib/rule-book/credit-shape";
import type { Terms } from "@/lib/rule-book/terms-shape";
import type { AskedBesides, ClaimFacts } from "../facts-shape";
import type { VerdictOutcome } from "../lifecycle";
import { creditedShare, type Attribution } from "../verdict";

/** A line as it was decided, with all that its credit is reckoned from. */
export type DecidedLine = {
  readonly lineNumber: number;
  readonly outcome: VerdictOutcome;
  readonly attribution: Attribution;
  readonly reasonCode: string;
  readonly coverage: Coverage;
  /** Terms of the shipment day and of the repair day; null where none were in force. */
  readonly terms: TermsInForce | null;
  readonly repairTerms: TermsInForce | null;
  readonly invoice: InvoicedLine | null;
};

type Decided = {
  readonly currency: Currency;
  readonly facts: ClaimFacts;
  readonly lines: readonly DecidedLine[];
  readonly rules: CreditRules;
};

const NOTHING_ASKED: AskedBesides = {
  labourMinutes: 0,
  diagnosisMinor: "0",
  consumablesMinor: "0",
  carriageMinor: "0",
};

/** Where no terms were written: the part in full and nothing besides, since nobody agreed on a rate or a cap. */
const withoutTerms = (currency: Currency): TermsInForce => ({
  version: "",
  terms: {
    coverMonths: 240,
    shelfLimitMonths: 0,
    startsWithoutFitting: "shipment",
    transfer: "refused",
    coverFraction: { kind: "full" },
    filingLimitDays: 0,
    lateFiling: { policy: "accept" },
    replacementMinimumDays: 0,
    grace: { kind: "days", days: 0 },
    contestDays: 0,
    queryLapseDays: 1,
    currency,
    labour: null,
    caps: { diagnosisMinor: 0, consumablesMinor: 0, carriageMinor: 0, claimMinor: null },
  } satisfies Terms,
});

/** Filed late under terms that reduce: the share that is still paid. */
function lateFilingOf({ coverage, terms }: DecidedLine): CreditLineInput["lateFiling"] {
  const late = coverage.reasons.find(({ code }) => code === "filedLateReduced");
  const fraction = late?.detail["fraction"];
  return fraction === undefined
    ? null
    : { fraction: fractionFrom(String(fraction)), version: terms?.version ?? "" };
}

type OnClaim = {
  readonly quantity: number;
  readonly asked: AskedBesides;
  readonly currency: Currency;
};

function lineInput(line: DecidedLine, { quantity, asked, currency }: OnClaim): CreditLineInput {
  const share = creditedShare(line.outcome, line.attribution);
  if (!share.ok) throw new RangeError(`line ${line.lineNumber} was decided with shares that cannot be`);
  const terms = line.coverage.coverTerms ?? line.terms ?? withoutTerms(currency);
  return {
    lineNumber: line.lineNumber,
    outcome: line.outcome,
    invoice: line.invoice,
    typedPrice: null,
    quantity,
    monthsUsed: line.coverage.monthsUsed,
    coverTerms: terms,
    repairTerms: line.repairTerms ?? terms,
    labourAskedMinutes: asked.labourMinutes,
    diagnosisAskedMinor: BigInt(asked.diagnosisMinor),
    consumablesAskedMinor: BigInt(asked.consumablesMinor),
    carriageAskedMinor: BigInt(asked.carriageMinor),
    lateFiling: lateFilingOf(line),
    attribution: { shares: line.attribution, creditedShare: share.value },
    goodwill: line.reasonCode === "goodwill",
  };
}

/** The lowest cap of a claim among the terms of its lines, in the currency of the credit. */
function claimCapOf(lines: readonly CreditLineInput[], currency: Currency): bigint | null {
  const caps = lines.flatMap(({ repairTerms: { terms } }) =>
    terms.currency === currency && terms.caps.claimMinor !== null ? [terms.caps.claimMinor] : [],
  );
  return caps.length > 0 ? BigInt(Math.min(...caps)) : null;
}

/**
 * What a verdict's credit is reckoned from. What was asked besides the parts was asked once for the claim: it goes with the
 * first line that was not declined. A deduction in another currency is left out, because nothing is converted.
 */
export function creditInputOf({ currency, facts, lines, rules }: Decided): CreditInput {
  const bearer = (lines.find(({ outcome }) => outcome !== "declined") ?? lines[0])?.lineNumber;
  const inputs = lines.map((line) =>
    lineInput(line, {
      quantity: facts.lines.find(({ lineNumber }) => lineNumber === line.lineNumber)?.quantity ?? 1,
      asked: line.lineNumber === bearer ? (facts.asked ?? NOTHING_ASKED) : NOTHING_ASKED,
      currency,
    }),
  );
  const { handling } = rules;
  return {
    currency,
    rounding: rules.rounding,
    lines: inputs,
    claimCapMinor: claimCapOf(inputs, currency),
    handling:
      handling && rules.currency === currency
        ? { amountMinor: BigInt(handling.amountMinor), reason: handling.reason }
        : null,
    settlement: rules.settledBy,
  };
}
