import { isBefore, type CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";

/** The series of one distributor and year: what was taken from it last; sequence 0 and no day while it is new. */
export type NoteSeries = {
  readonly prefix: string;
  readonly year: number;
  readonly lastSequence: number;
  readonly lastIssuedOn: CalendarDay | null;
};

const SEQUENCE_DIGITS = 5;

/** The year a note of that day is numbered in. */
export const yearOfNote = (issuedOn: CalendarDay): number => Number(issuedOn.slice(0, 4));

/** The printed number: prefix, year, five digits, "GU-2026-00042"; the sixth digit comes when it is needed. */
export const printNoteNumber = (prefix: string, year: number, sequence: number): string =>
  `${prefix}${year}-${String(sequence).padStart(SEQUENCE_DIGITS, "0")}`;

export type NextNumber = { readonly sequence: number; readonly number: string; readonly series: NoteSeries };

/**
 * The number a document of that day takes, and the series after it. Numbers follow each other without a gap, so a day
 * before the last document's is refused. Throws RangeError for a series of another year.
 */
export function nextNoteNumber(
  series: NoteSeries,
  issuedOn: CalendarDay,
): Outcome<NextNumber, "noteDayBeforeLast"> {
  const { prefix, year, lastSequence, lastIssuedOn } = series;
  if (yearOfNote(issuedOn) !== year)
    throw new RangeError(`The series of ${year} has no number for ${issuedOn}`);
  if (!isDayAllowed(series, issuedOn))
    return refuse("noteDayBeforeLast", { lastIssuedOn: lastIssuedOn ?? issuedOn });
  const sequence = lastSequence + 1;
  return ok({
    sequence,
    number: printNoteNumber(prefix, year, sequence),
    series: { ...series, lastSequence: sequence, lastIssuedOn: issuedOn },
  });
}

/** Whether a document may bear that day: it is not before the last one's. */
export const isDayAllowed = ({ lastIssuedOn }: NoteSeries, issuedOn: CalendarDay): boolean =>
  lastIssuedOn === null || !isBefore(issuedOn, lastIssuedOn);
