import { checkedConfidence, type Observation } from "./observation";
import { normalQuantile } from "./special/normal";
import { chiSquareQuantile } from "./special/incomplete-gamma";
import { bestLogShape } from "./weibull-search";
import { powerSums, profileLikelihood, weibullData, type WeibullData } from "./weibull-likelihood";
import { profileB10Limits, profileShapeLimits } from "./weibull-profile";

export type Limits = readonly [lower: number, upper: number];
export type WeibullCurve = { readonly shape: number; readonly scaleDays: number };

/** Survival is exp(-(age / scale)^shape). Limits without "profile" in the name are those of the standard errors. */
export type WeibullEstimate = WeibullCurve & {
  readonly kind: "fit";
  readonly failures: number;
  readonly logLikelihood: number;
  readonly shapeLimits: Limits;
  readonly scaleLimits: Limits;
  /** The age by which one in ten has failed. */
  readonly b10Days: number;
  readonly b10Limits: Limits;
  /** By the likelihood ratio, from five failures up; null below, and where they do not exist. */
  readonly profileShapeLimits: Limits | null;
  readonly profileB10Limits: Limits | null;
  /** Variances and covariance of the logarithms of shape and scale. */
  readonly covariance: { readonly logShape: number; readonly logScale: number; readonly both: number };
};

/**
 * Why no estimate exists. `allFailuresAtGreatestAge`: the likelihood rises with the shape for ever. `noMaximum`: late
 * entries let it rise without bound in another way.
 */
export type NoWeibullReason = "noFailures" | "failureAtAgeZero" | "allFailuresAtGreatestAge" | "noMaximum";
export type WeibullFit =
  WeibullEstimate | { readonly kind: "none"; readonly reason: NoWeibullReason; readonly failures: number };

const LEAST_FOR_PROFILE = 5;
/** -log(0.9): the cumulative hazard at B10. */
const B10_HAZARD = -Math.log1p(-0.1);

/**
 * Maximum-likelihood Weibull fit with limits at a confidence between 0 and 1, or the reason why there is none. Censored
 * and late-entered units take part. Throws RangeError for rows no unit can have.
 */
export function weibullFit(
  rows: readonly Observation[],
  { confidence }: { readonly confidence: number },
): WeibullFit {
  checkedConfidence(confidence);
  const data = weibullData(rows);
  const atZero = rows.filter(({ ageDays, failed, count = 1 }) => ageDays === 0 && failed && count > 0);
  const failures = data.failures + atZero.reduce((sum, { count = 1 }) => sum + count, 0);
  const none = (reason: NoWeibullReason): WeibullFit => ({ kind: "none", reason, failures });
  if (failures === 0) return none("noFailures");
  if (atZero.length > 0) return none("failureAtAgeZero");
  if (data.failedLogSum === 0) return none("allFailuresAtGreatestAge");
  const logShape = bestLogShape(data);
  const covariance = logShape === null ? null : covarianceAt(data, Math.exp(logShape));
  if (logShape === null || covariance === null) return none("noMaximum");
  return estimate({ data, covariance, shape: Math.exp(logShape) }, confidence);
}

type Found = {
  readonly data: WeibullData;
  readonly shape: number;
  readonly covariance: WeibullEstimate["covariance"];
};

function estimate({ data, covariance, shape }: Found, confidence: number): WeibullEstimate {
  const { failures, greatestAgeDays } = data;
  const z = normalQuantile((1 + confidence) / 2);
  const drop = chiSquareQuantile(1 - confidence, 1, "upper") / 2;
  const around = (value: number, variance: number): Limits => {
    const factor = Math.exp(z * Math.sqrt(variance));
    return [value / factor, value * factor];
  };
  const scaleDays = greatestAgeDays * (powerSums(data, shape)[0] / failures) ** (1 / shape);
  const pull = -Math.log(B10_HAZARD) / shape;
  const b10Variance = covariance.logScale + 2 * pull * covariance.both + pull * pull * covariance.logShape;
  const b10Days = scaleDays * B10_HAZARD ** (1 / shape);
  const shapesWithin = failures < LEAST_FOR_PROFILE ? null : profileShapeLimits(data, { shape, drop });
  const b10Within =
    shapesWithin === null ? null : profileB10Limits(data, { shape, drop, shapesWithin, hazard: B10_HAZARD });
  return {
    kind: "fit",
    shape,
    scaleDays,
    failures,
    logLikelihood: profileLikelihood(data, shape) - failures * Math.log(greatestAgeDays),
    shapeLimits: around(shape, covariance.logShape),
    scaleLimits: around(scaleDays, covariance.logScale),
    b10Days,
    b10Limits: around(b10Days, b10Variance),
    profileShapeLimits: shapesWithin,
    profileB10Limits: b10Within && [b10Within[0] * greatestAgeDays, b10Within[1] * greatestAgeDays],
    covariance,
  };
}

/** Inverse of the observed information in the logarithms of shape and scale; null where it is not positive. */
function covarianceAt(data: WeibullData, shape: number): WeibullEstimate["covariance"] | null {
  const { failures, failedLogSum } = data;
  const [none, first, second] = powerSums(data, shape);
  // With z = shape·log(age / scale), age^shape / scale^shape = exp(z): sums over exp(z), z·exp(z), z²·exp(z).
  const logScale = Math.log(none / failures) / shape;
  const [w, wz, wzz] = [
    failures,
    (failures / none) * shape * (first - logScale * none),
    (failures / none) * shape * shape * (second - 2 * logScale * first + logScale * logScale * none),
  ];
  const failedZ = shape * (failedLogSum - failures * logScale);
  const [shapeShape, shapeScale, scaleScale] = [
    wzz + wz - failedZ,
    -shape * (wz + w - failures),
    shape * shape * w,
  ];
  const determinant = shapeShape * scaleScale - shapeScale * shapeScale;
  if (!(determinant > 0) || !(shapeShape > 0)) return null;
  return {
    logShape: scaleScale / determinant,
    logScale: shapeShape / determinant,
    both: -shapeScale / determinant,
  };
}

/** Share that survives an age in days. */
export const weibullSurvival = ({ shape, scaleDays }: WeibullCurve, ageDays: number): number =>
  Math.exp(-((ageDays / scaleDays) ** shape));

/** Probability that a unit alive at an age fails within the days after it: 1 - S(age + within) / S(age). */
export function conditionalFailure(
  { shape, scaleDays }: WeibullCurve,
  ageDays: number,
  within: number,
): number {
  return -Math.expm1((ageDays / scaleDays) ** shape - ((ageDays + within) / scaleDays) ** shape);
}

/** What the survival of units says while none has failed, for a shape that is assumed. */
export type NoFailureBound = {
  readonly assumedShape: number;
  /** One-sided limits at the confidence: the scale and B10 are at least so long. */
  readonly scaleAtLeastDays: number;
  readonly b10AtLeastDays: number;
};

/**
 * One-sided bounds from units without a failure, for an assumed shape (Nelson 1985, Weibayes; from memory). Null with a
 * failure or without any time in service. Throws RangeError for a shape or rows that cannot be.
 */
export function noFailureBound(
  rows: readonly Observation[],
  { confidence, shape }: { readonly confidence: number; readonly shape: number },
): NoFailureBound | null {
  if (!(shape > 0 && Number.isFinite(shape))) throw new RangeError(`No shape above 0: ${shape}`);
  const hazard = -Math.log1p(-checkedConfidence(confidence));
  const data = weibullData(rows);
  if (data.greatestAgeDays === 0 || rows.some(({ failed, count = 1 }) => failed && count > 0)) return null;
  const scale = data.greatestAgeDays * (powerSums(data, shape)[0] / hazard) ** (1 / shape);
  return {
    assumedShape: shape,
    scaleAtLeastDays: scale,
    b10AtLeastDays: scale * B10_HAZARD ** (1 / shape),
  };
}
