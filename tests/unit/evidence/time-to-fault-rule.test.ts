import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { repeatedRuns, runIsLongEnough, swapProof } from "@/lib/evidence/time-to-fault-rule";

describe("no fault found (45 minutes by default, common practice, no source)", () => {
  it.each([
    [560, 560, true, 560],
    [559, 560, false, 560],
    [2700, null, true, 2700],
    [2699, null, false, 2700],
    [2700, 0, true, 2700],
    [60, 0, false, 2700],
    [2700, 3600, false, 3600],
    [Number.NaN, 560, false, 560],
  ])("after %d s with a stated time to fault of %s s: %s", (ran, claimed, longEnough, neededSeconds) => {
    expect(runIsLongEnough(ran, claimed)).toMatchObject({ longEnough, neededSeconds });
  });

  it("says what is still to run, and by which rule", () => {
    expect(runIsLongEnough(600, 1931)).toMatchObject({
      missingSeconds: 1331,
      step: {
        rule: "runNeededByClaim",
        result: "no",
        input: { neededMinutes: 32, neededSeconds: 11, ranMinutes: 10, ranSeconds: 0 },
      },
    });
    expect(runIsLongEnough(600, null).step.rule).toBe("runNeededByDefault");
    expect(runIsLongEnough(600, null, 600).longEnough).toBe(true);
  });

  it("a longer bench run never closes what a shorter one opened", () => {
    const seconds = fc.integer({ min: 0, max: 10_000 });
    fc.assert(
      fc.property(seconds, seconds, fc.option(seconds), (ran, more, claimed) => {
        if (runIsLongEnough(ran, claimed).longEnough)
          expect(runIsLongEnough(ran + more, claimed).longEnough).toBe(true);
      }),
    );
  });
});

describe("the swap (5 minutes, then a test drive; common practice, no source)", () => {
  const good = {
    sameVehicle: true,
    runSeconds: 300,
    abnormalHeat: false,
    faultShown: false,
    testDriven: true,
  };

  it("proves the part when all of it was done", () => {
    expect(swapProof(good)).toEqual({ proven: true, against: false, gaps: [] });
  });

  it.each([
    [{ sameVehicle: false }, ["otherVehicle"], false],
    [{ runSeconds: 299 }, ["runTooShort"], false],
    [{ testDriven: false }, ["noTestDrive"], false],
    [{ abnormalHeat: true }, ["abnormalHeat"], true],
    [{ faultShown: true }, ["faultShown"], true],
    [{ faultShown: true, sameVehicle: false }, ["otherVehicle", "faultShown"], false],
  ])("%j leaves %j, against the part: %s", (facts, gaps, against) => {
    expect(swapProof({ ...good, ...facts })).toEqual({ proven: false, against, gaps });
  });
});

describe("several runs of one part", () => {
  const faults = (...minutes: number[]) => minutes.map((value) => ({ faultSeconds: value * 60 }));

  it("31.2, 28.7 and 34.0 min: median 31.2, range 28.7 to 34.0 (computed)", () => {
    const { medianSeconds, rangeSeconds } = repeatedRuns(faults(31.2, 28.7, 34));
    expect(medianSeconds).toBeCloseTo(31.2 * 60, 9);
    expect(rangeSeconds).toEqual([28.7 * 60, 34 * 60]);
  });

  it("a run without fault counts as longer than it lasted, never as zero", () => {
    expect(repeatedRuns([...faults(30, 32), { ranSeconds: 45 * 60 }]).medianSeconds).toBe(32 * 60);
    expect(
      repeatedRuns([...faults(30), { ranSeconds: 45 * 60 }, { ranSeconds: 45 * 60 }]).medianSeconds,
    ).toBeNull();
    expect(repeatedRuns([...faults(30, 32), { ranSeconds: 10 * 60 }]).medianSeconds).toBeNull();
    expect(repeatedRuns([{ ranSeconds: 2700 }])).toEqual({
      runs: 1,
      faults: 0,
      medianSeconds: null,
      rangeSeconds: null,
    });
  });
});
