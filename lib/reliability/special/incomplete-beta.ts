import { nonZero } from "./incomplete-gamma";
import { binomialDensity } from "./log-gamma";
import { quantileSearch, type Tails } from "./quantile-search";

const MOST_STEPS = 1_000_000;

/** A share and its complement, both given so that neither loses digits near 0 or 1. */
export type Share = readonly [share: number, rest: number];
export type BetaShapes = { readonly a: number; readonly b: number };

/** Regularised incomplete beta function (lower) and its complement, shapes > 0 (DLMF 8.17.22, from memory). */
export function betaTails([share, rest]: Share, { a, b }: BetaShapes): Tails {
  if (share <= 0) return { lower: 0, upper: 1 };
  if (rest <= 0) return { lower: 1, upper: 0 };
  const front = binomialDensity(a, a + b, [share, rest]) / (a + b);
  if (share * (a + b + 2) < a + 1) {
    const lower = front * b * fraction(share, { a, b });
    return { lower, upper: 1 - lower };
  }
  const upper = front * a * fraction(rest, { a: b, b: a });
  return { lower: 1 - upper, upper };
}

/** Lentz's method on the continued fraction of the incomplete beta function. */
function fraction(x: number, { a, b }: BetaShapes): number {
  let [c, d] = [1, 1 / nonZero(1 - ((a + b) * x) / (a + 1))];
  let value = d;
  const take = (term: number): number => {
    d = 1 / nonZero(1 + term * d);
    c = nonZero(1 + term / c);
    value *= c * d;
    return c * d;
  };
  for (let step = 1; step < MOST_STEPS; step += 1) {
    const at = a + 2 * step;
    const even = take((step * (b - step) * x) / ((at - 1) * at));
    const odd = take((-(a + step) * (a + b + step) * x) / (at * (at + 1)));
    if (Math.abs(even * odd - 1) < 4e-16) break;
  }
  return value;
}

/** The share with the given probability in the given tail of a beta distribution. */
export function betaQuantile(probability: number, { a, b }: BetaShapes, tail: keyof Tails): Share {
  if (probability <= 0) return tail === "lower" ? [0, 1] : [1, 0];
  if (probability >= 1) return tail === "lower" ? [1, 0] : [0, 1];
  const logOdds = quantileSearch({
    tailsAt: (at) => betaTails(shareAt(at), { a, b }),
    densityAt: (at) => (binomialDensity(a, a + b, shareAt(at)) * a * b) / (a + b),
    probability,
    tail,
    start: Math.log(a / b),
  });
  return shareAt(logOdds);
}

const shareAt = (logOdds: number): Share => [1 / (1 + Math.exp(-logOdds)), 1 / (1 + Math.exp(logOdds))];

/** Tails of a binomial distribution at x of n, x itself in both: P(X <= x) and P(X >= x). */
export function binomialTails(x: number, n: number, share: Share): Tails {
  return {
    lower: x >= n ? 1 : betaTails(share, { a: x + 1, b: n - x }).upper,
    upper: x <= 0 ? 1 : betaTails(share, { a: x, b: n - x + 1 }).lower,
  };
}
