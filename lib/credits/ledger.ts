import type { Currency } from "@/lib/kernel/currency";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { amountText } from "./amount-text";

/** The named accounts of a distributor's claims ledger. */
export const ACCOUNTS = [
  "claimsExpense",
  "tax",
  "workshopPayable",
  "recoveryReceivable",
  "appliedToInvoice",
  "paidOut",
] as const;
export type Account = (typeof ACCOUNTS)[number];

/** One posting in minor units: above zero a debit, below zero a credit. */
export type Posting = {
  readonly account: Account;
  readonly amountMinor: bigint;
  readonly currency: Currency;
};

/** How a note is used up: set against an invoice of the workshop, or paid out with a reference. */
export const ALLOCATION_WAYS = ["invoice", "paidOut"] as const;
export type AllocationWay = (typeof ALLOCATION_WAYS)[number];

type NoteSum = { readonly currency: Currency; readonly netMinor: bigint; readonly taxMinor: bigint };
type Sum = { readonly currency: Currency; readonly amountMinor: bigint };

/** What moves money in the claims ledger. Each undoing is a movement of its own, with the amounts of what it undoes. */
export type Movement =
  | ({ readonly kind: "noteIssued" | "noteCountered" } & NoteSum)
  | ({ readonly kind: "allocated" | "allocationTakenBack"; readonly how: AllocationWay } & Sum)
  | ({ readonly kind: "recoveryCharged" | "recoveryTakenBack" } & Sum);

const USED_FOR: Readonly<Record<AllocationWay, Account>> = {
  invoice: "appliedToInvoice",
  paidOut: "paidOut",
};

/**
 * The postings of a movement. A note: expense and tax to what the workshop is owed. An allocation: what it is owed to where
 * it went. A recovery: what the maker owes to expense. They sum to zero; a posting of nothing is left out.
 */
export function postingsOf(movement: Movement): readonly Posting[] {
  switch (movement.kind) {
    case "noteIssued":
      return noted(movement);
    case "noteCountered":
      return reversedPostings(noted(movement));
    case "allocated":
      return moved(movement, ["workshopPayable", USED_FOR[movement.how]]);
    case "allocationTakenBack":
      return reversedPostings(moved(movement, ["workshopPayable", USED_FOR[movement.how]]));
    case "recoveryCharged":
      return moved(movement, ["recoveryReceivable", "claimsExpense"]);
    case "recoveryTakenBack":
      return reversedPostings(moved(movement, ["recoveryReceivable", "claimsExpense"]));
  }
}

const noted = ({ currency, netMinor, taxMinor }: NoteSum): readonly Posting[] =>
  posted(currency, [
    ["claimsExpense", netMinor],
    ["tax", taxMinor],
    ["workshopPayable", -(netMinor + taxMinor)],
  ]);

const moved = ({ currency, amountMinor }: Sum, [debit, credit]: readonly [Account, Account]) =>
  posted(currency, [
    [debit, amountMinor],
    [credit, -amountMinor],
  ]);

const posted = (currency: Currency, sides: readonly (readonly [Account, bigint])[]): readonly Posting[] =>
  sides
    .filter(([, amountMinor]) => amountMinor !== 0n)
    .map(([account, amountMinor]) => ({ account, amountMinor, currency }));

/** The same postings with their signs turned. */
const reversedPostings = (postings: readonly Posting[]): readonly Posting[] =>
  postings.map((posting) => ({ ...posting, amountMinor: -posting.amountMinor }));

/** What each account holds after these postings, by currency; an account nobody touched is left out. */
export function balancesOf(postings: readonly Posting[]): readonly Posting[] {
  const balances = new Map<string, Posting>();
  for (const posting of postings) {
    const key = `${posting.account} ${posting.currency}`;
    const before = balances.get(key)?.amountMinor ?? 0n;
    balances.set(key, { ...posting, amountMinor: before + posting.amountMinor });
  }
  return [...balances.values()];
}

/** A note and what became of it: allocations are signed, one taken back has a row of its own below zero. */
export type NoteInLedger = {
  readonly currency: Currency;
  readonly totalMinor: bigint;
  readonly isCountered: boolean;
  readonly allocations: readonly { readonly amountMinor: bigint }[];
};

/** What is allocated of a note. */
export const allocatedMinor = ({ allocations }: Pick<NoteInLedger, "allocations">): bigint =>
  allocations.reduce((so, { amountMinor }) => so + amountMinor, 0n);

/** What is still open of a note: credited = allocated + open, at any moment; nothing is open of a countered one. */
export const openMinor = (note: NoteInLedger): bigint =>
  note.isCountered ? 0n : note.totalMinor - allocatedMinor(note);

export type Allocation = Sum & { readonly how: AllocationWay };
export type AllocationRefusal =
  "noteCountered" | "allocationOfNothing" | "allocationOtherCurrency" | "allocationMoreThanOpen";

/** Allocates a part of a note, or all of it: never more than is open, never in another currency, never nothing. */
export function allocateNote(
  note: NoteInLedger,
  wanted: Allocation,
): Outcome<{ readonly movement: Movement; readonly openMinor: bigint }, AllocationRefusal> {
  if (note.isCountered) return refuse("noteCountered");
  const { currency, amountMinor, how } = wanted;
  if (currency !== note.currency)
    return refuse("allocationOtherCurrency", { currency: note.currency }, "amount");
  if (amountMinor <= 0n) return refuse("allocationOfNothing", {}, "amount");
  const left = openMinor(note) - amountMinor;
  if (left < 0n)
    return refuse("allocationMoreThanOpen", { open: amountText(openMinor(note), currency) }, "amount");
  return ok({ movement: { kind: "allocated", how, currency, amountMinor }, openMinor: left });
}

/** A note is countered whole, and only while all of it is open; take its allocations back first. */
export function counterNote(note: NoteInLedger): Outcome<null, "noteCountered" | "noteAllocated"> {
  if (note.isCountered) return refuse("noteCountered");
  return allocatedMinor(note) === 0n ? ok(null) : refuse("noteAllocated");
}
