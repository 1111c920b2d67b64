import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import {
  addWorkingDays,
  addWorkingMinutes,
  isWorkingDay,
  workingDayFrom,
  workingMinutesBetween,
  type OpeningHours,
  type WorkingCalendar,
} from "@/lib/kernel/working-time";

const week = (weekdays: OpeningHours[], friday = weekdays, weekend: OpeningHours[] = []) => ({
  monday: weekdays,
  tuesday: weekdays,
  wednesday: weekdays,
  thursday: weekdays,
  friday,
  saturday: weekend,
  sunday: weekend,
});
const vienna: WorkingCalendar = {
  timeZone: "Europe/Vienna",
  hours: week([{ opens: "08:00", closes: "17:00" }], [{ opens: "08:00", closes: "14:00" }]),
  holidays: [calendarDay("2026-12-08")],
};
const roundTheClock = [{ opens: "00:00", closes: "24:00" }];
const always: WorkingCalendar = {
  ...vienna,
  hours: week(roundTheClock, roundTheClock, roundTheClock),
  holidays: [],
};
const never: WorkingCalendar = { ...vienna, hours: week([]) };

/** An instant on Vienna's wall clock in winter time. */
const winter = (text: string) => new Date(`${text}:00+01:00`);

describe("working time", () => {
  // Computed by hand on this calendar.
  it.each([
    ["2026-12-04T13:00", 8, "2026-12-07T15:00"],
    ["2026-12-07T16:30", 16, "2026-12-10T14:30"],
    ["2026-12-05T09:00", 4, "2026-12-07T12:00"],
    ["2026-12-03T16:00", 1, "2026-12-03T17:00"],
    ["2026-12-03T17:00", 0, "2026-12-03T17:00"],
  ])("%s and %i h ends %s, over weekend and holiday, the end inclusive", (from, hours, to) => {
    expect(addWorkingMinutes(vienna, winter(from), hours * 60)).toEqual(winter(to));
    expect(workingMinutesBetween(vienna, winter(from), winter(to))).toBe(hours * 60);
  });

  it("counts what it added, from any instant", () => {
    const anyInstant = fc.date({
      min: new Date("2026-01-01"),
      max: new Date("2027-01-01"),
      noInvalidDate: true,
    });
    const lunch = [
      { opens: "08:00", closes: "12:00" },
      { opens: "12:45", closes: "17:00" },
    ];
    const calendars = fc.constantFrom(vienna, always, { ...vienna, hours: week(lunch) });
    fc.assert(
      fc.property(calendars, anyInstant, fc.integer({ min: 0, max: 20_000 }), (calendar, from, minutes) => {
        const to = addWorkingMinutes(calendar, from, minutes);
        expect(to >= from).toBe(true);
        expect(workingMinutesBetween(calendar, from, to)).toBe(minutes);
      }),
      { numRuns: 60 },
    );
  });

  it("counts nothing backwards", () => {
    expect(workingMinutesBetween(vienna, winter("2026-12-03T12:00"), winter("2026-12-03T11:00"))).toBe(0);
  });

  // Day lengths of the change to and from summer time in Vienna, 2026: 23 h and 25 h.
  it("follows the zone's own clock over the change to summer time and back", () => {
    const dayLength = (from: string, to: string) =>
      workingMinutesBetween(always, new Date(from), new Date(to)) / 60;
    expect(dayLength("2026-03-29T00:00:00+01:00", "2026-03-30T00:00:00+02:00")).toBe(23);
    expect(dayLength("2026-10-25T00:00:00+02:00", "2026-10-26T00:00:00+01:00")).toBe(25);
    expect(addWorkingMinutes(always, new Date("2026-03-28T12:00:00+01:00"), 24 * 60)).toEqual(
      new Date("2026-03-29T13:00:00+02:00"),
    );
    expect(addWorkingMinutes(always, new Date("2026-10-24T12:00:00+02:00"), 24 * 60)).toEqual(
      new Date("2026-10-25T11:00:00+01:00"),
    );
  });

  it("opens at 03:30 where 02:30 does not exist, and at the earlier 02:30 where there are two", () => {
    const night = [{ opens: "02:30", closes: "05:00" }];
    const nights: WorkingCalendar = { ...vienna, hours: week(night, night, night) };
    expect(addWorkingMinutes(nights, new Date("2026-03-29T00:00:00+01:00"), 0)).toEqual(
      new Date("2026-03-29T03:30:00+02:00"),
    );
    expect(addWorkingMinutes(nights, new Date("2026-10-25T00:00:00+02:00"), 0)).toEqual(
      new Date("2026-10-25T02:30:00+02:00"),
    );
  });

  it("refuses a calendar without working time instead of searching for ever", () => {
    expect(() => addWorkingMinutes(never, winter("2026-12-03T12:00"), 1)).toThrow(RangeError);
    expect(() => addWorkingDays(never, calendarDay("2026-12-03"), 1)).toThrow(RangeError);
    const closedAllDay = week([{ opens: "08:00", closes: "08:00" }]);
    expect(() =>
      addWorkingMinutes({ ...vienna, hours: closedAllDay }, winter("2026-12-03T12:00"), 1),
    ).toThrow(RangeError);
    expect(() => addWorkingMinutes(vienna, winter("2026-12-03T12:00"), -1)).toThrow(RangeError);
  });
});

describe("working days", () => {
  it.each([
    ["2026-12-01", 10, "2026-12-16"],
    ["2026-12-04", 5, "2026-12-14"],
    ["2026-12-05", 0, "2026-12-05"],
  ])("%s and %i working days is %s", (from, days, to) => {
    expect(addWorkingDays(vienna, calendarDay(from), days)).toBe(to);
  });

  it("leave out weekends and holidays", () => {
    expect(
      ["2026-12-05", "2026-12-07", "2026-12-08"].map((day) => isWorkingDay(vienna, calendarDay(day))),
    ).toEqual([false, true, false]);
  });

  // Regulation (EEC, Euratom) 1182/71, Article 3(4): 15 calendar days after 4 December 2026 end on a Saturday.
  it("carry the end of a declaration period to the next working day", () => {
    expect(workingDayFrom(vienna, addDays(calendarDay("2026-12-04"), 15))).toBe("2026-12-21");
  });
});
