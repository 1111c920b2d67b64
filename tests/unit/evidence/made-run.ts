import type { MeasuredQuantity, RunLog, RunLogNote } from "@/lib/evidence/run-log";
import { median } from "@/lib/evidence/samples";

const UNIT = { temperature: "°C", ambient: "°C", current: "A", voltage: "V", speed: "rpm" } as const;

type Column = (timeS: number, index: number) => number | null;

/** A log made of functions of time: one row every `stepS` seconds from 0 to `lastS`. */
export function madeRun(input: {
  lastS: number;
  stepS?: number;
  columns: Partial<Record<MeasuredQuantity, Column>>;
  events?: readonly { atS: number; text: string; isFault: boolean }[];
  notes?: readonly RunLogNote[];
  without?: (timeS: number) => boolean;
}): RunLog {
  const stepS = input.stepS ?? 10;
  const all = Array.from({ length: Math.floor(input.lastS / stepS) + 1 }, (_, index) => index * stepS);
  const timeS = all.filter((time) => !input.without?.(time));
  const quantities: readonly MeasuredQuantity[] = ["temperature", "ambient", "current", "voltage", "speed"];
  const series = quantities.flatMap((quantity) => {
    const column = input.columns[quantity];
    return column ? [{ quantity, heading: quantity, unit: UNIT[quantity], values: timeS.map(column) }] : [];
  });
  const steps = timeS.slice(1).map((time, index) => time - (timeS[index] ?? 0));
  return {
    timeS,
    lines: timeS.map((_, index) => index + 2),
    series,
    events: (input.events ?? []).map(({ atS, text, isFault }) => ({
      index: timeS.indexOf(atS),
      text,
      isFault,
    })),
    columns: series.map(({ heading, quantity, unit }) => ({ heading, takenAs: quantity, unit })),
    notes: input.notes ?? [],
    stepS: median(steps) ?? 0,
  };
}

/** A brake coil at 24 V: it warms with a time constant of 15 min, and its current falls as copper's must. */
export const warmingCoil = (toCelsius = 90) => {
  const temperature = (timeS: number) => toCelsius - (toCelsius - 22) * Math.exp(-timeS / 900);
  const ohm = (timeS: number) => (57.6 * (235 + temperature(timeS))) / 255;
  return { temperature, ambient: () => 22, voltage: () => 24, current: (timeS: number) => 24 / ohm(timeS) };
};
