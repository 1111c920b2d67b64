import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { MONTH_DAYS } from "@/lib/reliability/months";
import { monthCells, observe } from "@/lib/reports/life-curves/observations";
import { NO_BATCH, OUTCOMES, type AgeGroup, type UnitOutcome } from "@/lib/reports/life-curves/outcomes";

const group = (
  outcome: UnitOutcome,
  ageDays: number | null,
  count = 1,
  over: Partial<AgeGroup> = {},
): AgeGroup => ({
  batchId: NO_BATCH,
  outcome,
  ageDays,
  count,
  assumed: false,
  atLargest: false,
  ...over,
});
const rowsOf = (groups: readonly AgeGroup[], counted: Parameters<typeof observe>[1] = "filed") =>
  observe(groups, counted).rows;

describe("what counts as a failure", () => {
  const claims = [
    group("confirmed", 10),
    group("otherCause", 20),
    group("undecided", 30),
    group("declined", 40),
  ];
  const failedAt = (counted: Parameters<typeof observe>[1]) =>
    rowsOf(claims, counted).flatMap(({ failed, ageDays }) => (failed ? [ageDays] : []));

  it("is, for the screen, every claim that was not declined", () => {
    expect(failedAt("filed")).toEqual([10, 20, 30]);
  });

  it("is, for the maker, a claim upheld with a share on the part, and no undecided one", () => {
    expect(failedAt("upheld")).toEqual([10]);
  });

  it("is, at most for the maker, the undecided as well, never what had another cause", () => {
    expect(failedAt("upheldAtMost")).toEqual([10, 30]);
  });

  it("keeps every unit in the risk set up to its age, whatever is counted", () => {
    for (const counted of ["filed", "upheld", "upheldAtMost"] as const)
      expect(observe(claims, counted)).toMatchObject({ units: 4, unitDays: 100, oldestDays: 40 });
  });
});

describe("the end of observation", () => {
  it("is no failure at a declined claim, a removal, the end of cover and the data cut", () => {
    for (const outcome of ["declined", "removed", "coverEnded", "running"] as const)
      expect(rowsOf([group(outcome, 55, 3)])).toEqual([{ ageDays: 55, failed: false, count: 3 }]);
  });

  it("is told by kind, and the kinds add up to the units", () => {
    const { ended, units } = observe(
      [group("running", 9, 5), group("coverEnded", 99, 4), group("removed", 7), group("confirmed", 8, 2)],
      "filed",
    );
    expect(ended).toMatchObject({ running: 5, coverEnded: 4, removed: 1, confirmed: 2, declined: 0 });
    expect(Object.values(ended).reduce((sum, count) => sum + count, 0)).toBe(units);
  });
});

describe("what is left out of the curve", () => {
  it("is a part dead on arrival, counted apart by what counts as a failure", () => {
    const groups = [group("confirmed", 0, 2), group("undecided", 0), group("running", 30, 8)];
    expect(observe(groups, "filed")).toMatchObject({ units: 8, failed: 0, leftOut: { deadOnArrival: 3 } });
    expect(observe(groups, "upheld")).toMatchObject({ units: 8, leftOut: { deadOnArrival: 2, today: 1 } });
  });

  it("is the shelf: never at risk, whatever its number", () => {
    const observed = observe([group("shelf", null, 300), group("running", 12)], "filed");
    expect(observed).toMatchObject({ units: 1, unitDays: 12, leftOut: { shelf: 300 } });
  });

  it("is a failure before service began, a fitting after cover, and a unit never shipped", () => {
    const groups = [
      group("beforeStart", null, 2),
      group("afterCover", null, 3),
      group("noShipment", null, 4),
    ];
    expect(observe(groups, "filed")).toMatchObject({
      rows: [],
      units: 0,
      leftOut: { beforeStart: 2, afterCover: 3, noShipment: 4, deadOnArrival: 0 },
    });
  });

  it("adds, with what is observed, up to every unit", () => {
    const anyGroup = fc
      .record({
        outcome: fc.constantFrom(...OUTCOMES),
        age: fc.integer({ min: 0, max: 900 }),
        count: fc.integer({ min: 1, max: 50 }),
        assumed: fc.boolean(),
      })
      .map(({ outcome, age, count, assumed }) => {
        const isNever = ["shelf", "beforeStart", "afterCover", "noShipment"].includes(outcome);
        return group(outcome, isNever ? null : age, count, { assumed });
      });
    fc.assert(
      fc.property(
        fc.array(anyGroup),
        fc.constantFrom("filed", "upheld", "upheldAtMost"),
        (groups, counted) => {
          const { units, leftOut, rows, failed, assumed } = observe(groups, counted);
          const all = groups.reduce((sum, { count }) => sum + count, 0);
          expect(units + Object.values(leftOut).reduce((sum, count) => sum + count, 0)).toBe(all);
          expect(rows.reduce((sum, { count }) => sum + count, 0)).toBe(units);
          expect(rows.every(({ ageDays }) => ageDays > 0)).toBe(true);
          expect(failed).toBeLessThanOrEqual(units);
          expect(assumed).toBeLessThanOrEqual(units);
        },
      ),
    );
  });
});

describe("months in service", () => {
  it("holds the ages from its beginning up to the next, and every day once", () => {
    const cells = monthCells(observe([group("running", 200)], "filed"));
    expect(cells).toHaveLength(7);
    expect(cells.map(({ fromDays, toDays }) => [fromDays, toDays]).slice(0, 3)).toEqual([
      [0, 30],
      [31, 60],
      [61, 91],
    ]);
    expect(cells[6]?.unitDays).toBeCloseTo(200 - 6 * MONTH_DAYS, 10);
  });

  it("counts a failure in its month, units for the days they spent in it, and loses neither", () => {
    const observed = observe(
      [group("confirmed", 31, 2), group("removed", 45), group("running", 100, 7)],
      "filed",
    );
    const cells = monthCells(observed);
    expect(cells.map(({ failed }) => failed)).toEqual([0, 2, 0, 0]);
    expect(cells.map(({ atRisk }) => atRisk)).toEqual([10, 10, 7, 7]);
    expect(cells.reduce((sum, { unitDays }) => sum + unitDays, 0)).toBeCloseTo(observed.unitDays, 8);
  });
});
