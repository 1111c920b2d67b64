import { gammaQuantile, gammaTails } from "./incomplete-gamma";

/** Probability of more than z under the standard normal distribution. */
export function normalUpper(z: number): number {
  const beyond = gammaTails((z * z) / 2, 0.5).upper / 2;
  return z >= 0 ? beyond : 1 - beyond;
}

/** The z below which the standard normal distribution has the probability, between 0 and 1. */
export function normalQuantile(probability: number): number {
  const isLow = probability < 0.5;
  const beyond = isLow ? probability : 1 - probability;
  const z = Math.sqrt(2 * gammaQuantile(2 * beyond, 0.5, "upper"));
  return isLow ? -z : z;
}
