import { checkedConfidence, type Observation } from "./observation";
import { riskSets, type RiskSet } from "./risk-sets";
import { normalQuantile } from "./special/normal";

export { atRiskAt } from "./risk-sets";

/** The share that survives an event age, a failure exactly at it counted. */
export type KaplanMeierPoint = {
  readonly ageDays: number;
  readonly atRisk: number;
  readonly failed: number;
  readonly survival: number;
  /** Greenwood's; null where nobody survives. */
  readonly standardError: number | null;
  /** Limits survival ± z·error, cut to [0, 1]. */
  readonly plain: readonly [number, number] | null;
  /** Limits on the scale log(-log survival). */
  readonly logLog: readonly [number, number] | null;
};

type Curve = {
  readonly points: readonly KaplanMeierPoint[];
  /** First event age with a survival of one half or less. */
  readonly medianDays: number | null;
  /** Middle of the stretch over which survival is exactly one half; null unless such a stretch ends. */
  readonly medianMiddleDays: number | null;
};

/** The curve of those alive at a later age, where an early risk set of a few late entrants all failed. */
export type ConditionalCurve = Curve & {
  /** Survival is conditional on this age: the last at which all who were watched failed, with others watched later. */
  readonly afterDays: number;
};

export type KaplanMeier = Curve & {
  /** Nothing is said past this age. */
  readonly greatestAgeDays: number;
  readonly total: number;
  readonly failed: number;
  readonly censored: number;
  /** Given where late entry let an early risk set empty, so that the curve stands at zero for ever; else null. */
  readonly conditional: ConditionalCurve | null;
};

/** Survival within this of one half is one half. */
const CLOSE = 1e-9;

/**
 * Survival at each event age by the product over (1 - failed / at risk), with limits at a confidence between 0 and 1.
 * Throws RangeError for rows no unit can have. Kaplan and Meier 1958, Greenwood 1926.
 */
export function kaplanMeier(
  rows: readonly Observation[],
  { confidence }: { readonly confidence: number },
): KaplanMeier {
  const z = normalQuantile((1 + checkedConfidence(confidence)) / 2);
  const sets = riskSets(rows);
  const failed = sets.reduce((sum, set) => sum + set.failed, 0);
  const censored = sets.reduce((sum, set) => sum + set.censored, 0);
  return {
    ...curveOf(sets, z),
    greatestAgeDays: sets.at(-1)?.ageDays ?? 0,
    total: failed + censored,
    failed,
    censored,
    conditional: conditionalOf(sets, z),
  };
}

function conditionalOf(sets: readonly RiskSet[], z: number): ConditionalCurve | null {
  const emptied = sets.slice(0, -1).findLast(({ atRisk, failed }) => failed === atRisk);
  if (emptied === undefined) return null;
  const later = sets.filter(({ ageDays }) => ageDays > emptied.ageDays);
  return { afterDays: emptied.ageDays, ...curveOf(later, z) };
}

function curveOf(sets: readonly RiskSet[], z: number): Curve {
  let [survival, sum] = [1, 0];
  const points = sets
    .filter(({ failed }) => failed > 0)
    .map(({ ageDays, atRisk, failed }) => {
      survival *= (atRisk - failed) / atRisk;
      sum += failed / (atRisk * (atRisk - failed));
      return { ageDays, atRisk, failed, survival, ...limitsOf(survival, Math.sqrt(sum), z) };
    });
  return { points, ...medianOf(points) };
}

/** `relativeError` is the root of Greenwood's sum, the error of log survival. */
function limitsOf(
  survival: number,
  relativeError: number,
  z: number,
): Pick<KaplanMeierPoint, "standardError" | "plain" | "logLog"> {
  if (survival === 0) return { standardError: null, plain: null, logLog: null };
  const standardError = survival * relativeError;
  const reach = (z * relativeError) / -Math.log(survival);
  const logHazard = Math.log(-Math.log(survival));
  return {
    standardError,
    plain: [Math.max(0, survival - z * standardError), Math.min(1, survival + z * standardError)],
    logLog: [Math.exp(-Math.exp(logHazard + reach)), Math.exp(-Math.exp(logHazard - reach))],
  };
}

function medianOf(points: readonly KaplanMeierPoint[]): Pick<Curve, "medianDays" | "medianMiddleDays"> {
  const place = points.findIndex(({ survival }) => survival <= 0.5 + CLOSE);
  const [point, next] = [points[place], points[place + 1]];
  if (point === undefined) return { medianDays: null, medianMiddleDays: null };
  const isStretch = next !== undefined && Math.abs(point.survival - 0.5) <= CLOSE;
  return {
    medianDays: point.ageDays,
    medianMiddleDays: isStretch ? (point.ageDays + next.ageDays) / 2 : null,
  };
}
