/** Times of one thing in milliseconds, and of its yardstick in the same rounds. */
export type Measured = {
  readonly medianMs: number;
  /** From the tenth to the ninetieth hundredth of the rounds. */
  readonly fromMs: number;
  readonly toMs: number;
  readonly yardstickMs: number;
  readonly ratio: number;
  /** What the database's server worked for it, where it was asked. */
  readonly serverMs?: number;
};

type Work = () => unknown;
type Rounds = { readonly rounds: number; readonly warmUp?: number };

const ascending = (values: readonly number[]): number[] => [...values].sort((one, other) => one - other);

const quantile = (values: readonly number[], at: number): number =>
  ascending(values)[Math.min(values.length - 1, Math.floor(at * values.length))] ?? Number.NaN;

/** The middle of some values. */
const medianOf = (values: readonly number[]): number => quantile(values, 0.5);

async function timed(work: Work): Promise<number> {
  const startedMs = performance.now();
  await work();
  return performance.now() - startedMs;
}

/**
 * Times a thing and its yardstick turn by turn, so that whatever else the machine does in a round hits both. The ratio
 * is that of the medians.
 */
export async function against(
  yardstick: Work,
  work: Work,
  { rounds, warmUp = 3 }: Rounds,
): Promise<Measured> {
  for (let round = 0; round < warmUp; round += 1) {
    await yardstick();
    await work();
  }
  const yardsticksMs: number[] = [];
  const worksMs: number[] = [];
  for (let round = 0; round < rounds; round += 1) {
    yardsticksMs.push(await timed(yardstick));
    worksMs.push(await timed(work));
  }
  const [medianMs, yardstickMs] = [medianOf(worksMs), medianOf(yardsticksMs)];
  return {
    medianMs,
    fromMs: quantile(worksMs, 0.1),
    toMs: quantile(worksMs, 0.9),
    yardstickMs,
    ratio: medianMs / yardstickMs,
  };
}

/** How much the server's work grew between two measurements. Its own time, since a busy machine slows a later one. */
export const growth = (before: Measured | undefined, after: Measured): string =>
  before?.serverMs && after.serverMs ? (after.serverMs / before.serverMs).toFixed(2) : "?";
