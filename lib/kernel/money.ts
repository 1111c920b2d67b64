import { minorDigits, type Currency } from "./currency";
import type { Fraction } from "./fraction";
import { ok, refuse, type Outcome } from "./outcome";

export type { Currency } from "./currency";

/** A signed amount in whole minor units (pence, cents) of its ISO 4217 currency. */
export type Money = { readonly minor: bigint; readonly currency: Currency };

/** How an exact value becomes a whole number of minor units; always passed in by name, never a habit. */
export type Rounding = (exact: Fraction) => bigint;

/** An amount of so many minor units. Throws RangeError for a number that is not whole. */
export const money = (minor: bigint | number, currency: Currency): Money => ({
  minor: BigInt(minor),
  currency,
});
/** Zero in a currency. */
export const noMoney = (currency: Currency): Money => ({ minor: 0n, currency });

/** Adds two amounts. Two currencies are a fault and throw: nothing is converted by itself. */
export const addMoney = (a: Money, b: Money): Money => ({
  minor: a.minor + sameCurrency(a, b).minor,
  currency: a.currency,
});

/** Takes `b` from `a`; throws on two currencies. */
export const subtractMoney = (a: Money, b: Money): Money => addMoney(a, negateMoney(b));

/** The amount with its sign turned: the reversal of a credit. */
export const negateMoney = ({ minor, currency }: Money): Money => ({ minor: -minor, currency });

/** Negative, 0 or positive, for sorting; throws on two currencies. */
export function compareMoney(a: Money, b: Money): number {
  const difference = a.minor - sameCurrency(a, b).minor;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** The lesser of two amounts (a cap); throws on two currencies. */
export const lesserMoney = (a: Money, b: Money): Money => (compareMoney(a, b) <= 0 ? a : b);

/** Sum of amounts in one currency; of none, zero in that currency. */
export const sumMoney = (amounts: readonly Money[], currency: Currency): Money =>
  amounts.reduce(addMoney, noMoney(currency));

/** An amount times an exact fraction, rounded once by the rule given. */
export const multiplyByFraction = ({ minor, currency }: Money, by: Fraction, rounding: Rounding): Money => ({
  minor: rounding({ numerator: minor * by.numerator, denominator: by.denominator }),
  currency,
});

/** Commercial rounding, half away from zero: 2.345 gives 2.35 and -2.345 gives -2.35. */
export const roundHalfAwayFromZero: Rounding = ({ numerator, denominator }) => {
  const magnitude = ((numerator < 0n ? -numerator : numerator) * 2n + denominator) / (denominator * 2n);
  return numerator < 0n ? -magnitude : magnitude;
};

/** Half to the even neighbour: 2.345 gives 2.34 and 2.355 gives 2.36. */
export const roundHalfEven: Rounding = (exact) => {
  const rounded = roundHalfAwayFromZero(exact);
  const isHalf =
    (exact.numerator * 2n) % exact.denominator === 0n && exact.numerator % exact.denominator !== 0n;
  if (!isHalf || rounded % 2n === 0n) return rounded;
  return exact.numerator < 0n ? rounded + 1n : rounded - 1n;
};

/**
 * Shares an amount out by weights without losing a minor unit: each part is cut down, then what is left goes
 * one by one to the largest remainders, ties to the earlier line. Weights are whole and not negative;
 * throws RangeError where they sum to zero.
 */
export function allocate(total: Money, weights: readonly bigint[]): readonly Money[] {
  const sum = weights.reduce((so, weight) => so + weight, 0n);
  if (sum <= 0n || weights.some((weight) => weight < 0n))
    throw new RangeError("Weights must not be negative, and sum above zero");

  const whole = total.minor < 0n ? -total.minor : total.minor;
  const parts = weights.map((weight, line) => ({
    line,
    minor: (whole * weight) / sum,
    remainder: (whole * weight) % sum,
  }));
  const left = Number(whole - parts.reduce((so, part) => so + part.minor, 0n));
  const topped = new Set(
    parts
      .toSorted((a, b) =>
        a.remainder === b.remainder ? a.line - b.line : a.remainder > b.remainder ? -1 : 1,
      )
      .slice(0, left)
      .map((part) => part.line),
  );
  return parts.map(({ line, minor }) => {
    const share = topped.has(line) ? minor + 1n : minor;
    return { minor: total.minor < 0n ? -share : share, currency: total.currency };
  });
}

const LARGEST_WHOLE_DIGITS = 13;

/**
 * The amount a person or a file wrote, with a decimal comma or point: "145.55", "145,5", "-0,05". A single
 * mark is always the decimal one; marks between thousands are not read, so that 1.234 is never guessed at.
 * Refuses `amountNotReadable`, `amountTooFine` (more decimals than the currency has) and `amountTooLarge`.
 */
export function parseMoney(
  text: string,
  currency: Currency,
): Outcome<Money, "amountNotReadable" | "amountTooFine" | "amountTooLarge"> {
  const match = /^([-\u2212]?)(\d+)(?:[.,](\d+))?$/.exec(text.trim());
  if (!match) return refuse("amountNotReadable");
  const [, sign, whole = "", places = ""] = match;
  const digits = minorDigits(currency);
  if (places.length > digits) return refuse("amountTooFine", { digits, currency });
  if (whole.replace(/^0+/, "").length > LARGEST_WHOLE_DIGITS) return refuse("amountTooLarge");

  const minor = BigInt(whole + places.padEnd(digits, "0"));
  return ok({ minor: sign ? -minor : minor, currency });
}

/** The amount as a plain decimal with the currency's own decimals and a point: "-0.05", "145" for yen. */
export function toDecimalString({ minor, currency }: Money): string {
  const digits = minorDigits(currency);
  const figures = String(minor < 0n ? -minor : minor).padStart(digits + 1, "0");
  const sign = minor < 0n ? "-" : "";
  return digits === 0 ? sign + figures : `${sign}${figures.slice(0, -digits)}.${figures.slice(-digits)}`;
}

function sameCurrency(a: Money, b: Money): Money {
  if (a.currency !== b.currency) throw new TypeError(`Amounts in ${a.currency} and ${b.currency} were mixed`);
  return b;
}
