import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { reminderDays, stepDue, type QueryStep } from "@/lib/claims/clock/query-clock";
import { addDays, calendarDay, daysBetween, type CalendarDay } from "@/lib/kernel/calendar-day";
import { anyDay } from "../kernel/arbitraries";

const asked = calendarDay("2026-05-04");
const after = (days: number) => addDays(asked, days);
const query = (days: number, remindersSent = 0) => ({ askedOn: asked, lapsesOn: after(days), remindersSent });

const anyTerm = fc.integer({ min: 1, max: 400 });
const anySteps = fc.array(fc.integer({ min: 0, max: 40 }), { minLength: 1, maxLength: 60 });

/** Everything the clock does to a query nobody answers, where the worker looks on the days it happens to run. */
function life(askedOn: CalendarDay, term: number, pauses: readonly number[]) {
  let [today, lapsesOn, remindersSent] = [askedOn, addDays(askedOn, term), 0];
  const done: { step: QueryStep; on: CalendarDay; lapsesOn: CalendarDay }[] = [];
  for (const pause of pauses) {
    today = addDays(today, pause);
    const step = stepDue({ askedOn, lapsesOn, remindersSent }, today);
    if (!step) continue;
    if (step.kind === "remind") [lapsesOn, remindersSent] = [step.lapsesOn, step.reminder];
    done.push({ step, on: today, lapsesOn });
    if (step.kind === "lapse") break;
  }
  return done;
}

describe("the days of the reminders", () => {
  it.each([
    [30, [10, 20]],
    [21, [7, 14]],
    [5, [1, 3]],
    [3, [1, 2]],
    [2, [1, 2]],
    [1, [1]],
    [0, []],
  ])("of %i days are %j days after asking", (days, expected) => {
    expect(reminderDays(query(days))).toEqual(expected.map(after));
  });

  it("lie after the day of asking, in order, a day apart, and not after the last day", () => {
    fc.assert(
      fc.property(anyDay, anyTerm, (askedOn, term) => {
        const days = reminderDays({ askedOn, lapsesOn: addDays(askedOn, term) }).map((day) =>
          daysBetween(askedOn, day),
        );
        expect(days.length).toBe(term === 1 ? 1 : 2);
        const [first = 0, second = term] = days;
        expect(first).toBeGreaterThanOrEqual(1);
        expect(second).toBeLessThanOrEqual(term);
        if (days.length === 2) expect(second - first).toBeGreaterThanOrEqual(1);
      }),
    );
  });
});

describe("what is due", () => {
  it.each([
    ["nothing before the first day", query(30), 9, null],
    ["the first reminder", query(30), 10, { kind: "remind", reminder: 1, lapsesOn: after(30) }],
    ["nothing twice", query(30, 1), 19, null],
    ["the second reminder", query(30, 1), 20, { kind: "remind", reminder: 2, lapsesOn: after(30) }],
    ["the newest after a standstill", query(30), 25, { kind: "remind", reminder: 2, lapsesOn: after(30) }],
    ["nothing on the last day itself", query(30, 2), 30, null],
    ["the lapse on the day after", query(30, 2), 31, { kind: "lapse" }],
    ["the lapse and no late second reminder", query(30, 1), 40, { kind: "lapse" }],
    [
      "three more days where nobody was warned",
      query(30),
      40,
      { kind: "remind", reminder: 2, lapsesOn: after(43) },
    ],
  ])("%s", (_what, open, day, expected) => {
    expect(stepDue(open, after(day))).toEqual(expected);
  });

  it("never lapses unwarned or early, reminds at most twice and only upwards, whenever the worker runs", () => {
    fc.assert(
      fc.property(anyDay, anyTerm, anySteps, (askedOn, term, pauses) => {
        const done = life(askedOn, term, pauses);
        const reminders = done.flatMap(({ step }) => (step.kind === "remind" ? [step.reminder] : []));
        expect(reminders).toEqual([...new Set(reminders)].toSorted((a, b) => a - b));
        expect(reminders.length).toBeLessThanOrEqual(2);
        for (const [place, { step, on, lapsesOn }] of done.entries()) {
          expect(daysBetween(addDays(askedOn, term), lapsesOn)).toBeGreaterThanOrEqual(0);
          if (step.kind === "remind") {
            expect(on <= lapsesOn).toBe(true);
            continue;
          }
          expect(place).toBe(done.length - 1);
          expect(reminders.length).toBeGreaterThan(0);
          expect(on > lapsesOn).toBe(true);
        }
      }),
    );
  });

  it("ends for every query once the worker runs each day", () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: 1, max: 90 }), (askedOn, term) => {
        const done = life(
          askedOn,
          term,
          Array.from({ length: term + 2 }, () => 1),
        );
        expect(done.at(-1)).toMatchObject({ step: { kind: "lapse" }, on: addDays(askedOn, term + 1) });
        expect(done.length).toBe(term === 1 ? 2 : 3);
      }),
    );
  });
});
