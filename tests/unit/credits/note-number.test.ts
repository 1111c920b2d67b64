import fc from "fast-check";
import { expect, it } from "vitest";
import {
  isDayAllowed,
  nextNoteNumber,
  printNoteNumber,
  yearOfNote,
  type NoteSeries,
} from "@/lib/credits/note-number";
import { addDays, calendarDay as day, isBefore } from "@/lib/kernel/calendar-day";

const series = (change: Partial<NoteSeries> = {}): NoteSeries => ({
  prefix: "GU-",
  year: 2026,
  lastSequence: 41,
  lastIssuedOn: day("2026-09-20"),
  ...change,
});

it("is printed as prefix, year and five digits, more when they are needed", () => {
  expect(printNoteNumber("GU-", 2026, 42)).toBe("GU-2026-00042");
  expect(printNoteNumber("", 2026, 1)).toBe("2026-00001");
  expect(printNoteNumber("A/", 2026, 123_456)).toBe("A/2026-123456");
});

it("goes on from the last one on its day or a later one, and starts each year anew", () => {
  expect(nextNoteNumber(series(), day("2026-09-20"))).toMatchObject({
    value: { sequence: 42, number: "GU-2026-00042" },
  });
  const fresh = series({ year: 2027, lastSequence: 0, lastIssuedOn: null });
  expect(nextNoteNumber(fresh, day("2027-01-01"))).toMatchObject({ value: { number: "GU-2027-00001" } });
});

it("is refused for a day before the last one's, and belongs to the series of its year", () => {
  expect(isDayAllowed(series(), day("2026-09-19"))).toBe(false);
  expect(nextNoteNumber(series(), day("2026-09-19"))).toMatchObject({
    ok: false,
    code: "noteDayBeforeLast",
    detail: { lastIssuedOn: "2026-09-20" },
  });
  expect(() => nextNoteNumber(series(), day("2027-01-01"))).toThrow(RangeError);
  expect(yearOfNote(day("2026-12-31"))).toBe(2026);
});

it("leaves no gap and takes none twice, whatever days are tried, and the days never go back", () => {
  const tries = fc.array(fc.integer({ min: 0, max: 364 }), { maxLength: 40 });
  fc.assert(
    fc.property(tries, (offsets) => {
      let now = series({ lastSequence: 0, lastIssuedOn: null });
      const taken: number[] = [];
      for (const offset of offsets) {
        const issuedOn = addDays(day("2026-01-01"), offset);
        const next = nextNoteNumber(now, issuedOn);
        if (!next.ok) continue;
        if (now.lastIssuedOn !== null && isBefore(issuedOn, now.lastIssuedOn)) return false;
        taken.push(next.value.sequence);
        now = next.value.series;
      }
      return taken.every((sequence, place) => sequence === place + 1);
    }),
    { numRuns: 2_000 },
  );
});
