import { describe, expect, it } from "vitest";
import { installerRecord, standsApart } from "@/lib/claims/installers/record";

const counts = (watched: number, early: number) => ({ fitted: watched, watched, early, foundFitting: 0 });

describe("an installer's record", () => {
  it("gives no share below ten fittings watched", () => {
    expect(installerRecord(counts(9, 9))).toEqual({ kind: "tooFew", least: 10 });
  });

  // Clopper and Pearson (1934), usual tables, from memory: 1 of 10 lies between 0.0025 and 0.4450, 4 of 20 between 0.0573 and 0.4366.
  it.each([
    [10, 1, 0.0025, 0.445],
    [20, 4, 0.0573, 0.4366],
  ])("of %i watched and %i early has the limits of the tables", (watched, early, low, high) => {
    const record = installerRecord(counts(watched, early));
    expect(record).toMatchObject({ kind: "share", share: early / watched });
    if (record.kind !== "share") return;
    expect(record.limits[0]).toBeCloseTo(low, 4);
    expect(record.limits[1]).toBeCloseTo(high, 4);
  });

  it("stands apart only where the ratio to all others is surely above one", () => {
    expect(standsApart(counts(20, 6), counts(220, 12))).toBe(true);
    expect(standsApart(counts(20, 4), counts(220, 24))).toBe(false);
    expect(standsApart(counts(9, 9), counts(209, 15))).toBe(false);
  });

  it("stands apart with no three cases, whatever the others' record is", () => {
    expect(standsApart(counts(20, 3), counts(2000, 3))).toBe(false);
    expect(standsApart(counts(313, 1), counts(751, 1))).toBe(false);
    expect(standsApart(counts(20, 4), counts(2000, 4))).toBe(true);
  });

  it("compares nobody with too few others", () => {
    expect(standsApart(counts(20, 20), counts(25, 20))).toBe(false);
  });
});
