const HALF_LOG_TWO_PI = 0.918_938_533_204_672_7;

/** Coefficients of Stirling's series in 1/x, 1/x³, ... (Abramowitz and Stegun 6.1.40, from memory). */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360_360, 1 / 156];

/**
 * What log Γ(x) exceeds (x - 1/2)·log x - x + log(2π)/2 by, for x > 0. Below 15 by steps of one, whose differences are
 * exact to rounding; above by the series.
 */
function stirlingError(x: number): number {
  let [sum, at] = [0, x];
  for (; at < 15; at += 1) sum += (at + 0.5) * Math.log1p(1 / at) - 1;
  const square = 1 / (at * at);
  return sum + STIRLING.reduceRight((series, term) => series * square + term, 0) / at;
}

/** log Γ(x) for x > 0. */
export const logGamma = (x: number): number =>
  (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingError(x);

/** x·log(x/mean) + mean - x without cancellation near the mean (Loader 2000, method from memory). */
function deviance(x: number, mean: number): number {
  const difference = x - mean;
  if (Math.abs(difference) >= 0.1 * (x + mean)) return x * Math.log(x / mean) + mean - x;
  const ratio = difference / (x + mean);
  let [sum, term] = [difference * ratio, 2 * x * ratio];
  for (let odd = 3; odd < 1000; odd += 2) {
    term *= ratio * ratio;
    const next = sum + term / odd;
    if (next === sum) break;
    sum = next;
  }
  return sum;
}

/** mean^x·exp(-mean)/Γ(x + 1) for x >= 0 and mean > 0: the Poisson probability where x is whole. */
export function poissonDensity(x: number, mean: number): number {
  if (x === 0) return Math.exp(-mean);
  return Math.exp(-stirlingError(x) - deviance(x, mean) - HALF_LOG_TWO_PI) / Math.sqrt(x);
}

/**
 * Γ(n + 1)/(Γ(x + 1)Γ(n - x + 1))·share^x·rest^(n - x) for 0 <= x <= n, with `rest` = 1 - share given apart so that
 * neither loses digits: the binomial probability where x and n are whole.
 */
export function binomialDensity(x: number, n: number, [share, rest]: readonly [number, number]): number {
  if (x === 0) return rest ** n;
  if (x === n) return share ** n;
  const errors = stirlingError(n) - stirlingError(x) - stirlingError(n - x);
  const deviances = deviance(x, n * share) + deviance(n - x, n * rest);
  return Math.exp(errors - deviances - HALF_LOG_TWO_PI) * Math.sqrt(n / x / (n - x));
}
