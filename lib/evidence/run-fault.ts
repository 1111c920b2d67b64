import type { RunLog } from "./run-log";
import { electricalOf, type Electrical, type RunSpan } from "./run-span";
import { median, type Sample } from "./samples";

export type FaultMethod = "markedRow" | "currentLost" | "currentJump" | "speedLost";

/** A fault in a run. `certain` is false where the log alone cannot tell it from somebody switching off. */
export type RunFault = {
  /** Seconds from switching on. */
  readonly afterS: number;
  /** The same moment on the log's own scale. */
  readonly atS: number;
  readonly method: FaultMethod;
  readonly certain: boolean;
  readonly line: number;
  /** The remark in a marked row. */
  readonly text: string | null;
};

type Break = { readonly index: number; readonly method: FaultMethod; readonly certain: boolean };

/** The fault of a run: a row that marks it, else the earliest break in current or speed; null where there is none. */
export function faultIn(log: RunLog, span: RunSpan): RunFault | null {
  const marked = log.events.find((event) => event.isFault && (log.timeS[event.index] ?? 0) >= span.fromS);
  const found: Break | null = marked
    ? { index: marked.index, method: "markedRow", certain: true }
    : (breaksIn(log, span).toSorted((first, second) => first.index - second.index)[0] ?? null);
  if (!found) return null;
  const atS = log.timeS[found.index] ?? 0;
  return {
    afterS: atS - span.fromS,
    atS,
    method: found.method,
    certain: found.certain,
    line: log.lines[found.index] ?? 0,
    text: marked?.text ?? null,
  };
}

function breaksIn(log: RunLog, span: RunSpan): Break[] {
  const current = electricalOf(log, "current");
  const voltage = electricalOf(log, "voltage");
  const speed = electricalOf(log, "speed");
  return [
    ...currentLost(current, voltage, span),
    ...speedLost(speed, current ?? voltage, span),
    ...currentJump(current, speed, span),
  ];
}

/** The current falls to nothing while the voltage stays: a circuit that opened. With the voltage gone it was switched off. */
function currentLost(current: Electrical | null, voltage: Electrical | null, span: RunSpan): Break[] {
  const lost = current ? lossIn(current, span) : null;
  if (!lost) return [];
  if (!voltage) return [{ index: lost.index, method: "currentLost", certain: false }];
  return isOn(voltage, lost, 0.5) ? [{ index: lost.index, method: "currentLost", certain: true }] : [];
}

/** The motor stops while it is still fed: the brake grabbed or something jammed. */
function speedLost(speed: Electrical | null, feed: Electrical | null, span: RunSpan): Break[] {
  const lost = speed ? lossIn(speed, span) : null;
  if (!lost) return [];
  if (!feed) return [{ index: lost.index, method: "speedLost", certain: false }];
  return isOn(feed, lost, 0.1) ? [{ index: lost.index, method: "speedLost", certain: true }] : [];
}

const SAMPLES_TO_BE_SURE = 3;
const SAMPLES_BEFORE = 10;

/** The first sample from which a quantity that was on stays off, for three samples or to the end of the log. */
function lossIn({ samples, onFrom }: Electrical, span: RunSpan): Sample | null {
  const first = samples.findIndex(({ value, timeS }) => value >= onFrom && timeS >= span.fromS);
  if (first === -1) return null;
  const at = samples.findIndex(
    (_, place) =>
      place > first && samples.slice(place, place + SAMPLES_TO_BE_SURE).every(({ value }) => value < onFrom),
  );
  return samples[at] ?? null;
}

function isOn({ samples, usual }: Electrical, at: Sample, share: number): boolean {
  const there = samples.find(({ index }) => index >= at.index);
  return there !== undefined && there.value >= share * usual;
}

/** The current rises by half over what it was and stays there. Certain where the motor slows at the same time. */
function currentJump(current: Electrical | null, speed: Electrical | null, span: RunSpan): Break[] {
  if (!current) return [];
  const { samples, onFrom } = current;
  for (let place = SAMPLES_BEFORE; place < samples.length - 1; place += 1) {
    const sample = samples[place];
    if (!sample || sample.timeS < span.fromS) continue;
    const before = median(samples.slice(place - SAMPLES_BEFORE, place).map(({ value }) => value)) ?? 0;
    const stays = samples.slice(place, place + SAMPLES_TO_BE_SURE).every(({ value }) => value > 1.5 * before);
    if (before >= onFrom && stays)
      return [
        { index: sample.index, method: "currentJump", certain: speed !== null && !isOn(speed, sample, 0.5) },
      ];
  }
  return [];
}
