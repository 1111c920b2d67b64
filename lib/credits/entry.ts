import type { Currency } from "@/lib/kernel/currency";
import type { Step } from "@/lib/kernel/explanation";
import type { Fraction } from "@/lib/kernel/fraction";
import { money, multiplyByFraction, type Rounding } from "@/lib/kernel/money";
import { amountText } from "./amount-text";
import type { CreditKind, CreditLineInput } from "./credit-input";
import type { NotGivenReason } from "./steps";

/** What one reason took: the figure it met and the one it left. Rows of one line and kind follow each other. */
export type NotGiven = {
  readonly lineNumber: number;
  readonly kind: CreditKind;
  readonly askedMinor: bigint;
  readonly givenMinor: bigint;
  readonly reason: NotGivenReason;
};

/** One kind of one line on its way from what was asked to what is given. */
export type Entry = {
  readonly line: CreditLineInput;
  readonly kind: CreditKind;
  readonly askedMinor: bigint;
  /** The figure printed last. */
  readonly minor: bigint;
  readonly steps: readonly Step[];
  readonly notGiven: readonly NotGiven[];
};

/** How sums are made on one credit. */
export type Sums = { readonly currency: Currency; readonly rounding: Rounding };

/** An entry at the figure it starts from. */
export const startEntry = (
  { line, kind }: Pick<Entry, "line" | "kind">,
  askedMinor: bigint,
  steps: readonly Step[],
): Entry => ({ line, kind, askedMinor, minor: askedMinor, steps, notGiven: [] });

/** The entry at a lower figure, with the step that led there; a reason is kept only where it took something. */
export function lowered(entry: Entry, to: { minor: bigint; reason: NotGivenReason }, steps: Step[]): Entry {
  const { lineNumber } = entry.line;
  const row = { lineNumber, kind: entry.kind, askedMinor: entry.minor, givenMinor: to.minor };
  const took = to.minor === entry.minor ? [] : [{ ...row, reason: to.reason }];
  return {
    ...entry,
    minor: to.minor,
    steps: [...entry.steps, ...steps],
    notGiven: [...entry.notGiven, ...took],
  };
}

/** An entry that gives nothing although the reason knows no amount that was asked: the row is kept all the same. */
export function nothingGiven(
  { line, kind }: Pick<Entry, "line" | "kind">,
  reason: NotGivenReason,
  steps: readonly Step[],
): Entry {
  const row = { lineNumber: line.lineNumber, kind, askedMinor: 0n, givenMinor: 0n, reason };
  return { line, kind, askedMinor: 0n, minor: 0n, steps, notGiven: [row] };
}

/** A figure times a share, rounded once. */
export const shareOf = (minor: bigint, by: Fraction, { currency, rounding }: Sums): bigint =>
  multiplyByFraction(money(minor, currency), by, rounding).minor;

/** Prints an amount of this credit. */
export const textOf = (minor: bigint, { currency }: Pick<Sums, "currency">): string =>
  amountText(minor, currency);
