import { creditInputOf, type DecidedLine } from "@/lib/claims/deciding/credit-input";
import type { ClaimFacts } from "@/lib/claims/facts-shape";
import { creditFor, noteLines, type Credit, type InvoicedLine } from "@/lib/credits/credit";
import { calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { currencyFrom } from "@/lib/kernel/currency";
import { accountBetween } from "../story/organisations";
import { ruleOn } from "../story/rule-book";
import type { SaleLine } from "../story/sales";
import type { World } from "../story/world";
import type { Case } from "./case";
import { citing, type Covered } from "./cover";
import type { LineVerdict } from "./verdicts";

/** A line as it was decided. */
export type Decided = { readonly covered: Covered; readonly verdict: LineVerdict };

type Reckoning = { readonly world: World; readonly decidedOn: CalendarDay; readonly facts: ClaimFacts };

/** What a verdict gives in money, as the product reckons it. */
export function creditOf(one: Case, decided: readonly Decided[], known: Reckoning): Credit {
  const { facts, decidedOn, world } = known;
  const { seller } = one;
  const repairedOn = calendarDay(facts.repairedOn ?? facts.failedOn);
  const repairTerms = citing(ruleOn(world.ruleBook, { seller, kind: "terms", on: repairedOn }));
  const rules = ruleOn(world.ruleBook, { seller, kind: "credit", on: decidedOn }).body;
  const lines = decided.map(({ covered, verdict }, place): DecidedLine => {
    const sale = one.lines[place]?.sale ?? null;
    return {
      lineNumber: place + 1,
      ...verdict,
      coverage: covered.coverage,
      terms: covered.terms && citing(covered.terms),
      repairTerms,
      invoice: sale && invoiced(sale),
    };
  });
  const currency = currencyFrom(accountBetween(seller, one.workshop).currency);
  return creditFor(creditInputOf({ currency, facts, lines, rules }));
}

// No unit of the story is credited twice, so nothing was given back on its invoice line before.
const invoiced = ({ invoiceNumber, lineNumber, unitPriceMinor, quantity, tax }: SaleLine): InvoicedLine => ({
  invoiceNumber,
  lineNumber,
  unitPriceMinor: BigInt(unitPriceMinor),
  lineNetMinor: BigInt(unitPriceMinor) * BigInt(quantity),
  alreadyCreditedMinor: 0n,
  taxCategory: tax.category,
  taxRate: tax.rate.toFixed(3),
  exemptionReason: tax.reason,
});

/** Whether a note owes something for a line. */
export const isOwedOn = (credit: Credit, lineNumber: number): boolean =>
  credit.totalMinor > 0n && noteLines(credit.lines).some((line) => line.lineNumber === lineNumber);
