import { step, type Step } from "@/lib/kernel/explanation";
import { coilTemperatureIn, type CoilTemperature } from "./coil-from-log";
import { minutesAndSeconds } from "./duration";
import { shown } from "./figure";
import { fitFirstOrder, type FirstOrderFit, type FitRefusal } from "./first-order-fit";
import { faultIn, type RunFault } from "./run-fault";
import type { RunFinding } from "./run-finding";
import { findingsIn } from "./run-findings";
import { seriesOf, type RunLog, type RunLogSeries } from "./run-log";
import { energisedSpan, type RunSpan } from "./run-span";
import {
  steepestSlope,
  timeAbove,
  unknownSecondsOf,
  type RunLimit,
  type Slope,
  type TimeAbove,
} from "./run-temperature";
import { evenlyThinned, gapSecondsFor, median, samplesOf, type Sample } from "./samples";

export type Ambient = { readonly celsius: number; readonly method: "column" | "firstReading" };

/** What a run did to one temperature. */
export type TemperatureSummary = {
  readonly heading: string;
  readonly startCelsius: number;
  readonly peakCelsius: number;
  readonly peakAtS: number;
  readonly riseKelvin: number | null;
  readonly steepest: Slope | null;
  readonly above: readonly TimeAbove[];
  /** Seconds in pauses of the log, in which nothing is known. */
  readonly unknownS: number;
};

export type RunAnalysis = {
  readonly span: RunSpan;
  /** Seconds under voltage, to the fault where there is one. Without a fault the run is right-censored at it. */
  readonly ranSeconds: number;
  readonly fault: RunFault | null;
  readonly ambient: Ambient | null;
  /** One for each temperature column, in the order of the file. */
  readonly temperatures: readonly TemperatureSummary[];
  /** The temperature that rose highest, and null where none was logged. */
  readonly hottest: TemperatureSummary | null;
  /** First-order course of the hottest temperature up to the fault, or the code of why there is none. */
  readonly fit: { readonly of: string; readonly fit: FirstOrderFit } | null;
  readonly noFit: FitRefusal | null;
  readonly coil: CoilTemperature | null;
  readonly findings: readonly RunFinding[];
  readonly steps: readonly Step[];
};

export type RunOptions = {
  readonly limits?: readonly RunLimit[];
  /** The part's rated resistance at 20 °C, for the coil's temperature from U/I. */
  readonly coil?: { readonly ohmAt20: number; readonly k?: number };
  /** What the logged current flows through. A coil's must fall as it warms, a motor's follows its load. */
  readonly currentThrough?: "coil" | "load";
};

/** Everything the claim sheet and the bench draw from a run log, with the steps that explain it. */
export function analyseRun(log: RunLog, options: RunOptions = {}): RunAnalysis {
  const span = energisedSpan(log);
  const fault = faultIn(log, span);
  const ranSeconds = Math.max(0, (fault?.atS ?? span.toS) - span.fromS);
  const ambient = ambientIn(log);
  const limits = options.limits ?? [];
  const temperatures = seriesOf(log, "temperature").flatMap((series) => {
    const summary = summaryOf(log, series, { ambient, limits });
    return summary ? [summary] : [];
  });
  const hottest = temperatures.reduce<TemperatureSummary | null>(
    (best, one) => (best === null || one.peakCelsius > best.peakCelsius ? one : best),
    null,
  );
  const through = options.currentThrough ?? (seriesOf(log, "speed").length > 0 ? "load" : "coil");
  const coil = through === "coil" ? coilTemperatureIn(log, options.coil ?? null) : null;
  return {
    span,
    ranSeconds,
    fault,
    ambient,
    temperatures,
    hottest,
    ...fitOf(log, hottest, { fromS: span.fromS, endS: fault?.atS ?? span.toS }),
    coil,
    findings: findingsIn(log, span, { through, fault, ambient: ambient?.celsius ?? null }),
    steps: [...runSteps(fault, ranSeconds), ...(hottest ? temperatureSteps(hottest, ambient) : [])],
  };
}

/** The ambient column's middle value, else the first reading of the first temperature. */
function ambientIn(log: RunLog): Ambient | null {
  const column = seriesOf(log, "ambient")[0];
  const middle = column ? median(column.values.filter((value): value is number => value !== null)) : null;
  if (middle !== null) return { celsius: middle, method: "column" };
  const first = seriesOf(log, "temperature")[0]?.values.find((value) => value !== null) ?? null;
  return first === null ? null : { celsius: first, method: "firstReading" };
}

function summaryOf(
  log: RunLog,
  series: RunLogSeries,
  { ambient, limits }: { ambient: Ambient | null; limits: readonly RunLimit[] },
): TemperatureSummary | null {
  const samples = samplesOf(log.timeS, series.values);
  const first = samples[0];
  if (!first) return null;
  const peak = samples.reduce((best, sample) => (sample.value > best.value ? sample : best), first);
  const gapS = gapSecondsFor(log.stepS);
  return {
    heading: series.heading,
    startCelsius: first.value,
    peakCelsius: peak.value,
    peakAtS: peak.timeS,
    riseKelvin: ambient === null ? null : peak.value - ambient.celsius,
    steepest: steepestSlope(samples, log.stepS),
    above: limits.map((limit) => timeAbove(samples, limit, gapS)),
    unknownS: unknownSecondsOf(samples, gapS),
  };
}

// A quick logger's hundred thousand rows say nothing about a time constant that ten thousand do not.
const MOST_FITTED = 10_000;

function fitOf(
  log: RunLog,
  hottest: TemperatureSummary | null,
  { fromS, endS }: { fromS: number; endS: number },
): Pick<RunAnalysis, "fit" | "noFit"> {
  const series = seriesOf(log, "temperature").find(({ heading }) => heading === hottest?.heading);
  if (!series) return { fit: null, noFit: null };
  const within = ({ timeS }: Sample): boolean => timeS >= fromS && timeS <= endS;
  const samples = evenlyThinned(samplesOf(log.timeS, series.values).filter(within), MOST_FITTED);
  const fit = fitFirstOrder(samples.map(({ timeS, value }) => ({ timeS, celsius: value })));
  return fit.ok
    ? { fit: { of: series.heading, fit: fit.value }, noFit: null }
    : { fit: null, noFit: fit.code };
}

const FAULT_RULE: Readonly<Record<RunFault["method"], string>> = {
  markedRow: "faultMarkedRow",
  currentLost: "faultCurrentLost",
  currentJump: "faultCurrentJump",
  speedLost: "faultSpeedLost",
};
const RISE_RULE: Readonly<Record<Ambient["method"], string>> = {
  column: "riseOverColumn",
  firstReading: "riseOverFirstReading",
};

function runSteps(fault: RunFault | null, ranSeconds: number): Step[] {
  const { minutes, seconds } = minutesAndSeconds(fault?.afterS ?? ranSeconds);
  const result = (fault?.afterS ?? ranSeconds).toFixed(0);
  if (!fault) return [step("ranWithoutFault", result, { minutes, seconds })];
  return [step(FAULT_RULE[fault.method], result, { minutes, seconds, line: fault.line })];
}

function temperatureSteps(summary: TemperatureSummary, ambient: Ambient | null): Step[] {
  const { peakCelsius, riseKelvin, steepest, heading } = summary;
  const peak = step("peak", peakCelsius.toFixed(1), { heading, ...minutesAndSeconds(summary.peakAtS) });
  const rise =
    riseKelvin === null || ambient === null
      ? []
      : [
          step(RISE_RULE[ambient.method], riseKelvin.toFixed(1), {
            peakCelsius: shown(peakCelsius, 1),
            ambientCelsius: shown(ambient.celsius, 1),
          }),
        ];
  const slope = steepest
    ? [step("steepest", steepest.kelvinPerMinute.toFixed(1), minutesAndSeconds(steepest.fromS))]
    : [];
  const above = summary.above.map(({ limit, seconds }) =>
    step("timeAbove", seconds.toFixed(0), {
      limit: limit.name,
      celsius: limit.celsius,
      ...minutesAndSeconds(seconds),
    }),
  );
  return [peak, ...rise, ...slope, ...above];
}
