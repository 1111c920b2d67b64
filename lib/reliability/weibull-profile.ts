import { leastOf } from "./least-value";
import { powerSums, profileLikelihood, profileSlope, type WeibullData } from "./weibull-likelihood";

type Pair = readonly [lower: number, upper: number];
type Around = { readonly shape: number; readonly drop: number };

/** Shapes at which the likelihood, at its best scale, lies `drop` below its top; null where there is none on a side. */
export function profileShapeLimits(data: WeibullData, { shape, drop }: Around): Pair | null {
  const level = profileLikelihood(data, shape) - drop;
  const lower = crossing(data, { from: Math.log(shape), level, direction: -1 });
  const upper = crossing(data, { from: Math.log(shape), level, direction: 1 });
  return lower === null || upper === null ? null : [Math.exp(lower), Math.exp(upper)];
}

type Crossing = { readonly from: number; readonly level: number; readonly direction: 1 | -1 };

function crossing(data: WeibullData, { from, level, direction }: Crossing): number | null {
  const above = (logShape: number): number => profileLikelihood(data, Math.exp(logShape)) - level;
  let [inside, step] = [from, 0.25];
  while (above(inside + direction * step) > 0) {
    inside += direction * step;
    step *= 1.5;
    if (step > 20) return null;
  }
  return newtonBetween(data, { inside, outside: inside + direction * step, above });
}

type Between = { readonly inside: number; readonly outside: number; readonly above: (at: number) => number };

function newtonBetween(data: WeibullData, between: Between): number {
  let { inside, outside } = between;
  let at = outside;
  for (let step = 0; step < 100; step += 1) {
    const excess = between.above(at);
    if (excess > 0) inside = at;
    else outside = at;
    const newton = at - excess / profileSlope(data, Math.exp(at)).slope;
    const isInside = (newton - inside) * (newton - outside) < 0;
    const next = isInside ? newton : (inside + outside) / 2;
    if (Math.abs(next - at) < 1e-13 * (1 + Math.abs(at))) return next;
    at = next;
  }
  return at;
}

/**
 * Limits of the age at which the cumulative hazard reaches `hazard`, in units of the greatest age: the extremes of that
 * age over all pairs of shape and scale whose likelihood lies at most `drop` below the top. For one shape the two scales
 * on that edge need no look at the data, so only the shape is searched.
 */
export function profileB10Limits(
  data: WeibullData,
  { shape, drop, shapesWithin, hazard }: Around & { readonly shapesWithin: Pair; readonly hazard: number },
): Pair {
  const top = profileLikelihood(data, shape);
  const logAgeAt = (logShape: number, side: 1 | -1): number => {
    const at = Math.exp(logShape);
    const sum = powerSums(data, at)[0];
    const left = Math.max(0, drop - (top - profileLikelihood(data, at, sum)));
    const logScale = (Math.log(sum / data.failures) - scaleShift(left / data.failures, side)) / at;
    return logScale + Math.log(hazard) / at;
  };
  const [from, to] = [Math.log(shapesWithin[0]), Math.log(shapesWithin[1])];
  const lower = leastOf((logShape) => logAgeAt(logShape, 1), from, to).value;
  const upper = -leastOf((logShape) => -logAgeAt(logShape, -1), from, to).value;
  return [Math.exp(lower), Math.exp(upper)];
}

/** The root d of exp(d) - 1 - d = `drop` that has the given sign: how far the hazard may be off by that drop. */
function scaleShift(drop: number, side: 1 | -1): number {
  if (drop === 0) return 0;
  // Both starts lie beyond the root, from where Newton steps come nearer from one side.
  let at = side > 0 ? Math.sqrt(2 * drop) : -Math.sqrt(2 * drop) - drop;
  for (let step = 0; step < 60; step += 1) {
    const next = at - (Math.expm1(at) - at - drop) / Math.expm1(at);
    if (Math.abs(next - at) <= 1e-15 * Math.abs(at)) return next;
    at = next;
  }
  return at;
}
