/**
 * The moment a time cell names. `dayS` is the day in seconds where the cell names one that leaves no doubt; a day
 * written with slashes may be day-first or month-first and is left out, midnight is then found from the clock.
 */
export type Moment = {
  readonly dayS: number | null;
  readonly clockS: number;
  /** "mm:ss or hh:mm" is open: two parts only. `clockS` is then read as hh:mm. */
  readonly twoParts: boolean;
};

const CLOCK = /^(\d{1,3}):(\d{2})(?::(\d{2})(?:[.,:](\d{1,9}))?|[.,](\d{1,9}))?\s*([ap]m)?$/iu;
const ISO_DAY = /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})(?:[T ]+|$)/u;
const DOTTED_DAY = /^(\d{1,2})\.(\d{1,2})\.(\d{2}|\d{4}),?(?: +|$)/u;
const OPEN_DAY = /^\d{1,2}[/-]\d{1,2}[/-](?:\d{2}|\d{4}),?(?: +|$)/u;
const ZONE = /\s*(?:Z|UTC|([+-])(\d{2}):?(\d{2}))$/u;

/** Reads "12:03:05", "2:03:05 PM", "2027-05-03T12:03:05.5+02:00", "03.05.2027 12:03:05" and the like; null otherwise. */
export function momentFrom(cell: string): Moment | null {
  if (cell.length > 40) return null;
  const day = dayIn(cell);
  const zone = ZONE.exec(day.rest);
  const zoneS = zone?.[1] ? (zone[1] === "-" ? 1 : -1) * (Number(zone[2]) * 3600 + Number(zone[3]) * 60) : 0;
  const clock = clockIn(zone ? day.rest.slice(0, zone.index) : day.rest);
  return clock === null ? null : { dayS: day.dayS, clockS: clock.seconds + zoneS, twoParts: clock.twoParts };
}

function dayIn(cell: string): { dayS: number | null; rest: string } {
  const iso = ISO_DAY.exec(cell);
  if (iso) return { dayS: dayS(iso[1], iso[2], iso[3]), rest: cell.slice(iso[0].length) };
  const dotted = DOTTED_DAY.exec(cell);
  if (dotted) return { dayS: dayS(dotted[3], dotted[2], dotted[1]), rest: cell.slice(dotted[0].length) };
  return { dayS: null, rest: cell.replace(OPEN_DAY, "") };
}

const dayS = (year = "", month = "", day = ""): number =>
  Date.UTC(year.length === 2 ? 2000 + Number(year) : Number(year), Number(month) - 1, Number(day)) / 1000;

function clockIn(text: string): { seconds: number; twoParts: boolean } | null {
  const parts = CLOCK.exec(text.trim());
  if (!parts) return null;
  const [, first = "0", second = "0", third, ofSecond, ofLast, half] = parts;
  const fraction = ofSecond ?? ofLast;
  if (Number(second) > 59 || Number(third ?? 0) > 59) return null;
  const part = fraction === undefined ? 0 : Number(`0.${fraction}`);
  // Parts of a second behind two parts: these are minutes and seconds.
  if (third === undefined && fraction !== undefined)
    return { seconds: Number(first) * 60 + Number(second) + part, twoParts: false };
  const hour =
    half === undefined ? Number(first) : (Number(first) % 12) + (half.toLowerCase() === "pm" ? 12 : 0);
  return {
    seconds: hour * 3600 + Number(second) * 60 + Number(third ?? 0) + part,
    twoParts: third === undefined,
  };
}
