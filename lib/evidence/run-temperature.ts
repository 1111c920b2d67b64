import { evenlyThinned, gapSecondsFor, type Sample } from "./samples";

/** A limit the Rule book names for a part, drawn and tested. */
export type RunLimit = { readonly key: string; readonly name: string; readonly celsius: number };

export type TimeAbove = {
  readonly limit: RunLimit;
  readonly seconds: number;
  /** First crossing on the log's scale, by a straight line between the two samples around it; null where never. */
  readonly firstAtS: number | null;
};

/**
 * Time a temperature spent above a limit, by straight lines between neighbouring samples. A pause longer than
 * `gapS` is not joined: what happened in it is not known, and it is counted by `unknownSecondsOf`.
 */
export function timeAbove(samples: readonly Sample[], limit: RunLimit, gapS: number): TimeAbove {
  let seconds = 0;
  let firstAtS: number | null = null;
  for (const [place, after] of samples.entries()) {
    const before = samples[place - 1];
    if (after.value > limit.celsius && !before) firstAtS = after.timeS;
    if (!before || after.timeS - before.timeS > gapS) {
      if (after.value > limit.celsius) firstAtS ??= after.timeS;
      continue;
    }
    const part = partAbove(before, after, limit.celsius);
    if (part === null) continue;
    seconds += part.toS - part.fromS;
    if (part.toS > part.fromS || after.value > limit.celsius) firstAtS ??= part.fromS;
  }
  return { limit, seconds, firstAtS };
}

function partAbove(before: Sample, after: Sample, celsius: number): { fromS: number; toS: number } | null {
  const [starts, ends] = [before.value > celsius, after.value > celsius];
  if (!starts && !ends) return null;
  if (starts && ends) return { fromS: before.timeS, toS: after.timeS };
  const share = (celsius - before.value) / (after.value - before.value);
  const crossingS = before.timeS + share * (after.timeS - before.timeS);
  return starts ? { fromS: before.timeS, toS: crossingS } : { fromS: crossingS, toS: after.timeS };
}

/** Seconds of a series that lie in pauses too long to be joined. */
export const unknownSecondsOf = (samples: readonly Sample[], gapS: number): number =>
  samples.reduce((sum, after, place) => {
    const pauseS = after.timeS - (samples[place - 1]?.timeS ?? after.timeS);
    return pauseS > gapS ? sum + pauseS : sum;
  }, 0);

export type Slope = { readonly kelvinPerMinute: number; readonly fromS: number; readonly toS: number };

/** Length of the window a slope is taken over, so that the last digit of a probe makes no slope. */
const slopeWindowS = (stepS: number): number => Math.max(60, 4 * stepS);

/**
 * The steepest rise or fall: straight lines by least squares through each window of a minute, or of four samples
 * where these take longer. Null where no window holds three samples over most of its length.
 */
export function steepestSlope(all: readonly Sample[], stepS: number): Slope | null {
  const windowS = slopeWindowS(stepS);
  // A quick logger fills a window with thousands of rows; some sixty of them say the same.
  const spanS = (all.at(-1)?.timeS ?? 0) - (all[0]?.timeS ?? 0);
  const samples = evenlyThinned(all, Math.max(3, Math.ceil((60 * spanS) / windowS)));
  const gapS = gapSecondsFor(stepS);
  let steepest: Slope | null = null;
  let first = 0;
  for (const [last, { timeS }] of samples.entries()) {
    const before = samples[last - 1];
    if (before && timeS - before.timeS > gapS) first = last;
    while (timeS - (samples[first]?.timeS ?? timeS) > windowS) first += 1;
    const window = samples.slice(first, last + 1);
    const wide = timeS - (window[0]?.timeS ?? timeS) >= 0.8 * windowS;
    const slope = window.length < 3 || !wide ? null : leastSquaresSlope(window);
    if (slope !== null && Math.abs(slope) * 60 > Math.abs(steepest?.kelvinPerMinute ?? 0))
      steepest = { kelvinPerMinute: slope * 60, fromS: window[0]?.timeS ?? timeS, toS: timeS };
  }
  return steepest;
}

/** Slope per second of the straight line through samples; null where they all stand at one moment. */
export function leastSquaresSlope(samples: readonly Sample[]): number | null {
  const meanS = samples.reduce((sum, { timeS }) => sum + timeS, 0) / samples.length;
  const meanValue = samples.reduce((sum, { value }) => sum + value, 0) / samples.length;
  let [together, alone] = [0, 0];
  for (const { timeS, value } of samples) {
    together += (timeS - meanS) * (value - meanValue);
    alone += (timeS - meanS) ** 2;
  }
  return alone > 0 ? together / alone : null;
}
