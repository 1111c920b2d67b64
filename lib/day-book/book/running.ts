import type { Posting } from "@/lib/credits/ledger";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Currency } from "@/lib/kernel/currency";

export type BookEntry = {
  readonly sequence: string;
  readonly enteredOn: CalendarDay;
  readonly kind: "noteIssued" | "noteCountered" | "allocated" | "allocationTakenBack";
  readonly workshopId: string;
  readonly workshopName: string;
  readonly noteNumber: string;
  readonly reference: string | null;
  /** The entry this one takes back, and the one that took this one back. */
  readonly counters: string | null;
  readonly counteredBy: string | null;
  readonly by: string | null;
  readonly postings: readonly Posting[];
};

/** What one workshop is owed in one currency, in minor units: above zero it is owed. */
export type Balance = {
  readonly workshopId: string;
  readonly currency: Currency;
  readonly owedMinor: bigint;
};

/** What an entry adds to what its workshop is owed: a payable is a credit, so below zero in the ledger. */
const owedBy = ({ postings }: Pick<BookEntry, "postings">): { currency: Currency; minor: bigint } | null => {
  const payable = postings.filter(({ account }) => account === "workshopPayable");
  const [first] = payable;
  if (!first) return null;
  return { currency: first.currency, minor: payable.reduce((so, { amountMinor }) => so - amountMinor, 0n) };
};

export type RunningEntry = BookEntry & {
  readonly owed: { readonly currency: Currency; readonly minor: bigint } | null;
  /** What the workshop is owed after this entry. */
  readonly balanceMinor: bigint;
};

/** Entries, newest first as given, each with its workshop's balance after it; `opening` is what was owed before the oldest. */
export function withBalances(
  entries: readonly BookEntry[],
  opening: readonly Balance[],
): readonly RunningEntry[] {
  const key = (workshopId: string, currency: string) => `${workshopId} ${currency}`;
  const balances = new Map(
    opening.map(({ workshopId, currency, owedMinor }) => [key(workshopId, currency), owedMinor]),
  );
  return entries
    .toReversed()
    .map((entry): RunningEntry => {
      const owed = owedBy(entry);
      if (owed === null) return { ...entry, owed, balanceMinor: 0n };
      const at = key(entry.workshopId, owed.currency);
      const balanceMinor = (balances.get(at) ?? 0n) + owed.minor;
      balances.set(at, balanceMinor);
      return { ...entry, owed, balanceMinor };
    })
    .toReversed();
}
