import { kaplanMeier } from "@/lib/reliability/kaplan-meier";
import { logRank } from "@/lib/reliability/log-rank";
import { weibullFit, type NoWeibullReason } from "@/lib/reliability/weibull";
import { CONFIDENCE, estimateOf } from "./estimate";
import type { Observed } from "./observations";
import type { CurveStep, Estimate, NoWeibull } from "./view";

/** The falls of a Kaplan-Meier curve with log-log limits. */
export const curveOf = (rows: readonly Observed[]): CurveStep[] =>
  kaplanMeier(rows, { confidence: CONFIDENCE }).points.map(
    ({ ageDays, survival, atRisk, failed, logLog }) => ({
      ageDays,
      survival,
      atRisk,
      failed,
      lower: logLog?.[0] ?? null,
      upper: logLog?.[1] ?? null,
    }),
  );

export type Fit =
  | { readonly kind: "none"; readonly reason: NoWeibull }
  | {
      readonly kind: "fit";
      readonly shape: Estimate;
      readonly scaleDays: Estimate;
      readonly b10Days: Estimate;
      readonly b10Method: "profile" | "delta";
    };

const NO_FIT: Readonly<Record<NoWeibullReason, NoWeibull>> = {
  noFailures: "noFailures",
  failureAtAgeZero: "ageZero",
  allFailuresAtGreatestAge: "allAtGreatestAge",
  noMaximum: "other",
};

/** The Weibull fit with limits, those of B10 by its profile where there are five failures, or why there is none. */
export function weibullOf(rows: readonly Observed[]): Fit {
  const fit = weibullFit(rows, { confidence: CONFIDENCE });
  if (fit.kind === "none") return { kind: "none", reason: NO_FIT[fit.reason] };
  return {
    kind: "fit",
    shape: estimateOf(fit.shape, fit.shapeLimits),
    scaleDays: estimateOf(fit.scaleDays, fit.scaleLimits),
    b10Days: estimateOf(fit.b10Days, fit.profileB10Limits ?? fit.b10Limits),
    b10Method: fit.profileB10Limits ? "profile" : "delta",
  };
}

/** The log-rank test of all curves; null where they cannot be compared. */
export function logRankOf(groups: readonly (readonly Observed[])[]): { p: number; chiSquare: number } | null {
  const { p, chiSquare } = logRank(groups);
  return p === null || chiSquare === null ? null : { p, chiSquare };
}
