import { copiedBlockIn } from "./copied-rows";
import { minutesAndSeconds } from "./duration";
import { shown } from "./figure";
import { electricalFindings } from "./run-findings-electrical";
import type { RunFault } from "./run-fault";
import type { RunFinding } from "./run-finding";
import { seriesOf, type RunLog } from "./run-log";
import type { RunSpan } from "./run-span";
import { leastSquaresSlope } from "./run-temperature";
import { gapSecondsFor, meansBy, samplesOf, type Sample } from "./samples";

export type FindingFacts = {
  readonly through: "coil" | "load";
  readonly fault: RunFault | null;
  readonly ambient: number | null;
};

/**
 * The sanity tests of an uploaded log (common practice, no source for the thresholds): copied rows, joined files, a
 * probe that fell off, copper whose current does not fall, an intermittent joint. None of them accuses anybody.
 */
export function findingsIn(log: RunLog, span: RunSpan, facts: FindingFacts): RunFinding[] {
  const endS = facts.fault?.atS ?? span.toS;
  return [
    ...log.notes
      .filter((note) => note.code === "clockStep")
      .map(({ detail }) => ({ code: "clockStep" as const, detail })),
    ...gapInLog(log),
    ...identicalRows(log),
    ...(span.method === "wholeLog" ? [] : probeFindings(log, { fromS: span.fromS, endS }, facts.ambient)),
    ...(facts.through === "coil" ? electricalFindings(log, span.fromS, endS) : []),
    ...ambientFindings(log),
  ];
}

function gapInLog(log: RunLog): RunFinding[] {
  const gapS = gapSecondsFor(log.stepS);
  const pauses = log.timeS.flatMap((time, index) => {
    const pauseS = time - (log.timeS[index - 1] ?? time);
    return pauseS > gapS ? [{ pauseS, line: log.lines[index] ?? 0 }] : [];
  });
  const longest = pauses.toSorted((first, second) => second.pauseS - first.pauseS)[0];
  if (!longest) return [];
  return [
    {
      code: "gapInLog",
      detail: { gaps: pauses.length, line: longest.line, ...minutesAndSeconds(longest.pauseS) },
    },
  ];
}

function identicalRows(log: RunLog): RunFinding[] {
  const block = copiedBlockIn(log);
  return block === null ? [] : [{ code: "identicalRows", detail: block }];
}

function probeFindings(
  log: RunLog,
  { fromS, endS }: { fromS: number; endS: number },
  ambient: number | null,
): RunFinding[] {
  return seriesOf(log, "temperature").flatMap(({ heading, values }) => {
    const samples = samplesOf(log.timeS, values).filter(({ timeS }) => timeS >= fromS && timeS <= endS);
    return [...flat(heading, samples, ambient), ...falling(log, heading, samples)];
  });
}

const FLAT_S = 300;
const FLAT_SAMPLES = 10;

/** A probe that never warms though the part is fed, or that freezes in the middle of a rise: it fell off or broke. */
function flat(heading: string, samples: readonly Sample[], ambient: number | null): RunFinding[] {
  const first = samples[0];
  const lastS = samples.at(-1)?.timeS ?? 0;
  if (!first || samples.length < FLAT_SAMPLES || lastS - first.timeS < FLAT_S) return [];
  const levels = samples.reduce(
    ([least, most], { value }) => [Math.min(least, value), Math.max(most, value)] as const,
    [first.value, first.value] as const,
  );
  const nearAmbient = ambient === null || Math.abs(levels[1] - ambient) < 3;
  if (levels[1] - levels[0] < 0.5 && nearAmbient)
    return [
      {
        code: "flatTemperature",
        detail: { heading, celsius: shown(first.value, 1), ...minutesAndSeconds(lastS - first.timeS) },
      },
    ];
  const frozen = frozenStretch(samples);
  return frozen === null
    ? []
    : [
        {
          code: "flatTemperature",
          detail: { heading, celsius: shown(frozen.celsius, 1), ...minutesAndSeconds(frozen.seconds) },
        },
      ];
}

function frozenStretch(samples: readonly Sample[]): { celsius: number; seconds: number } | null {
  let start = 0;
  for (const [place, { value, timeS }] of samples.entries()) {
    if (value !== samples[start]?.value) start = place;
    const from = samples[start];
    if (!from || place - start + 1 < FLAT_SAMPLES || timeS - from.timeS < FLAT_S) continue;
    const before = samples
      .slice(Math.max(0, start - 20), start)
      .filter((sample) => from.timeS - sample.timeS <= 120);
    const slope = before.length < 3 ? null : leastSquaresSlope(before);
    // At the end of a run a temperature settles; frozen is only what was rising clearly a moment before.
    if (slope !== null && slope * 60 > 0.5) return { celsius: value, seconds: timeS - from.timeS };
  }
  return null;
}

const FALL_KELVIN = 3;

/** A temperature that falls while the current stays as it was: a probe working loose, or a fan nobody mentioned. */
function falling(log: RunLog, heading: string, samples: readonly Sample[]): RunFinding[] {
  const widthS = Math.max(60, 4 * log.stepS);
  const temperatures = meansBy(samples, widthS);
  const feed = seriesOf(log, "current")[0] ?? seriesOf(log, "voltage")[0];
  const feeds = new Map(
    meansBy(samplesOf(log.timeS, feed?.values ?? []), widthS).map(({ cell, value }) => [cell, value]),
  );
  let peak = temperatures[0];
  let deepest = { kelvin: 0, timeS: 0 };
  for (const mean of temperatures) {
    if (!peak || mean.value > peak.value) peak = mean;
    const [before, now] = [feeds.get(peak.cell) ?? 0, feeds.get(mean.cell) ?? 0];
    const fed = before > 0 && Math.abs(now / before - 1) < 0.2;
    if (fed && peak.value - mean.value > deepest.kelvin)
      deepest = { kelvin: peak.value - mean.value, timeS: peak.timeS };
  }
  if (deepest.kelvin < FALL_KELVIN) return [];
  return [
    {
      code: "fallingWhileEnergised",
      detail: { heading, kelvin: shown(deepest.kelvin, 1), ...minutesAndSeconds(deepest.timeS) },
    },
  ];
}

function ambientFindings(log: RunLog): RunFinding[] {
  const column = seriesOf(log, "ambient")[0]?.values.filter((value) => value !== null) ?? [];
  const first = column[0];
  if (first === undefined) return [];
  const span = column.reduce(
    ([least, most], value) => [Math.min(least, value), Math.max(most, value)] as const,
    [first, first] as const,
  );
  const start = seriesOf(log, "temperature")[0]?.values.find((value) => value !== null) ?? first;
  return [
    ...(span[1] - span[0] > 5
      ? [{ code: "ambientDrift" as const, detail: { kelvin: shown(span[1] - span[0], 1) } }]
      : []),
    ...(start - first > 3
      ? [{ code: "startsWarm" as const, detail: { kelvin: shown(start - first, 1) } }]
      : []),
  ];
}
