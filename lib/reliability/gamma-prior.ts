import { leastOf } from "./least-value";
import { logGamma } from "./special/log-gamma";

/** How the true ratios of batches are spread: a gamma distribution of this mean and shape. */
export type GammaPrior = {
  readonly mean: number;
  /** Large for batches that are alike; null where they differ no more than chance has them differ. */
  readonly shape: number | null;
};

export type Expected = { readonly failures: number; readonly expected: number };

// Logarithms of the shapes that are looked at: spread by a factor of thirty, to spread by a hundredth.
const [LEAST, MOST, STEP] = [Math.log(1e-3), Math.log(1e4), 0.25];

/**
 * The gamma distribution of the ratios under which failures given the expected numbers are likeliest (a negative binomial
 * likelihood). Null with no failures or nothing expected.
 */
export function gammaPrior(batches: readonly Expected[]): GammaPrior | null {
  const known = batches.filter(({ expected }) => expected > 0);
  if (known.every(({ failures }) => failures === 0)) return null;
  const against = (logShape: number): number => -logLikelihood(known, Math.exp(logShape));
  const places = Array.from({ length: 1 + Math.ceil((MOST - LEAST) / STEP) }, (_, at) => LEAST + at * STEP);
  const depths = places.map(against);
  const best = depths.reduce((least, depth, at) => (depth < depths[least]! ? at : least), 0);
  if (best === places.length - 1) {
    const sumOf = (key: keyof Expected): number => known.reduce((sum, batch) => sum + batch[key], 0);
    return { mean: sumOf("failures") / sumOf("expected"), shape: null };
  }
  const shape = Math.exp(leastOf(against, places[Math.max(0, best - 1)]!, places[best + 1]!).at);
  return { mean: meanAt(known, shape), shape };
}

/** The ratio of a batch drawn towards the mean of all, the more the less is expected of it. */
export const shrunkenRatio = ({ mean, shape }: GammaPrior, { failures, expected }: Expected): number =>
  shape === null ? mean : (shape + failures) / (shape / mean + expected);

/** The likeliest mean for a shape. The slope in the mean falls and is convex, so Newton steps from 0 never pass its root. */
function meanAt(batches: readonly Expected[], shape: number): number {
  let mean = 0;
  for (let step = 0; step < 200; step += 1) {
    let [slope, bend] = [0, 0];
    for (const { failures, expected } of batches) {
      const spread = shape + mean * expected;
      slope += (failures - mean * expected) / spread;
      bend += (expected * (shape + failures)) / (spread * spread);
    }
    const next = mean + slope / bend;
    if (Math.abs(next - mean) <= 1e-14 * next) return next;
    mean = next;
  }
  return mean;
}

function logLikelihood(batches: readonly Expected[], shape: number): number {
  const mean = meanAt(batches, shape);
  return batches.reduce((sum, { failures, expected }) => {
    const spread = shape + mean * expected;
    const failed = failures === 0 ? 0 : failures * Math.log((mean * expected) / spread);
    return sum + logGamma(failures + shape) - logGamma(shape) + shape * Math.log(shape / spread) + failed;
  }, 0);
}
