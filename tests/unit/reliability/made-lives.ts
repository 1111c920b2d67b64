import fc from "fast-check";
import type { Observation } from "@/lib/reliability/observation";

/** Uniform numbers in (0, 1) from a seed (mulberry32), so that a simulation is the same on every machine. */
export function uniformFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return (((mixed ^ (mixed >>> 14)) >>> 0) + 0.5) / 2 ** 32;
  };
}

/** One life drawn from a Weibull distribution. */
export const weibullLife = (uniform: () => number, shape: number, scaleDays: number): number =>
  scaleDays * (-Math.log(uniform())) ** (1 / shape);

const life = fc
  .record({
    ageDays: fc.integer({ min: 1, max: 60 }),
    failed: fc.boolean(),
    count: fc.integer({ min: 0, max: 4 }),
    entry: fc.option(fc.integer({ min: 0, max: 59 })),
  })
  .map(({ entry, ...row }): Observation =>
    entry === null || entry >= row.ageDays ? row : { ...row, entryDays: entry },
  );

/** Any rows, some of them entered late. */
export const anyLives = fc.array(life, { maxLength: 25 });

/** Any rows watched from the start, at least one unit among them. */
export const livesFromStart = fc
  .array(life, { minLength: 1, maxLength: 25 })
  .map((rows) =>
    rows.map(({ ageDays, failed, count = 0 }): Observation => ({ ageDays, failed, count: count + 1 })),
  );

/** The same units, one a row, in the order a permutation key gives them. */
export const unitByUnit = (rows: readonly Observation[], seed: number): Observation[] => {
  const uniform = uniformFrom(seed);
  return rows
    .flatMap(({ count = 1, ...row }) => Array.from({ length: count }, (): Observation => row))
    .map((row) => ({ row, key: uniform() }))
    .toSorted((one, other) => one.key - other.key)
    .map(({ row }) => row);
};
