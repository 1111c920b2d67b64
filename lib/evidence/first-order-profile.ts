import type { ThermalCurve } from "./thermal-curve";

export type TimedCelsius = { readonly timeS: number; readonly celsius: number };

/** Where a curve starts; its temperature is null where it is to be fitted. */
export type CurveStart = { readonly atS: number; readonly celsius: number | null };

/** The best curve for one time constant: its parameters, errors and their sum of squares. */
export type Profile = {
  readonly curve: ThermalCurve;
  readonly rss: number;
  readonly residuals: readonly number[];
};

/**
 * For a given time constant the model is linear in start and final temperature. With the start given one slope is
 * left, else a line in exp(-t/tau); both are solved about the mean, so that a long time constant keeps its digits.
 */
export function profileAt(tauS: number, samples: readonly TimedCelsius[], from: CurveStart): Profile {
  // What is left of the rise, less one: expm1 keeps the small figures of a run far shorter than tau.
  const reached = samples.map(({ timeS }) => -Math.expm1(-(timeS - from.atS) / tauS));
  const { start, rise } =
    from.celsius === null ? line(reached, samples) : slope(reached, samples, from.celsius);
  const residuals = samples.map(({ celsius }, index) => celsius - start - rise * (reached[index] ?? 0));
  const rss = residuals.reduce((sum, residual) => sum + residual * residual, 0);
  return { curve: { startCelsius: start, finalCelsius: start + rise, tauS }, rss, residuals };
}

function line(reached: readonly number[], samples: readonly TimedCelsius[]): { start: number; rise: number } {
  const meanReached = reached.reduce((sum, share) => sum + share, 0) / reached.length;
  const meanCelsius = samples.reduce((sum, { celsius }) => sum + celsius, 0) / samples.length;
  let [together, alone] = [0, 0];
  for (const [index, { celsius }] of samples.entries()) {
    const share = (reached[index] ?? 0) - meanReached;
    together += share * (celsius - meanCelsius);
    alone += share * share;
  }
  const rise = alone > 0 ? together / alone : 0;
  return { start: meanCelsius - rise * meanReached, rise };
}

function slope(
  reached: readonly number[],
  samples: readonly TimedCelsius[],
  start: number,
): { start: number; rise: number } {
  let [together, alone] = [0, 0];
  for (const [index, { celsius }] of samples.entries()) {
    const share = reached[index] ?? 0;
    together += share * (celsius - start);
    alone += share * share;
  }
  return { start, rise: alone > 0 ? together / alone : 0 };
}
