import type { Observation } from "@/lib/reliability/observation";
import { weibullFit, type WeibullEstimate } from "@/lib/reliability/weibull";

/** The fit of rows that have one, at 95 %. */
export function fitted(rows: readonly Observation[]): WeibullEstimate {
  const fit = weibullFit(rows, { confidence: 0.95 });
  if (fit.kind === "none") throw new Error(fit.reason);
  return fit;
}

/** The log-likelihood written out row by row. */
export const logLikelihood = (rows: readonly Observation[], shape: number, scale: number): number =>
  rows.reduce((sum, { ageDays, entryDays = 0, failed, count = 1 }) => {
    const hazard = (ageDays / scale) ** shape - (entryDays / scale) ** shape;
    const density = failed ? Math.log(shape / scale) + (shape - 1) * Math.log(ageDays / scale) : 0;
    return sum + count * (density - hazard);
  }, 0);
