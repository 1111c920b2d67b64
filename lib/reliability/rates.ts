import { checkedConfidence } from "./observation";
import { betaQuantile, binomialTails, type Share } from "./special/incomplete-beta";
import { chiSquareQuantile } from "./special/incomplete-gamma";
import { binomialDensity } from "./special/log-gamma";

/** Failures seen over an exposure: unit-days, fittings, or an expected number. */
export type Rate = { readonly failures: number; readonly exposure: number };
export type ExactLimits = readonly [lower: number, upper: number];

function checkedCount(count: number): number {
  if (Number.isSafeInteger(count) && count >= 0) return count;
  throw new RangeError(`No count: ${count}`);
}

function checkedExposure(exposure: number): number {
  if (Number.isFinite(exposure) && exposure > 0) return exposure;
  throw new RangeError(`No exposure above 0: ${exposure}`);
}

/** Exact limits of a Poisson rate per unit of exposure (Garwood 1936). Throws RangeError for what cannot be. */
export function garwood({ failures, exposure }: Rate, confidence: number): ExactLimits {
  const tail = (1 - checkedConfidence(confidence)) / 2;
  const twice = 2 * checkedExposure(exposure);
  const lower = checkedCount(failures) === 0 ? 0 : chiSquareQuantile(tail, 2 * failures, "lower");
  return [lower / twice, chiSquareQuantile(tail, 2 * failures + 2, "upper") / twice];
}

/** Exact limits of a share of x among n (Clopper and Pearson 1934); [0, 1] for n = 0. Throws RangeError for x > n. */
export function clopperPearson(x: number, n: number, confidence: number): ExactLimits {
  const [[lower], [upper]] = sharesWithin(x, n, confidence);
  return [lower, upper];
}

function sharesWithin(x: number, n: number, confidence: number): readonly [Share, Share] {
  const tail = (1 - checkedConfidence(confidence)) / 2;
  if (checkedCount(x) > checkedCount(n)) throw new RangeError(`No share of ${n}: ${x}`);
  return [
    x === 0 ? [0, 1] : betaQuantile(tail, { a: x, b: n - x + 1 }, "lower"),
    x === n ? [1, 0] : betaQuantile(tail, { a: x + 1, b: n - x }, "upper"),
  ];
}

export type RateComparison = {
  /** The first rate over the second; null where nothing failed at all, Infinity where the second had no failure. */
  readonly ratio: number | null;
  /** Agree with the central p-value. */
  readonly limits: ExactLimits;
  /** One-sided: the first rate is greater, or less. */
  readonly pGreater: number;
  readonly pLess: number;
  /** Two-sided: twice the smaller tail, at most 1. The one that is printed. */
  readonly pCentral: number;
  /** Two-sided: all outcomes no likelier than the one seen. */
  readonly pMinlike: number;
};

/**
 * Exact comparison of two Poisson rates: given the failures of both, those of the first are binomial. Throws RangeError
 * for counts or exposures that cannot be. Przyborowski and Wilenski 1940.
 */
export function compareRates(one: Rate, other: Rate, confidence: number): RateComparison {
  const [x, n] = [checkedCount(one.failures), one.failures + checkedCount(other.failures)];
  const sum = checkedExposure(one.exposure) + checkedExposure(other.exposure);
  const share: Share = [one.exposure / sum, other.exposure / sum];
  const [low, high] = sharesWithin(x, n, confidence);
  const odds = ([part, rest]: Share): number => (part / rest) * (other.exposure / one.exposure);
  const { lower, upper } = binomialTails(x, n, share);
  return {
    ratio: n === 0 ? null : (x / other.failures) * (other.exposure / one.exposure),
    limits: [odds(low), odds(high)],
    pGreater: upper,
    pLess: lower,
    pCentral: Math.min(1, 2 * Math.min(lower, upper)),
    pMinlike: minlike(x, n, share),
  };
}

/** Probability of all outcomes no likelier than x; outcomes within 1e-7 of its probability count as equally likely. */
function minlike(x: number, n: number, share: Share): number {
  const limit = binomialDensity(x, n, share) * (1 + 1e-7);
  const isUnlikely = (outcome: number): boolean => binomialDensity(outcome, n, share) <= limit;
  const mode = Math.min(n, Math.floor((n + 1) * share[0]));
  if (isUnlikely(mode)) return 1;
  if (x < mode) {
    const from = firstWhere(mode, n + 1, (outcome) => outcome > n || isUnlikely(outcome));
    return binomialTails(x, n, share).lower + (from > n ? 0 : binomialTails(from, n, share).upper);
  }
  const below = firstWhere(0, mode + 1, (outcome) => !isUnlikely(outcome));
  return binomialTails(x, n, share).upper + (below === 0 ? 0 : binomialTails(below - 1, n, share).lower);
}

/** The first whole number from `from` on, at most `to`, that holds, where all after it hold too. */
function firstWhere(from: number, to: number, holds: (at: number) => boolean): number {
  let [low, high] = [from, to];
  while (low < high) {
    const middle = Math.floor((low + high) / 2);
    if (holds(middle)) high = middle;
    else low = middle + 1;
  }
  return low;
}
