import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { RunLogNote, RunLogRefusal } from "./run-log";
import { momentFrom, type Moment } from "./run-log-clock";
import type { Header } from "./run-log-header";
import { cellReading, type DecimalMark } from "./run-log-values";
import { median } from "./samples";
import { inBaseUnit, unitNamed, type Unit } from "./units";

type RawTimes = { readonly seconds: readonly (number | null)[]; readonly notes: readonly RunLogNote[] };

/** Which rows of the table are kept, and the time of each in seconds from the log's zero. */
export type Times = {
  readonly kept: readonly number[];
  readonly timeS: readonly number[];
  readonly notes: readonly RunLogNote[];
};

/**
 * Times of the rows in seconds. Rows without a readable time are left out; where the clock steps back, two files were
 * joined, and the longest stretch is kept. Both are noted.
 */
export function timesOf(header: Header, mark: DecimalMark): Outcome<Times, RunLogRefusal> {
  const cells = header.rows.map((row) => timeCell(header, row.cells));
  const moments = cells.map(momentFrom);
  const clocks = moments.filter((moment) => moment !== null).length;
  const raw = clocks * 2 > cells.length ? clockTimes(header, moments) : ok(elapsedTimes(header, cells, mark));
  if (!raw.ok) return raw;
  const stretch = longestStretch(raw.value.seconds);
  const notes = [
    ...raw.value.notes,
    ...unreadableNote(header, raw.value.seconds),
    ...stepNote(header, stretch),
  ];
  return ok(rebased({ kept: stretch.kept, seconds: raw.value.seconds }, clocks * 2 > cells.length, notes));
}

function timeCell(header: Header, cells: readonly string[]): string {
  const time = cells[header.time.place] ?? "";
  const day = header.date ? (cells[header.date.place] ?? "") : "";
  return day === "" || time === "" ? time : `${day} ${time}`;
}

/** Numbers since some zero: in the unit of the heading, in milliseconds where only an epoch fits, else in seconds. */
function elapsedTimes(header: Header, cells: readonly string[], mark: DecimalMark): RawTimes {
  const read = cells.map((cell) => cellReading(cell, mark));
  const first = read.find((cell) => cell.kind === "number");
  const assumed = first !== undefined && first.value > 1e11 ? MILLISECOND : SECOND;
  const unit = header.time.unit ?? assumed;
  const named = header.time.unit !== null || (first?.unit ?? null) !== null;
  const seconds = read.map((cell) => {
    const time = cell.kind === "number" ? inBaseUnit(cell.value, cell.unit ?? unit) : Number.NaN;
    return Math.abs(time) < LATEST_S ? time : null;
  });
  const notes: RunLogNote[] = named ? [] : [{ code: "timeUnitAssumed", detail: { unit: unit.symbol } }];
  return { seconds, notes };
}

const named = (symbol: string): Unit => {
  const unit = unitNamed(symbol);
  if (unit === null || unit === "ambiguous") throw new Error(`no such unit: ${symbol}`);
  return unit;
};
const SECOND = named("s");
const MILLISECOND = named("ms");

// Far beyond any epoch: such a figure is no time.
const LATEST_S = 1e11;

const HALF_DAY_S = 43_200;
const DAY_S = 86_400;

/** Clock times, with the day where the file names one; without it a leap back of half a day is a midnight passed. */
function clockTimes(header: Header, moments: readonly (Moment | null)[]): Outcome<RawTimes, RunLogRefusal> {
  const perMinute = minutesAndSeconds(header, moments);
  if (perMinute === null) return refuse("runLogTimeUnclear", { heading: header.time.heading });
  let days = 0;
  let before: number | null = null;
  const seconds = moments.map((moment) => {
    if (moment === null) return null;
    const clock = perMinute && moment.twoParts ? moment.clockS / 60 : moment.clockS;
    if (moment.dayS !== null) return moment.dayS + clock;
    if (before !== null && clock < before - HALF_DAY_S) days += 1;
    before = clock;
    return days * DAY_S + clock;
  });
  return ok({ seconds, notes: days === 0 ? [] : [{ code: "midnightPassed", detail: { times: days } }] });
}

/**
 * Whether "05:20" is minutes and seconds; null where nothing tells. The heading may say so, a first part over 23
 * says so, a day beside it says it is a clock; a run that starts at 00:0x could be either.
 */
function minutesAndSeconds(header: Header, moments: readonly (Moment | null)[]): boolean | null {
  const shape = header.time.clockShape;
  if (shape !== null) return shape === "mm:ss";
  const open = moments.filter((moment): moment is Moment => moment !== null && moment.twoParts);
  const first = open[0];
  if (!first || first.dayS !== null) return false;
  if (header.time.unit !== null) return header.time.unit.symbol === "min" || header.time.unit.symbol === "s";
  if (open.some((moment) => moment.clockS >= DAY_S)) return true;
  return first.clockS < 3600 ? null : false;
}

type Stretch = { readonly kept: readonly number[]; readonly stepAt: number | null; readonly leftOut: number };

function longestStretch(seconds: readonly (number | null)[]): Stretch {
  let best: number[] = [];
  let current: number[] = [];
  let last = Number.NEGATIVE_INFINITY;
  let stepAt: number | null = null;
  let total = 0;
  for (const [index, time] of seconds.entries()) {
    if (time === null) continue;
    total += 1;
    if (time < last) {
      stepAt ??= index;
      current = [];
    }
    current.push(index);
    if (current.length > best.length) best = current;
    last = time;
  }
  return { kept: best, stepAt, leftOut: total - best.length };
}

const stepNote = (header: Header, { stepAt, leftOut }: Stretch): RunLogNote[] =>
  stepAt === null
    ? []
    : [{ code: "clockStep", detail: { line: header.rows[stepAt]?.line ?? 0, rows: leftOut } }];

function unreadableNote(header: Header, seconds: readonly (number | null)[]): RunLogNote[] {
  const at = seconds.flatMap((time, index) => (time === null ? [header.rows[index]?.line ?? 0] : []));
  return at.length === 0
    ? []
    : [{ code: "timeUnreadable", detail: { rows: at.length, lines: at.slice(0, 10).join(", ") } }];
}

/** A clock starts at its first row. An elapsed time keeps its own zero if the first row lies within ten steps of it. */
function rebased(
  { kept, seconds }: { kept: readonly number[]; seconds: readonly (number | null)[] },
  isClock: boolean,
  notes: readonly RunLogNote[],
): Times {
  const times = kept.map((index) => seconds[index] ?? 0);
  const first = times[0] ?? 0;
  const steps = times.slice(1).map((time, index) => time - (times[index] ?? time));
  const step = median(steps.filter((value) => value > 0)) ?? 0;
  const ownZero = !isClock && first >= 0 && first <= 10 * step;
  const zero = ownZero ? 0 : first;
  const same = steps.filter((value) => value === 0).length;
  const more: RunLogNote[] = [
    ...(ownZero || isClock ? [] : [{ code: "timeRebased", detail: { seconds: first } } satisfies RunLogNote]),
    ...(same === 0 ? [] : [{ code: "sameTime", detail: { rows: same } } satisfies RunLogNote]),
  ];
  return { kept, timeS: times.map((time) => Number((time - zero).toFixed(6))), notes: [...notes, ...more] };
}
