import { currencyFrom } from "@/lib/kernel/currency";
import type { Account, Posting } from "@/lib/credits/ledger";
import { keysOf } from "@/lib/kernel/keys";

/** The names under which the Day book keeps the accounts: where a credit went is what the workshop owes, or the bank. */
const KEPT_AS = {
  claimsExpense: "claimsExpense",
  tax: "tax",
  workshopPayable: "workshopPayable",
  recoveryReceivable: "recoveryReceivable",
  appliedToInvoice: "receivable",
  paidOut: "bank",
} as const satisfies Record<Account, string>;

type KeptAccount = (typeof KEPT_AS)[Account];

/** The name an account is kept under. */
export const keptAccount = (account: Account): KeptAccount => KEPT_AS[account];

/** A posting as it was kept. Throws RangeError for an account nobody knows. */
export function postingFrom(kept: {
  readonly account: string;
  readonly amountMinor: string;
  readonly currency: string;
}): Posting {
  const account = keysOf(KEPT_AS).find((name) => KEPT_AS[name] === kept.account);
  if (!account) throw new RangeError(`no such account: ${kept.account}`);
  return { account, amountMinor: BigInt(kept.amountMinor), currency: currencyFrom(kept.currency) };
}
