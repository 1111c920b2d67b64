import { currencyFrom } from "@/lib/kernel/currency";
import { defaultCreditRules, type CreditRules } from "@/lib/rule-book/credit-shape";
import type { SellerKey } from "./organisations";

const LARKMOOR_FIRST: CreditRules = { ...defaultCreditRules(currencyFrom("GBP")), notePrefix: "LPC" };
const FENWRIGHT_FIRST: CreditRules = {
  ...defaultCreditRules(currencyFrom("EUR")),
  rounding: "halfEven",
  notePrefix: "FG",
};

/** How each distributor credits: the first edition, and the one that took its place. */
export const CREDIT_RULES: Readonly<Record<SellerKey, readonly [before: CreditRules, now: CreditRules]>> = {
  larkmoor: [
    LARKMOOR_FIRST,
    { ...LARKMOOR_FIRST, handling: { amountMinor: 250, reason: "Handling of the claim" } },
  ],
  fenwright: [
    FENWRIGHT_FIRST,
    { ...FENWRIGHT_FIRST, handling: { amountMinor: 300, reason: "Bearbeitung der Meldung" } },
  ],
};
