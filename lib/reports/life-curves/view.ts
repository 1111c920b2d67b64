import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Grade, GradeReason } from "@/lib/reliability/batch-grade";
import type { LeftOut, MonthCell } from "./observations";
import type { LifeCurvesQuery } from "./schema";

/** A figure with its 95 % limits; `upper` is null where there is none. */
export type Estimate = { readonly value: number; readonly lower: number; readonly upper: number | null };

/** One batch against the other batches of its part. */
export type BatchLine = {
  /** How the address names it. */
  readonly key: string;
  readonly partNumber: string;
  readonly madeOn: CalendarDay | null;
  readonly units: number;
  readonly failed: number;
  readonly deadOnArrival: number;
  readonly undecided: number;
  readonly oldestDays: number;
  readonly unitMonths: number;
  /** Failures per 1,000 months in service; null without any. */
  readonly rate: Estimate | null;
  /** By the rate of the others; null where there are none at its ages. */
  readonly expected: number | null;
  /** Observed over expected; null where nothing is expected. */
  readonly ratio: Estimate | null;
  readonly shrunken: number | null;
  readonly adjustedP: number | null;
  /** The ratio with the largest workshop left out. */
  readonly ratioWithout: Estimate | null;
  readonly grade: Grade;
  readonly reason: GradeReason;
  /** Its place among the drawn series, or null. */
  readonly style: number | null;
};

export type CurveStep = {
  readonly ageDays: number;
  readonly survival: number;
  readonly lower: number | null;
  readonly upper: number | null;
  readonly atRisk: number;
  readonly failed: number;
};

/** Under the curve: at risk at an age, failed and ended without a failure since the age before. */
export type RiskCell = {
  readonly months: number;
  readonly atRisk: number;
  readonly failed: number;
  readonly ended: number;
};

/** A batch drawn, or the others pooled, whose key is null. */
export type Series = {
  readonly key: string | null;
  readonly units: number;
  readonly failed: number;
  readonly oldestDays: number;
  readonly curve: readonly CurveStep[];
  /** The age from which fewer than ten were at risk; null where that never was. */
  readonly thinFrom: number | null;
  /** The maker's curve if every undecided claim were upheld; null where the screen counts them already. */
  readonly atMost: readonly CurveStep[] | null;
  readonly risk: readonly RiskCell[];
  readonly weibull: Weibull;
};

export type Weibull =
  | {
      readonly kind: "fit";
      readonly failed: number;
      readonly shape: Estimate;
      readonly scaleDays: Estimate;
      readonly b10Days: Estimate;
      readonly b10Method: "profile" | "delta";
      /** Few failures: the limits are wide, and the fit is easily misled. */
      readonly isThin: boolean;
      readonly says: "early" | "steady" | "wearing" | "unclear";
      /** Ages in days and failed shares, for the probability plot. */
      readonly points: readonly { readonly ageDays: number; readonly failedShare: number }[];
    }
  | { readonly kind: "none"; readonly reason: NoWeibull; readonly failed: number };

export const NO_WEIBULL = ["noFailures", "ageZero", "allAtGreatestAge", "other"] as const;
export type NoWeibull = (typeof NO_WEIBULL)[number];

/** What curves were compared by, and the effect the p-value is never shown without. */
export type Comparison = {
  readonly key: string;
  readonly p: number;
  readonly chiSquare: number;
  readonly ages: { readonly months: number; readonly one: number; readonly others: number };
};

export type MonthLine = MonthCell & {
  readonly rate: Estimate | null;
  /** The rate of the others at the same ages. */
  readonly others: number | null;
};

/** How service starts were found. */
export type Starts = {
  readonly rule: "fitting" | "lag";
  readonly recorded: number;
  readonly due: number;
  readonly lagDays: number | null;
  readonly lagFittings: number;
  readonly assumed: number;
  readonly units: number;
};

export type PartChoice = {
  readonly partNumber: string;
  readonly name: string;
  readonly family: string;
  readonly claims: number;
};

export type LifeCurvesView = {
  readonly parts: readonly PartChoice[];
  readonly part: PartChoice & { readonly partNumbers: readonly string[] };
  /** The view with everything that was left to us filled in. */
  readonly query: LifeCurvesQuery & { readonly part: string; readonly cut: CalendarDay };
  readonly batches: readonly BatchLine[];
  readonly comparisons: number;
  readonly series: readonly Series[];
  readonly rest: Series | null;
  readonly compared: Comparison | null;
  /** Months in service of the first batch drawn. */
  readonly months: readonly MonthLine[];
  readonly starts: Starts;
  readonly leftOut: LeftOut & { readonly withoutUnit: number };
  readonly counts: {
    readonly units: number;
    readonly failed: number;
    readonly undecided: number;
    readonly declined: number;
    readonly removed: number;
    readonly coverEnded: number;
    readonly running: number;
  };
  readonly largest: { readonly name: string; readonly claims: number } | null;
};
