import type { Run, RunRow } from "./thermal";

type Column = { readonly heading: string; readonly cell: (row: RunRow) => string };

/** How a logger writes: its separator, decimal mark, clock and temperatures. Every workshop has another one. */
export type Dialect = {
  readonly separator: "," | ";" | "\t";
  readonly decimal: "." | ",";
  readonly lineEnd: "\n" | "\r\n";
  readonly byteOrderMark: boolean;
  readonly time: "seconds" | "minutes" | "clock";
  readonly fahrenheit: boolean;
  readonly german: boolean;
  /** Lines some loggers write before their table. */
  readonly preamble: readonly string[];
};

export const DIALECTS = {
  plain: {
    separator: ",",
    decimal: ".",
    lineEnd: "\n",
    byteOrderMark: false,
    time: "seconds",
    fahrenheit: false,
    german: false,
    preamble: [],
  },
  semicolon: {
    separator: ";",
    decimal: ",",
    lineEnd: "\r\n",
    byteOrderMark: true,
    time: "minutes",
    fahrenheit: false,
    german: true,
    preamble: [],
  },
  clock: {
    separator: "\t",
    decimal: ".",
    lineEnd: "\r\n",
    byteOrderMark: false,
    time: "clock",
    fahrenheit: false,
    german: false,
    preamble: ["Bench recorder", "Channels 4"],
  },
  fahrenheit: {
    separator: ",",
    decimal: ".",
    lineEnd: "\n",
    byteOrderMark: false,
    time: "minutes",
    fahrenheit: true,
    german: false,
    preamble: [],
  },
  germanClock: {
    separator: ";",
    decimal: ",",
    lineEnd: "\n",
    byteOrderMark: false,
    time: "clock",
    fahrenheit: false,
    german: true,
    preamble: ["Messprotokoll Prüfstand 2"],
  },
} as const satisfies Record<string, Dialect>;
export type DialectName = keyof typeof DIALECTS;

/** The file a logger of that dialect would have written for a run. */
export function logFile(run: Run, dialect: Dialect): Buffer {
  const columns = columnsOf(run, dialect);
  const lines = [
    ...dialect.preamble,
    columns.map((column) => column.heading).join(dialect.separator),
    ...run.rows.map((row) => columns.map((column) => column.cell(row)).join(dialect.separator)),
  ];
  return Buffer.from(
    (dialect.byteOrderMark ? "\uFEFF" : "") + lines.join(dialect.lineEnd) + dialect.lineEnd,
    "utf8",
  );
}

function columnsOf(run: Run, dialect: Dialect): Column[] {
  const { german } = dialect;
  const number = (value: number, places: number): string =>
    value.toFixed(places).replace(".", dialect.decimal);
  const degrees = (celsius: number): string => number(dialect.fahrenheit ? celsius * 1.8 + 32 : celsius, 1);
  const unit = dialect.fahrenheit ? "°F" : "°C";
  const turning: Column[] = run.rows.some((row) => row.rpm !== null)
    ? [{ heading: german ? "Drehzahl (1/min)" : "Speed (rpm)", cell: (row) => number(row.rpm ?? 0, 0) }]
    : [];
  return [
    timeColumn(dialect, number),
    { heading: `${german ? "Spule" : "Coil"} (${unit})`, cell: (row) => degrees(row.coilCelsius) },
    { heading: `${german ? "Gehäuse" : "Case"} (${unit})`, cell: (row) => degrees(row.caseCelsius) },
    { heading: `${german ? "Umgebung" : "Ambient"} (${unit})`, cell: (row) => degrees(row.ambientCelsius) },
    {
      heading: `${german ? "Strom" : "Current"} (A)`,
      cell: (row) => number(row.ampere, row.rpm === null ? 3 : 2),
    },
    { heading: `${german ? "Spannung" : "Voltage"} (V)`, cell: (row) => number(row.volt, 2) },
    ...turning,
    { heading: german ? "Ereignis" : "Event", cell: (row) => row.event },
  ];
}

/** Clocks start at a quarter past nine: the recorder knows nothing of the day. */
const CLOCK_START_S = 9 * 3600 + 15 * 60;

function timeColumn({ time, german }: Dialect, number: (value: number, places: number) => string): Column {
  if (time === "seconds") return { heading: "t_s", cell: (row) => number(row.timeS, 0) };
  if (time === "minutes")
    return { heading: german ? "Zeit (min)" : "Time (min)", cell: (row) => number(row.timeS / 60, 3) };
  return {
    heading: german ? "Uhrzeit (hh:mm:ss)" : "Time (hh:mm:ss)",
    cell: (row) => clock(CLOCK_START_S + row.timeS),
  };
}

const clock = (seconds: number): string =>
  [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60]
    .map((part) => String(Math.round(part)).padStart(2, "0"))
    .join(":");
