import { seriesOf, type RunLog } from "./run-log";
import { samplesOf, type Sample } from "./samples";

/** When the part was under voltage. Without a current or voltage in the log it is the whole log. */
export type RunSpan = {
  readonly fromS: number;
  readonly toS: number;
  /** Where switching on and off was read from. */
  readonly method: "current" | "voltage" | "wholeLog";
};

/** The electrical samples of a log with the level that counts as "on": a tenth of what they usually reach. */
export type Electrical = {
  readonly samples: readonly Sample[];
  readonly usual: number;
  readonly onFrom: number;
};

/** The first series of a quantity as electrical samples; null where the log has none or it is never on. */
export function electricalOf(log: RunLog, quantity: "current" | "voltage" | "speed"): Electrical | null {
  const series = seriesOf(log, quantity)[0];
  if (!series) return null;
  const samples = samplesOf(log.timeS, series.values).map((sample) => ({
    ...sample,
    value: Math.abs(sample.value),
  }));
  const sorted = samples.map(({ value }) => value).toSorted((first, second) => first - second);
  const usual = sorted[Math.floor(0.9 * (sorted.length - 1))] ?? 0;
  return usual > 0 ? { samples, usual, onFrom: usual / 10 } : null;
}

/** From the first moment under voltage to the last. A log that starts energised counts from its own zero. */
export function energisedSpan(log: RunLog): RunSpan {
  const whole: RunSpan = { fromS: 0, toS: log.timeS.at(-1) ?? 0, method: "wholeLog" };
  const current = electricalOf(log, "current");
  const electrical = current ?? electricalOf(log, "voltage");
  if (!electrical) return whole;
  const first = electrical.samples.findIndex(({ value }) => value >= electrical.onFrom);
  const last = electrical.samples.findLast(({ value }) => value >= electrical.onFrom);
  return {
    fromS: first <= 0 ? 0 : (electrical.samples[first]?.timeS ?? 0),
    toS: last?.timeS ?? whole.toS,
    method: current ? "current" : "voltage",
  };
}
