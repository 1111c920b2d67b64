import type { Observation } from "./observation";
import { riskSets, type RiskSet } from "./risk-sets";
import { chiSquareUpper } from "./special/incomplete-gamma";

/** Failures of a group, and what it would have had if all groups failed alike at each age. */
export type LogRankGroup = { readonly observed: number; readonly expected: number };

export type LogRank = {
  /** In the order of the groups given. */
  readonly groups: readonly LogRankGroup[];
  /** Groups with an expected number above zero, less one. */
  readonly degreesOfFreedom: number;
  /** Null where the groups cannot be compared: fewer than two were ever at risk at a failure, or never together. */
  readonly chiSquare: number | null;
  readonly p: number | null;
};

/**
 * Log-rank comparison of any number of groups, with the variance of drawing without replacement. Throws RangeError for
 * rows no unit can have. Mantel 1966, Peto and Peto 1972.
 */
export function logRank(groups: readonly (readonly Observation[])[]): LogRank {
  const all = riskSets(groups.flat()).filter(({ failed }) => failed > 0);
  const ages = all.map(({ ageDays }) => ageDays);
  const sets = groups.map((rows) => riskSetsAt(rows, ages));
  const counted = sets.map((own) => ({
    observed: own.reduce((sum, { failed }) => sum + failed, 0),
    expected: own.reduce((sum, { atRisk }, at) => sum + (all[at]!.failed * atRisk) / all[at]!.atRisk, 0),
  }));
  const taking = counted.flatMap(({ expected }, group) => (expected > 0 ? [group] : []));
  const degreesOfFreedom = Math.max(0, taking.length - 1);
  const free = taking.slice(1);
  const differences = free.map((group) => counted[group]!.observed - counted[group]!.expected);
  const chiSquare = quadraticForm(
    covariances(
      free.map((group) => sets[group]!),
      all,
    ),
    differences,
  );
  const p = chiSquare === null ? null : chiSquareUpper(chiSquare, degreesOfFreedom);
  return { groups: counted, degreesOfFreedom, chiSquare, p };
}

type AtAge = Pick<RiskSet, "atRisk" | "failed">;

/** At risk and failed of some rows at given ages, whether or not anybody of theirs failed there. */
function riskSetsAt(rows: readonly Observation[], ages: readonly number[]): AtAge[] {
  const own = new Map(riskSets(rows, ages).map((set) => [set.ageDays, set]));
  return ages.map((age) => own.get(age)!);
}

function covariances(free: readonly (readonly AtAge[])[], all: readonly AtAge[]): number[][] {
  const weights = all.map(({ atRisk, failed }) =>
    atRisk > 1 ? (failed * (atRisk - failed)) / (atRisk - 1) / atRisk ** 2 : 0,
  );
  return free.map((one, row) =>
    free.map((other, column) =>
      weights.reduce((sum, weight, at) => {
        const total = row === column ? all[at]!.atRisk : 0;
        return sum + weight * one[at]!.atRisk * (total - other[at]!.atRisk);
      }, 0),
    ),
  );
}

/** d' V^-1 d by Cholesky's factor; null where V is empty or singular to working precision. */
function quadraticForm(
  matrix: readonly (readonly number[])[],
  differences: readonly number[],
): number | null {
  if (differences.length === 0) return null;
  const factor: number[][] = [];
  const solved: number[] = [];
  for (const [row, values] of matrix.entries()) {
    const line: number[] = [];
    const dot = (other: readonly number[]): number =>
      line.reduce((sum, value, at) => sum + value * (other[at] ?? 0), 0);
    for (const [column, earlier] of factor.entries())
      line.push((values[column]! - dot(earlier)) / earlier[column]!);
    const left = values[row]! - dot(line);
    if (!(left > 1e-12 * values[row]!)) return null;
    solved.push((differences[row]! - dot(solved)) / Math.sqrt(left));
    line.push(Math.sqrt(left));
    factor.push(line);
  }
  return solved.reduce((sum, value) => sum + value * value, 0);
}
