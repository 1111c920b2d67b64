import "server-only";
import type { TermsInForce } from "@/lib/coverage/facts";
import { creditFor, noteLines, type Credit, type InvoicedLine, type TaxCategory } from "@/lib/credits/credit";
import { plainRate } from "@/lib/credits/plain-rate";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom, type Currency } from "@/lib/kernel/currency";
import { defaultCreditRules, type CreditRules } from "@/lib/rule-book/credit-shape";
import { findRule } from "@/lib/rule-book/queries";
import type { Claim } from "@/models/claim";
import type { ClaimFacts, FactLine } from "../facts-shape";
import type { CoveredLine } from "../cover/queries";
import { creditInputOf, type DecidedLine } from "./credit-input";

type OriginalLine = {
  invoiceNumber: string;
  lineNumber: number;
  unitPriceMinor: string;
  quantity: number;
  currency: string;
  taxCategory: TaxCategory;
  taxRate: string;
  exemptionReason: string | null;
  creditedMinor: string;
};

// What stands of other claims' notes on the same line. Those of this claim are countered before another one is issued.
const ORIGINAL = `
  select i.invoice_number as "invoiceNumber", i.line_number as "lineNumber", i.unit_price_minor as "unitPriceMinor",
    i.quantity, i.currency, i.tax_category as "taxCategory", i.tax_rate as "taxRate", i.exemption_reason as "exemptionReason",
    (select coalesce(sum(l.net_minor), 0)::text from credit_note_lines l
       join credit_notes n on n.seller_id = l.seller_id and n.id = l.note_id
     where l.seller_id = i.seller_id and l.invoice_line_id = i.id and l.kind = 'part' and n.kind = 'credit'
       and n.claim_id <> $2 and not exists (select 1 from credit_notes c where c.counters_id = n.id)) as "creditedMinor"
  from invoice_lines i where i.id = $1`;

const findOriginal = async (work: Work, claim: Claim, line: FactLine): Promise<OriginalLine | null> => {
  if (!line.invoiceLine) return null;
  const [found] = await rows<OriginalLine>(work, ORIGINAL, [line.invoiceLine.id, claim.id]);
  return found ?? null;
};

const invoicedIn = (currency: Currency, line: OriginalLine | null): InvoicedLine | null =>
  line && currencyFrom(line.currency) === currency
    ? {
        invoiceNumber: line.invoiceNumber,
        lineNumber: line.lineNumber,
        unitPriceMinor: BigInt(line.unitPriceMinor),
        lineNetMinor: BigInt(line.unitPriceMinor) * BigInt(line.quantity),
        alreadyCreditedMinor: BigInt(line.creditedMinor),
        taxCategory: line.taxCategory,
        taxRate: plainRate(line.taxRate),
        exemptionReason: line.exemptionReason,
      }
    : null;

/** How the distributor credits on a day: what its Rule book says, else what holds for everybody. */
export async function creditRulesOn(
  work: Work,
  { sellerId, currency, on }: { sellerId: string; currency: Currency; on: CalendarDay },
): Promise<CreditRules> {
  const rule = await findRule(work, "credit", { sellerId, on });
  return rule?.body ?? defaultCreditRules(currency);
}

type Verdict = Pick<DecidedLine, "lineNumber" | "outcome" | "attribution" | "reasonCode">;
type ToCredit = {
  readonly facts: ClaimFacts;
  readonly lines: readonly (Verdict & CoveredLine)[];
  readonly on: CalendarDay;
};

async function repairTermsOf(
  work: Work,
  { sellerId }: Claim,
  { facts, partId }: { facts: ClaimFacts; partId: string },
): Promise<TermsInForce | null> {
  const on = calendarDay(facts.repairedOn ?? facts.failedOn);
  const rule = await findRule(work, "terms", { sellerId, family: facts.family, partId, on });
  return rule && { terms: rule.body, version: `${rule.ruleNumber} (${rule.validFrom})` };
}

/** What a verdict gives in money, with its steps. The currency is the invoice's, the claim's where no invoice is known. */
export async function creditOfVerdict(work: Work, claim: Claim, given: ToCredit): Promise<Credit> {
  const { facts, on } = given;
  const originals = new Map<number, OriginalLine | null>();
  for (const line of facts.lines) originals.set(line.lineNumber, await findOriginal(work, claim, line));
  const invoiced = [...originals.values()].find((line) => line !== null);
  const currency = currencyFrom(invoiced?.currency ?? claim.currency);

  const decided: DecidedLine[] = [];
  for (const { coverage, terms, ...line } of given.lines) {
    const partId = facts.lines.find(({ lineNumber }) => lineNumber === line.lineNumber)?.part.id ?? "";
    decided.push({
      ...line,
      coverage,
      terms: terms && { terms: terms.body, version: `${terms.ruleNumber} (${terms.validFrom})` },
      repairTerms: await repairTermsOf(work, claim, { facts, partId }),
      invoice: invoicedIn(currency, originals.get(line.lineNumber) ?? null),
    });
  }
  const rules = await creditRulesOn(work, { sellerId: claim.sellerId, currency, on });
  return creditFor(creditInputOf({ currency, facts, lines: decided, rules }));
}

type Standing = { id: string; netMinor: string; totalMinor: string; lineIds: string[] };

/** The note of a claim that was issued and not countered; there is one at most. */
export async function standingNote(work: Work, claimId: string): Promise<Standing | null> {
  const [note] = await rows<Standing>(
    work,
    `select n.id, n.net_minor as "netMinor", n.total_minor as "totalMinor",
       array(select distinct l.line_id from credit_note_lines l where l.note_id = n.id) as "lineIds"
     from credit_notes n where n.claim_id = $1 and n.kind = 'credit'
       and not exists (select 1 from credit_notes c where c.counters_id = n.id)`,
    [claimId],
  );
  return note ?? null;
}

/** Numbers of the lines for which a credit owes something by a note of the distributor. */
export const lineNumbersOwed = (credit: Credit): readonly number[] =>
  credit.totalMinor > 0n ? [...new Set(noteLines(credit.lines).map(({ lineNumber }) => lineNumber))] : [];

/**
 * Where each line stands once a verdict gave its credit. A note from before stays what it is where the new verdict comes to
 * the same sums; else its lines read `noteIssued`, or `due` where more is owed, until that note is countered: a claim is
 * never settled on a note that is wrong.
 */
export async function setCreditStates(work: Work, claim: Claim, credit: Credit): Promise<void> {
  const standing = await standingNote(work, claim.id);
  const isSame =
    standing !== null &&
    BigInt(standing.netMinor) === credit.netMinor &&
    BigInt(standing.totalMinor) === credit.totalMinor;
  if (isSame) return;
  await rows(
    work,
    `update claim_lines set credit_state = case when line_number = any ($2::integer[]) then 'due'
       when id = any ($3::uuid[]) then 'noteIssued' else 'none' end where claim_id = $1 returning id`,
    [claim.id, lineNumbersOwed(credit), standing?.lineIds ?? []],
  );
}
