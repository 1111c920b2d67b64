import type { Estimate } from "./view";

/** Of every limit on the screen. */
export const CONFIDENCE = 0.95;

/** A figure with its limits; an upper limit beyond every number is none. */
export const estimateOf = (value: number, [lower, upper]: readonly [number, number]): Estimate => ({
  value,
  lower,
  upper: Number.isFinite(upper) ? upper : null,
});
