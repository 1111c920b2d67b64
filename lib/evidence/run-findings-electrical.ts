import { resistancesIn } from "./coil-from-log";
import { shown } from "./figure";
import type { RunFinding } from "./run-finding";
import { seriesOf, type MeasuredQuantity, type RunLog } from "./run-log";
import { meansBy, samplesOf, type CellMean, type Sample } from "./samples";
import { CONDUCTOR_K } from "./winding";

const WARMING_KELVIN = 20;
const JUMP = 0.1;
const JUMPS_TO_NAME = 3;

/** What copper must do and a joint must not: the current falls as the coil warms, U/I does not jump. */
export const electricalFindings = (log: RunLog, fromS: number, endS: number): RunFinding[] => [
  ...currentNotFalling(log, fromS, endS),
  ...resistanceJumping(log, fromS, endS),
];

/**
 * Compares the coolest and the hottest minute after it. Copper that warms by 20 K or more must draw clearly less;
 * less than a quarter of the fall it owes is a wrong probe, a shorted winding or a made-up table.
 */
function currentNotFalling(log: RunLog, fromS: number, endS: number): RunFinding[] {
  const widthS = Math.max(60, 4 * log.stepS);
  const means = (quantity: MeasuredQuantity): CellMean[] =>
    meansBy(within(samplesOf(log.timeS, seriesOf(log, quantity)[0]?.values ?? []), fromS, endS), widthS);
  const temperatures = means("temperature");
  const currents = byCell(means("current"));
  const voltages = byCell(means("voltage"));
  const known = temperatures.filter(({ cell }) => currents.has(cell));
  const cold = known[0];
  const hot = known.reduce<CellMean | undefined>(
    (best, one) => (best && best.value >= one.value ? best : one),
    cold,
  );
  if (!cold || !hot || hot.value - cold.value < WARMING_KELVIN) return [];

  const [from, to] = [currents.get(cold.cell) ?? 0, currents.get(hot.cell) ?? 0];
  const supply = (voltages.get(hot.cell) ?? 1) / (voltages.get(cold.cell) ?? 1);
  const owed = 1 - (CONDUCTOR_K.copper + cold.value) / (CONDUCTOR_K.copper + hot.value);
  const fell = from > 0 && supply > 0 ? 1 - to / from / supply : 1;
  if (fell >= owed / 4) return [];
  const detail = {
    kelvin: shown(hot.value - cold.value, 0),
    fromAmpere: shown(from, 3),
    toAmpere: shown(to, 3),
  };
  return [{ code: "currentNotFalling", detail: { ...detail, owedPercent: shown(100 * owed, 0) } }];
}

/** U/I that leaps by a tenth from one row to the next, three times or more: a joint that comes and goes. */
function resistanceJumping(log: RunLog, fromS: number, endS: number): RunFinding[] {
  const ohms = within(samplesOf(log.timeS, resistancesIn(log) ?? []), fromS, endS);
  const amperes = seriesOf(log, "current")[0]?.values ?? [];
  const digit = smallestStep(amperes);
  const jumps = ohms.filter((sample, place) => {
    const before = ohms[place - 1];
    if (!before || before.index !== sample.index - 1) return false;
    const change = Math.abs((amperes[sample.index] ?? 0) - (amperes[before.index] ?? 0));
    // A meter that shows one digit more or less makes no joint.
    return Math.abs(Math.log(sample.value / before.value)) > Math.log(1 + JUMP) && change > 1.5 * digit;
  });
  const first = jumps[0];
  if (!first || jumps.length < JUMPS_TO_NAME) return [];
  return [{ code: "resistanceJumping", detail: { times: jumps.length, line: log.lines[first.index] ?? 0 } }];
}

function smallestStep(values: readonly (number | null)[]): number {
  const levels = [...new Set(values.filter((value): value is number => value !== null))].toSorted(
    (a, b) => a - b,
  );
  const steps = levels.slice(1).map((level, place) => level - (levels[place] ?? level));
  return steps.reduce((least, one) => Math.min(least, one), Number.POSITIVE_INFINITY);
}

const within = (samples: readonly Sample[], fromS: number, endS: number): Sample[] =>
  samples.filter(({ timeS }) => timeS >= fromS && timeS < endS);

const byCell = (means: readonly CellMean[]): Map<number, number> =>
  new Map(means.map(({ cell, value }) => [cell, value]));
