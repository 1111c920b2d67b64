import { poissonDensity } from "./log-gamma";
import { quantileSearch, type Tails } from "./quantile-search";

const MOST_STEPS = 1_000_000;

/** Regularised incomplete gamma functions P (lower) and Q (upper), shape > 0 (DLMF 8.7.1, 8.9.2, from memory). */
export function gammaTails(x: number, shape: number): Tails {
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Number.POSITIVE_INFINITY) return { lower: 1, upper: 0 };
  const front = poissonDensity(shape, x);
  if (x < shape + 1) {
    const lower = front * series(x, shape);
    return { lower, upper: 1 - lower };
  }
  const upper = front * shape * fraction(x, shape);
  return { lower: 1 - upper, upper };
}

/** 1 + x/(shape + 1) + x²/((shape + 1)(shape + 2)) + ... */
function series(x: number, shape: number): number {
  let [sum, term] = [1, 1];
  for (let step = 1; step < MOST_STEPS && term > sum * 1e-17; step += 1) {
    term *= x / (shape + step);
    sum += term;
  }
  return sum;
}

/** The continued fraction of Γ(shape, x)·exp(x)·x^-shape, by Lentz's method. */
function fraction(x: number, shape: number): number {
  let base = x + 1 - shape;
  let [c, d] = [Number.MAX_VALUE, 1 / base];
  let value = d;
  for (let step = 1; step < MOST_STEPS; step += 1) {
    const factor = step * (shape - step);
    base += 2;
    d = 1 / nonZero(base + factor * d);
    c = nonZero(base + factor / c);
    value *= c * d;
    if (Math.abs(c * d - 1) < 3e-16) break;
  }
  return value;
}

/** Lentz's method divides by its terms: a zero in passing is replaced by next to nothing. */
export const nonZero = (value: number): number => (Math.abs(value) < 1e-300 ? 1e-300 : value);

/** The x with the given probability in the given tail of a gamma distribution of scale 1. */
export function gammaQuantile(probability: number, shape: number, tail: keyof Tails): number {
  if (probability <= 0) return tail === "lower" ? 0 : Number.POSITIVE_INFINITY;
  if (probability >= 1) return tail === "lower" ? Number.POSITIVE_INFINITY : 0;
  const logX = quantileSearch({
    tailsAt: (at) => gammaTails(Math.exp(at), shape),
    densityAt: (at) => shape * poissonDensity(shape, Math.exp(at)),
    probability,
    tail,
    start: Math.log(shape),
  });
  return Math.exp(logX);
}

/** The x with the given probability in the given tail of a chi-square distribution. */
export const chiSquareQuantile = (probability: number, degrees: number, tail: keyof Tails): number =>
  2 * gammaQuantile(probability, degrees / 2, tail);

/** Probability of more than x under a chi-square distribution. */
export const chiSquareUpper = (x: number, degrees: number): number => gammaTails(x / 2, degrees / 2).upper;
