import type { Currency } from "@/lib/kernel/currency";

/** The sums of one currency, each from its own place: notes, allocations and ledger. All in minor units. */
export type Sums = {
  readonly currency: Currency;
  /** Credit notes less counter notes, from the notes themselves. */
  readonly notesMinor: bigint;
  /** From the allocations. */
  readonly allocatedMinor: bigint;
  /** Open on notes that stand: each note's total less its allocations. */
  readonly openMinor: bigint;
  /** What notes and counter notes put on the payable account. */
  readonly creditedMinor: bigint;
  /** What is left on the payable account. */
  readonly owedMinor: bigint;
  /** All postings together. */
  readonly postingsMinor: bigint;
};

export type Proof = "notesDiffer" | "openDiffers" | "owedDiffers" | "postingsDiffer";

/** credited = the sum of the notes = allocated + open, what is left is what is open, and postings sum to nothing; else which fails. */
export function disproofs(sums: Sums): readonly Proof[] {
  return [
    ...(sums.creditedMinor === sums.notesMinor ? [] : (["notesDiffer"] as const)),
    ...(sums.allocatedMinor + sums.openMinor === sums.notesMinor ? [] : (["openDiffers"] as const)),
    ...(sums.owedMinor === sums.openMinor ? [] : (["owedDiffers"] as const)),
    ...(sums.postingsMinor === 0n ? [] : (["postingsDiffer"] as const)),
  ];
}
