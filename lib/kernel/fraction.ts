/** An exact fraction in lowest terms; the denominator is positive. */
export type Fraction = { readonly numerator: bigint; readonly denominator: bigint };

/** The exact fraction n/d in lowest terms. Throws RangeError for a denominator of zero or a number that is not whole. */
export function fraction(numerator: bigint | number, denominator: bigint | number = 1n): Fraction {
  const [n, d] = [BigInt(numerator), BigInt(denominator)];
  if (d === 0n) throw new RangeError("A fraction needs a denominator other than zero");
  const sign = d < 0n ? -1n : 1n;
  const divisor = greatestCommonDivisor(n < 0n ? -n : n, d * sign);
  return { numerator: (n * sign) / divisor, denominator: (d * sign) / divisor };
}

/** Nothing, and the whole. */
export const ZERO: Fraction = { numerator: 0n, denominator: 1n };
export const ONE: Fraction = { numerator: 1n, denominator: 1n };

/** The exact sum. */
export const addFractions = (a: Fraction, b: Fraction): Fraction =>
  fraction(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);

/** The first less the second, exact. */
export const subtractFractions = (a: Fraction, b: Fraction): Fraction =>
  addFractions(a, { numerator: -b.numerator, denominator: b.denominator });

/** The exact product. */
export const multiplyFractions = (a: Fraction, b: Fraction): Fraction =>
  fraction(a.numerator * b.numerator, a.denominator * b.denominator);

/** Negative, 0 or positive, for sorting; exact. */
export function compareFractions(a: Fraction, b: Fraction): number {
  const difference = a.numerator * b.denominator - b.numerator * a.denominator;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** True for one value, however it is written: 2/4 and 1/2. */
export const equalFractions = (a: Fraction, b: Fraction): boolean => compareFractions(a, b) === 0;

/** True where shares (of an attribution, say) add to exactly one; an empty list does not. */
export const sumsToOne = (shares: readonly Fraction[]): boolean =>
  equalFractions(shares.reduce(addFractions, ZERO), ONE);

/**
 * The exact value of "7/24", "20.000" (as the database writes a rate) or "-0.5"; null for anything else,
 * a denominator of zero included. A decimal comma is not read: this is the stored form, not a person's typing.
 */
export function parseFraction(text: string): Fraction | null {
  const ratio = /^(-?\d{1,30})\/(\d{1,30})$/.exec(text);
  if (ratio) {
    const denominator = BigInt(ratio[2] ?? "0");
    return denominator === 0n ? null : fraction(BigInt(ratio[1] ?? "0"), denominator);
  }
  const decimal = /^(-?)(\d{1,30})(?:\.(\d{1,30}))?$/.exec(text);
  if (!decimal) return null;
  const [, sign = "", whole = "", places = ""] = decimal;
  return fraction(BigInt(`${sign}${whole}${places}`), 10n ** BigInt(places.length));
}

/** As `parseFraction`, for data that was already checked: throws RangeError where the text is no fraction. */
export function fractionFrom(text: string): Fraction {
  const value = parseFraction(text);
  if (value === null) throw new RangeError(`Not a fraction: ${text}`);
  return value;
}

/** "17/24", or "2" for a whole number. */
export const printFraction = ({ numerator, denominator }: Fraction): string =>
  denominator === 1n ? String(numerator) : `${numerator}/${denominator}`;

/** The nearest floating-point number: for charts and for percentages on a screen, never for money. */
export const approximate = ({ numerator, denominator }: Fraction): number =>
  Number(numerator) / Number(denominator);

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  return b === 0n ? a : greatestCommonDivisor(b, a % b);
}
