import type { Step } from "@/lib/kernel/explanation";
import { allocate, money } from "@/lib/kernel/money";
import type { Handling } from "./credit-input";
import { textOf, type Sums } from "./entry";
import { creditStep } from "./steps";
import type { TaxGroup, TaxTreatment } from "./tax";

/** A deduction on the document, in one tax group. */
export type Allowance = TaxTreatment & { readonly amountMinor: bigint; readonly reason: string };

export type Deduction = {
  readonly allowances: readonly Allowance[];
  /** The whole deduction, for a charge document of its own, where it would exceed the credit. */
  readonly separateCharge: Handling | null;
  readonly steps: readonly Step[];
};

const NONE: Deduction = { allowances: [], separateCharge: null, steps: [] };

/**
 * Takes handling off a credit: shared over the tax groups by their base, by largest remainder, ties to the group that is
 * printed first. More than the credit is not taken off at all: it is charged apart. Throws RangeError below zero.
 */
export function deductionFrom(groups: readonly TaxGroup[], handling: Handling | null, sums: Sums): Deduction {
  if (handling === null || handling.amountMinor === 0n) return NONE;
  if (handling.amountMinor < 0n) throw new RangeError("A deduction is not negative");
  const noteMinor = groups.reduce((so, { baseMinor }) => so + baseMinor, 0n);
  const handlingAmount = textOf(handling.amountMinor, sums);
  const noteAmount = textOf(noteMinor, sums);
  if (handling.amountMinor > noteMinor) {
    const step = creditStep("handlingSeparate", handlingAmount, { handlingAmount, noteAmount });
    return { allowances: [], separateCharge: handling, steps: [step] };
  }
  const parts = allocate(
    money(handling.amountMinor, sums.currency),
    groups.map(({ baseMinor }) => baseMinor),
  );
  const shared = groups.map((group, place) => ({ group, amountMinor: parts[place]?.minor ?? 0n }));
  return {
    allowances: shared
      .filter(({ amountMinor }) => amountMinor > 0n)
      .map(({ group: { taxCategory, taxRate, exemptionReason }, amountMinor }) => ({
        taxCategory,
        taxRate,
        exemptionReason,
        amountMinor,
        reason: handling.reason,
      })),
    separateCharge: null,
    steps: [
      ...shared.map(({ group: { taxCategory, taxRate, baseMinor }, amountMinor }) =>
        creditStep("handlingShare", textOf(amountMinor, sums), {
          handlingAmount,
          groupAmount: textOf(baseMinor, sums),
          noteAmount,
          taxCategory,
          taxRate,
        }),
      ),
      creditStep("netAfterHandling", textOf(noteMinor - handling.amountMinor, sums), {
        amount: noteAmount,
        handlingAmount,
      }),
    ],
  };
}
