import type { Step } from "@/lib/kernel/explanation";
import { amountText } from "./amount-text";
import type { Credit, CreditLine } from "./credit";

/** A credit in short, as a mail takes it: what it comes to ("145.55 GBP") and the chain of steps that leads there. */
export type ExplainedCredit = { readonly total: string; readonly steps: readonly Step[] };

/** Lines that give something, or for which something was asked and the steps say why not. */
export const linesToExplain = ({ lines }: Pick<Credit, "lines">): readonly CreditLine[] =>
  lines.filter(({ steps }) => steps.length > 0);

/** The chain of a credit line after line, then the document's own steps; null where nothing is given at all. */
export function creditInMail(credit: Credit): ExplainedCredit | null {
  if (credit.totalMinor === 0n && credit.elsewhere.length === 0) return null;
  return {
    total: amountText(credit.totalMinor, credit.currency),
    steps: [...linesToExplain(credit).flatMap(({ steps }) => steps), ...credit.steps],
  };
}
