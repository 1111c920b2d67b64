/** A stream of chance that repeats itself for the same seed. No other chance is used anywhere in the story. */
export type Chance = {
  /** At least 0 and below 1. */
  readonly next: () => number;
  /** A stream of its own by name, so that a change in one chapter does not move the others. */
  readonly fork: (name: string) => Chance;
  /** A whole number, both ends included. */
  readonly whole: (from: number, to: number) => number;
  readonly between: (from: number, to: number) => number;
  readonly happens: (probability: number) => boolean;
  readonly pick: <T>(from: readonly T[]) => T;
  readonly weighted: <T>(from: readonly (readonly [T, number])[]) => T;
  readonly normal: (mean: number, spread: number) => number;
  readonly exponential: (mean: number) => number;
  /** A life by S(t) = exp(-(t/scale)^shape). */
  readonly weibull: (shape: number, scale: number) => number;
  readonly shuffled: <T>(items: readonly T[]) => T[];
};

/** 32 bits from a text (FNV-1a with a final mix), good enough to tell streams apart. */
function seedFrom(text: string): number {
  let hash = 0x811c9dc5;
  for (let place = 0; place < text.length; place += 1)
    hash = Math.imul(hash ^ text.charCodeAt(place), 0x01000193);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  return (hash ^ (hash >>> 13)) >>> 0;
}

/** A stream of chance from the text of a seed: a Weyl sequence with a 32-bit mix after each step. */
export function chanceFrom(seed: string): Chance {
  let state = seedFrom(seed);
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  const whole = (from: number, to: number): number => from + Math.floor(next() * (to - from + 1));
  const exponential = (mean: number): number => -mean * Math.log(1 - next());
  return {
    next,
    fork: (name) => chanceFrom(`${seed}/${name}`),
    whole,
    between: (from, to) => from + next() * (to - from),
    happens: (probability) => next() < probability,
    pick: (from) => pickAt(from, next()),
    weighted: (from) => weightedPick(from, next()),
    normal: (mean, spread) =>
      mean + spread * Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next()),
    exponential,
    weibull: (shape, scale) => scale * exponential(1) ** (1 / shape),
    shuffled: (items) => shuffle(items, whole),
  };
}

function pickAt<T>(from: readonly T[], at: number): T {
  const picked = from.slice(Math.floor(at * from.length))[0];
  if (picked === undefined) throw new RangeError("Nothing to pick from");
  return picked;
}

function weightedPick<T>(from: readonly (readonly [T, number])[], at: number): T {
  const sum = from.reduce((so, [, weight]) => so + weight, 0);
  let left = at * sum;
  for (const [item, weight] of from) {
    left -= weight;
    if (left < 0) return item;
  }
  const last = from.at(-1);
  if (!last) throw new RangeError("Nothing to pick from");
  return last[0];
}

function shuffle<T>(items: readonly T[], whole: (from: number, to: number) => number): T[] {
  const left = [...items];
  const out: T[] = [];
  while (left.length > 0) out.push(...left.splice(whole(0, left.length - 1), 1));
  return out;
}
