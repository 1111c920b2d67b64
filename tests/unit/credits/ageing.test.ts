import { expect, it } from "vitest";
import { AGEING_BUCKETS, ageingBucket } from "@/lib/credits/ageing";
import { calendarDay as day } from "@/lib/kernel/calendar-day";

// Buckets by due day: common practice, no source. The days past were computed as at 30 November 2026.
it.each([
  ["2026-12-15", "current"],
  ["2026-11-30", "current"],
  ["2026-11-29", "days1To30"],
  ["2026-10-31", "days1To30"],
  ["2026-10-30", "days31To60"],
  ["2026-09-30", "days61To90"],
  ["2026-09-01", "days61To90"],
  ["2026-08-31", "over90Days"],
])("due on %s is %s on 30 November 2026", (dueOn, bucket) => {
  expect(ageingBucket(day(dueOn), day("2026-11-30"))).toBe(bucket);
});

it("names five buckets, in order", () => {
  expect(AGEING_BUCKETS).toEqual(["current", "days1To30", "days31To60", "days61To90", "over90Days"]);
});
