export type MeasuredQuantity = "temperature" | "ambient" | "current" | "voltage" | "speed";

/** One measured column in its canonical unit: °C, A, V or rpm. A null is a gap: nothing readable stood there. */
export type RunLogSeries = {
  readonly quantity: MeasuredQuantity;
  readonly heading: string;
  readonly unit: "°C" | "A" | "V" | "rpm";
  readonly values: readonly (number | null)[];
};

/** A remark in the log. It is kept once, at the first row that carries it. */
export type RunLogEvent = { readonly index: number; readonly text: string; readonly isFault: boolean };

/** What a column of the file was taken for, in the order of the file. */
export type RunLogColumn = {
  readonly heading: string;
  readonly takenAs: MeasuredQuantity | "time" | "date" | "event" | "notUsed";
  readonly unit: string | null;
};

/** Something the reader of the file assumed, left out or skipped. `evidence.notes.<code>` says it in words. */
export type RunLogNote = {
  readonly code: RunLogNoteCode;
  readonly detail: Readonly<Record<string, string | number>>;
};

export type RunLogNoteCode =
  | "encodingAssumed"
  | "linesBeforeHeader"
  | "columnNotUsed"
  | "unitAssumed"
  | "decimalAssumed"
  | "timeUnitAssumed"
  | "timeRebased"
  | "timeUnreadable"
  | "midnightPassed"
  | "clockStep"
  | "sameTime"
  | "valuesUnreadable"
  | "valuesImpossible"
  | "extraCells";

/** A run log in canonical units, ordered by time. All columns have the same length as `timeS`. */
export type RunLog = {
  /** Seconds; zero is the file's own zero, or its first row. Never decreasing. */
  readonly timeS: readonly number[];
  /** Line of the file each row stood on. */
  readonly lines: readonly number[];
  readonly series: readonly RunLogSeries[];
  readonly events: readonly RunLogEvent[];
  readonly columns: readonly RunLogColumn[];
  readonly notes: readonly RunLogNote[];
  /** Usual time between two rows, in seconds (the median). */
  readonly stepS: number;
};

export type RunLogRefusal =
  | "runLogEmpty"
  | "runLogTooBig"
  | "runLogBinary"
  | "runLogQuoteOpen"
  | "runLogLineTooLong"
  | "runLogTooManyColumns"
  | "runLogTooManyRows"
  | "runLogTooManyCells"
  | "runLogNoHeader"
  | "runLogCommaTwice"
  | "runLogDecimalsMixed"
  | "runLogTimeUnclear"
  | "runLogNoRows";

/** The measured columns of one quantity, in the order of the file. */
export const seriesOf = (log: RunLog, quantity: MeasuredQuantity): readonly RunLogSeries[] =>
  log.series.filter((series) => series.quantity === quantity);
