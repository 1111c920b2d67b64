/** Middle value of the numbers given (mean of the two middle ones); null where there are none. */
export function median(values: readonly number[]): number | null {
  const sorted = values.toSorted((first, second) => first - second);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.floor((sorted.length - 1) / 2)];
  return upper === undefined || lower === undefined ? null : (lower + upper) / 2;
}

/** A sample that has a value, with its place in the log. */
export type Sample = { readonly index: number; readonly timeS: number; readonly value: number };

/** The samples of a column that have a value, in order of time. */
export function samplesOf(timeS: readonly number[], values: readonly (number | null)[]): Sample[] {
  const samples: Sample[] = [];
  for (const [index, value] of values.entries()) {
    const time = timeS[index];
    if (value !== null && time !== undefined) samples.push({ index, timeS: time, value });
  }
  return samples;
}

/** Pause in s beyond which two samples are not joined: five usual steps, and never under a minute. */
export const gapSecondsFor = (stepS: number): number => Math.max(60, 5 * stepS);

/** Mean of the samples that share a cell of time; `cell` counts cells from the log's zero. */
export type CellMean = { readonly cell: number; readonly timeS: number; readonly value: number };

/** Means over cells of a width in seconds, in order of time; cells without a sample are left out. */
export function meansBy(samples: readonly Sample[], widthS: number): CellMean[] {
  const sums = new Map<number, { count: number; timeS: number; value: number }>();
  for (const { timeS, value } of samples) {
    const cell = Math.floor(timeS / widthS);
    const sum = sums.get(cell) ?? { count: 0, timeS: 0, value: 0 };
    sums.set(cell, { count: sum.count + 1, timeS: sum.timeS + timeS, value: sum.value + value });
  }
  return [...sums].map(([cell, sum]) => ({
    cell,
    timeS: sum.timeS / sum.count,
    value: sum.value / sum.count,
  }));
}

/** Every n-th item, so that at most the given number are left. */
export function evenlyThinned<T>(items: readonly T[], most: number): readonly T[] {
  const every = Math.ceil(items.length / most);
  return every <= 1 ? items : items.filter((_, place) => place % every === 0);
}
