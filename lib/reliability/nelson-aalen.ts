import type { Observation } from "./observation";
import { riskSets } from "./risk-sets";

/** Cumulative hazard at an event age, a failure exactly at it counted. */
export type NelsonAalenPoint = {
  readonly ageDays: number;
  readonly atRisk: number;
  readonly failed: number;
  readonly hazard: number;
  readonly standardError: number;
};

/**
 * Cumulative hazard as the sum of failed / at risk over the event ages, with the variance failed / at risk².
 * Throws RangeError for rows no unit can have. Nelson 1969, Aalen 1978.
 */
export function nelsonAalen(rows: readonly Observation[]): readonly NelsonAalenPoint[] {
  let [hazard, variance] = [0, 0];
  return riskSets(rows)
    .filter(({ failed }) => failed > 0)
    .map(({ ageDays, atRisk, failed }) => {
      hazard += failed / atRisk;
      variance += failed / atRisk ** 2;
      return { ageDays, atRisk, failed, hazard, standardError: Math.sqrt(variance) };
    });
}
