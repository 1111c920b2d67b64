import { countOf, type Observation } from "./observation";

/**
 * Rows ready for a fit: logarithms of ages over the greatest age, each with its weight. A late entry is an age with a
 * negative weight, as the likelihood leaves out what happened before it.
 */
export type WeibullData = {
  readonly failures: number;
  readonly greatestAgeDays: number;
  readonly logAges: Float64Array;
  readonly weights: Float64Array;
  /** Sum over failures of the logarithm of age over greatest age. */
  readonly failedLogSum: number;
  readonly hasEntries: boolean;
};

/** The data of a fit. Ages of 0 are no part of it: without a failure there they say nothing. */
export function weibullData(rows: readonly Observation[]): WeibullData {
  let [failures, greatestAgeDays, hasEntries] = [0, 0, false];
  const byAge = new Map<number, number>();
  const failedByAge = new Map<number, number>();
  const add = (ages: Map<number, number>, age: number, weight: number): void =>
    void ages.set(age, (ages.get(age) ?? 0) + weight);
  for (const row of rows) {
    const count = countOf(row);
    if (count === 0 || row.ageDays === 0) continue;
    greatestAgeDays = Math.max(greatestAgeDays, row.ageDays);
    add(byAge, row.ageDays, count);
    if (row.failed) add(failedByAge, row.ageDays, count);
    if (row.failed) failures += count;
    if (row.entryDays === undefined || row.entryDays === 0) continue;
    add(byAge, row.entryDays, -count);
    hasEntries = true;
  }
  const logOf = (age: number): number => Math.log(age / greatestAgeDays);
  const failedLogSum = [...failedByAge].reduce((sum, [age, count]) => sum + count * logOf(age), 0);
  const logAges = Float64Array.from(byAge.keys(), logOf);
  const weights = Float64Array.from(byAge.values());
  return { failures, greatestAgeDays, logAges, weights, failedLogSum, hasEntries };
}

/** Weighted sums over ages (in units of the greatest) of age^shape times the 0th, 1st and 2nd power of its logarithm. */
export function powerSums({ logAges, weights }: WeibullData, shape: number): [number, number, number] {
  let [none, first, second] = [0, 0, 0];
  for (let place = 0; place < logAges.length; place += 1) {
    const logAge = logAges[place]!;
    const term = weights[place]! * Math.exp(shape * logAge);
    none += term;
    first += term * logAge;
    second += term * logAge * logAge;
  }
  return [none, first, second];
}

/** Log-likelihood at a shape with the scale that suits it best, on the scale of ages over the greatest age. */
export function profileLikelihood(data: WeibullData, shape: number, sum = powerSums(data, shape)[0]): number {
  const { failures, failedLogSum } = data;
  return failures * (Math.log(shape) + Math.log(failures / sum) - 1) + (shape - 1) * failedLogSum;
}

/** Slope and bend of that log-likelihood in the logarithm of the shape. */
export function profileSlope(data: WeibullData, shape: number): { slope: number; bend: number } {
  const [none, first, second] = powerSums(data, shape);
  const mean = first / none;
  const slope = shape * (data.failures / shape + data.failedLogSum - data.failures * mean);
  const spread = second / none - mean * mean;
  return { slope, bend: slope - data.failures * (1 + shape * shape * spread) };
}
