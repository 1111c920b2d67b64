import { addDays, parseCalendarDay, type CalendarDay } from "./calendar-day";
import type { Locale } from "./locale";

// Written without accents, as `folded` leaves them; the first three letters tell all twelve apart in each language.
const ENGLISH_MONTHS =
  "january february march april may june july august september october november december".split(" ");
const GERMAN_MONTHS =
  "januar februar marz april mai juni juli august september oktober november dezember".split(" ");
const OTHER_SPELLINGS = new Map([
  ["mrz", 3],
  ["maerz", 3],
  ["janner", 1],
  ["jaenner", 1],
  ["feber", 2],
]);
const DAYS_AGO = new Map([
  ["today", 0],
  ["yesterday", 1],
  ["heute", 0],
  ["gestern", 1],
]);

const YEAR_FIRST = /^(\d{4})[-./](\d{1,2})[-./](\d{1,2})$/;
const DAY_FIRST = /^(\d{1,2})[-./ ]+(\d{1,2})[-./ ]+(\d{4}|\d{2})$/;
const DAY_THEN_WORD = /^(\d{1,2})(?:st|nd|rd|th)?[-./ ]*([a-z]{3,})[-./, ]*(\d{4}|\d{2})$/;
const WORD_THEN_DAY = /^([a-z]{3,})[. ]*(\d{1,2})(?:st|nd|rd|th)?[, ]+(\d{4}|\d{2})$/;
const LONGEST_DAY_TEXT = 40;

/**
 * The day a person typed, or null where the text is none: "3 mar 24", "03.03.2024", "3/3/2024" (day first),
 * "2024-03-03", "3. März 2024", "today", "gestern". Month words of both languages are read whatever the
 * locale, the person's own first. Two digits of a year mean the latest such year not after next year.
 */
export function readTypedDay(text: string, locale: Locale, today: CalendarDay): CalendarDay | null {
  if (text.length > LONGEST_DAY_TEXT) return null;
  const typed = folded(text);
  const daysAgo = DAYS_AGO.get(typed);
  if (daysAgo !== undefined) return addDays(today, -daysAgo);

  const [, year, month, day] = YEAR_FIRST.exec(typed) ?? dayFirstParts(typed, locale);
  if (year === undefined || month === undefined || day === undefined) return null;
  return parseCalendarDay(`${fullYear(year, today)}-${month.padStart(2, "0")}-${day.padStart(2, "0")}`);
}

/** Year, month and day as the groups of a match would hold them: place 0 is not used. */
function dayFirstParts(typed: string, locale: Locale): readonly (string | undefined)[] {
  const numbers = DAY_FIRST.exec(typed);
  if (numbers) return ["", numbers[3], numbers[2], numbers[1]];
  const wordSecond = DAY_THEN_WORD.exec(typed);
  if (wordSecond) return ["", wordSecond[3], monthNamed(wordSecond[2], locale), wordSecond[1]];
  const wordFirst = WORD_THEN_DAY.exec(typed);
  return wordFirst ? ["", wordFirst[3], monthNamed(wordFirst[1], locale), wordFirst[2]] : [];
}

/** Month number of a month word or of its beginning, three letters or more. */
function monthNamed(word: string | undefined, locale: Locale): string | undefined {
  if (word === undefined) return undefined;
  const languages = locale === "de" ? [GERMAN_MONTHS, ENGLISH_MONTHS] : [ENGLISH_MONTHS, GERMAN_MONTHS];
  for (const months of languages) {
    const index = months.findIndex((month) => month.startsWith(word));
    if (index >= 0) return String(index + 1);
  }
  return OTHER_SPELLINGS.get(word)?.toString();
}

function fullYear(year: string, today: CalendarDay): string {
  if (year.length === 4) return year;
  const nextYear = Number(today.slice(0, 4)) + 1;
  return String(nextYear - ((((nextYear - Number(year)) % 100) + 100) % 100)).padStart(4, "0");
}

/** Small letters without accents, single spaces, no full stop at the end. */
const folded = (text: string): string =>
  text.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase().trim().replace(/\s+/g, " ").replace(/\.$/, "");
