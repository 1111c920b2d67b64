import type { Measured } from "./measure";

export type Line = {
  readonly name: string;
  readonly measured: Measured;
  readonly yardstick: string;
  readonly note?: string;
};

const places = (value: number): number => (value < 0.1 ? 4 : value < 10 ? 2 : value < 100 ? 1 : 0);
const figure = (value: number): string => value.toFixed(places(value));

const cellsOf = ({ name, measured, yardstick, note = "" }: Line): string[] => [
  name,
  `${figure(measured.medianMs)} ms`,
  `${figure(measured.fromMs)} to ${figure(measured.toMs)}`,
  `${yardstick} ${figure(measured.yardstickMs)} ms`,
  figure(measured.ratio),
  note,
];

const HEADING = ["name", "median", "10 to 90 %", "yardstick", "ratio", "note"];
/** Columns that hold figures stand to the right. */
const TO_THE_RIGHT: readonly number[] = [1, 2, 4];

/** The lines as one table of text. */
export function tableOf(lines: readonly Line[]): string {
  const rows = [HEADING, ...lines.map(cellsOf)];
  const widths = HEADING.map((_heading, at) => Math.max(...rows.map((row) => row[at]?.length ?? 0)));
  return rows
    .map((row) =>
      row
        .map((cell, at) =>
          TO_THE_RIGHT.includes(at) ? cell.padStart(widths[at] ?? 0) : cell.padEnd(widths[at] ?? 0),
        )
        .join("  ")
        .trimEnd(),
    )
    .join("\n");
}
