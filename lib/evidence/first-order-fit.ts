import { step, type Step } from "@/lib/kernel/explanation";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { profileAt, type CurveStart, type Profile, type TimedCelsius } from "./first-order-profile";
import { shown } from "./figure";
import { minimumOf } from "./minimum";
import { evenlyThinned } from "./samples";
import { standardErrors } from "./standard-errors";
import { threePointCurve, type ThermalCurve } from "./thermal-curve";

export type FitInterval = { readonly from: number; readonly to: number };

/** A fitted first-order course with its uncertainty. Read the figures only where `longEnough` is true. */
export type FirstOrderFit = {
  readonly curve: ThermalCurve;
  /** Moment the curve starts at, on the time scale of the samples. */
  readonly startS: number;
  readonly standardErrors: {
    readonly finalCelsius: number;
    readonly tauS: number;
    readonly startCelsius: number | null;
  };
  /** 95 % limits, for errors that differ from sample to sample; those of tau on its logarithm. */
  readonly interval95: { readonly finalCelsius: FitInterval; readonly tauS: FitInterval };
  readonly residualKelvin: number;
  /** Likeness of neighbouring errors, -1 to 1. Well above zero the limits are too narrow: the course is not of first order. */
  readonly neighbourLikeness: number;
  readonly samples: number;
  readonly ranS: number;
  /** Whether the run lasted at least one time constant, so that the figures may be read. */
  readonly longEnough: boolean;
  readonly why: Step;
};

export type FitRefusal = "fitTooFewSamples" | "fitNotFinite" | "fitFlat" | "fitStraightLine" | "fitStep";

/**
 * Least-squares fit of T(t) = final - (final - start) exp(-t/tau). For each tau the rest is linear, so only tau is
 * searched (variable projection); the three-point formula joins the first guesses. The start is free unless given.
 * Refuses: fewer than six samples (five with the start given), no finite figures, no change beyond the noise, a line
 * still straight (the run is far too short), a step without a course.
 */
export function fitFirstOrder(
  samples: readonly TimedCelsius[],
  start: { readonly celsius: number; readonly atS: number } | null = null,
): Outcome<FirstOrderFit, FitRefusal> {
  const parameters = start === null ? 3 : 2;
  if (samples.length < parameters + 3)
    return refuse("fitTooFewSamples", { samples: samples.length, needed: parameters + 3 });
  if (!samples.every(({ timeS, celsius }) => Number.isFinite(timeS) && Number.isFinite(celsius)))
    return refuse("fitNotFinite");
  const from: CurveStart = start ?? { atS: samples[0]?.timeS ?? 0, celsius: null };
  const spanS = (samples.at(-1)?.timeS ?? from.atS) - from.atS;
  if (!(spanS > 0)) return refuse("fitTooFewSamples", { samples: 1, needed: parameters + 3 });

  const at = (logTau: number, among = samples): Profile => profileAt(Math.exp(logTau), among, from);
  const [least, most] = [Math.log(spanS / (20 * samples.length)), Math.log(spanS * 200)];
  const thinned = evenlyThinned(samples, 400);
  const guesses = [...evenly(least, most, 60), ...threePointGuess(thinned, spanS)];
  const logTau = minimumOf(
    (value) => at(value, thinned).rss,
    (value) => at(value).rss,
    guesses,
  );
  if (logTau === null || !standsOut(at(logTau), samples)) return refuse("fitFlat");
  if (logTau > most - 0.5) return refuse("fitStraightLine", { ranS: shown(spanS, 0) });
  if (logTau < least + 0.5) return refuse("fitStep");
  return described(at(logTau), samples, from);
}

/** Whether the course explains clearly more than a constant would: by far more than its parameters earn by chance. */
function standsOut({ rss }: Profile, samples: readonly TimedCelsius[]): boolean {
  const mean = samples.reduce((sum, { celsius }) => sum + celsius, 0) / samples.length;
  const total = samples.reduce((sum, { celsius }) => sum + (celsius - mean) ** 2, 0);
  const rounding = samples.length * (1e-9 * (1 + Math.abs(mean))) ** 2;
  return total > rounding && total - rss > 20 * (rss / samples.length);
}

function described(
  profile: Profile,
  samples: readonly TimedCelsius[],
  from: CurveStart,
): Outcome<FirstOrderFit, FitRefusal> {
  const { curve, rss } = profile;
  const freedom = samples.length - (from.celsius === null ? 3 : 2);
  const errors = standardErrors({ curve, variance: rss / freedom }, samples, from);
  if (errors === null) return refuse("fitFlat");
  const reach = studentT95(freedom);
  const ranS = (samples.at(-1)?.timeS ?? from.atS) - from.atS;
  const { finalCelsius, tauS } = curve;
  return ok({
    curve,
    startS: from.atS,
    standardErrors: {
      finalCelsius: errors.finalCelsius,
      tauS: tauS * errors.logTau,
      startCelsius: errors.startCelsius,
    },
    interval95: {
      finalCelsius: {
        from: finalCelsius - reach * errors.finalCelsius,
        to: finalCelsius + reach * errors.finalCelsius,
      },
      tauS: { from: tauS * Math.exp(-reach * errors.logTau), to: tauS * Math.exp(reach * errors.logTau) },
    },
    residualKelvin: Math.sqrt(rss / freedom),
    neighbourLikeness: neighbourLikeness(profile.residuals),
    samples: samples.length,
    ranS,
    ...judgement(ranS, tauS),
  });
}

/** A run shorter than its own time constant has not bent enough to say where it would end. */
function judgement(ranS: number, tauS: number): { longEnough: boolean; why: Step } {
  const longEnough = ranS >= tauS;
  const input = { ranMinutes: shown(ranS / 60, 1), tauMinutes: shown(tauS / 60, 1) };
  return {
    longEnough,
    why: step(longEnough ? "fitLongEnough" : "fitTooShort", longEnough ? "yes" : "no", input),
  };
}

/** Correlation of each error with the next; zero for a perfect fit. */
function neighbourLikeness(residuals: readonly number[]): number {
  let [together, alone] = [0, 0];
  for (const [index, residual] of residuals.entries()) {
    together += residual * (residuals[index - 1] ?? 0);
    alone += residual * residual;
  }
  return alone > 0 ? together / alone : 0;
}

function threePointGuess(samples: readonly TimedCelsius[], spanS: number): number[] {
  const third = Math.floor(samples.length / 3);
  const mean = (part: readonly TimedCelsius[]): number =>
    part.reduce((sum, sample) => sum + sample.celsius, 0) / Math.max(1, part.length);
  const parts = [samples.slice(0, third), samples.slice(third, 2 * third), samples.slice(2 * third)].map(
    mean,
  );
  const curve = threePointCurve([parts[0] ?? 0, parts[1] ?? 0, parts[2] ?? 0], spanS / 3);
  return curve.ok ? [Math.log(curve.value.tauS)] : [];
}

const evenly = (from: number, to: number, count: number): number[] =>
  Array.from({ length: count }, (_, index) => from + ((to - from) * index) / (count - 1));

/** 97.5 % quantile of Student's t by its expansion in 1/freedom (Abramowitz and Stegun 26.7.5, from memory). */
export function studentT95(freedom: number): number {
  const z = 1.959963984540054;
  const terms = [
    (z ** 3 + z) / 4,
    (5 * z ** 5 + 16 * z ** 3 + 3 * z) / 96,
    (3 * z ** 7 + 19 * z ** 5 + 17 * z ** 3 - 15 * z) / 384,
    (79 * z ** 9 + 776 * z ** 7 + 1482 * z ** 5 - 1920 * z ** 3 - 945 * z) / 92_160,
  ];
  return terms.reduce((sum, term, index) => sum + term / freedom ** (index + 1), z);
}
