import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { lifeCurvesView, type LifeCurvesInput } from "@/lib/reports/life-curves/compute";
import { csvOf, CSV_COLUMNS } from "@/lib/reports/life-curves/csv";
import type { AgeGroup, UnitOutcome } from "@/lib/reports/life-curves/outcomes";
import type { RootPart } from "@/lib/reports/life-curves/root-parts";
import { lifeCurvesQuery } from "@/lib/reports/life-curves/schema";

const ROOT: RootPart = {
  partIds: ["p"],
  partNumber: "LMB-2410",
  partNumbers: ["LMB-2410"],
  name: "Drive brake",
  family: "brake",
  claims: 40,
};

const batch = (code: string) => ({
  id: code,
  code,
  partNumber: "LMB-2410",
  madeOn: calendarDay("2026-01-05"),
});
const group = (batchId: string, outcome: UnitOutcome, ageDays: number | null, count: number): AgeGroup => ({
  batchId,
  outcome,
  ageDays,
  count,
  assumed: false,
  atLargest: false,
});

/** A batch of 200 that fails now and then, the same in every batch that is called usual. */
const usual = (id: string): AgeGroup[] => [
  ...[70, 150, 260, 400].map((age) => group(id, "undecided", age, 1)),
  group(id, "running", 500, 196),
];
const BAD: AgeGroup[] = [
  ...[60, 75, 80, 90, 95, 110, 120, 130, 140, 150].map((age) => group("bad", "confirmed", age, 1)),
  group("bad", "undecided", 100, 2),
  group("bad", "running", 200, 90),
];
const YOUNG = [group("young", "running", 25, 80)];
const ALL = [...usual("one"), ...usual("two"), ...usual("three"), ...BAD, ...YOUNG];

function viewOf(over: Partial<LifeCurvesInput> = {}, address: Record<string, unknown> = {}) {
  const groups = over.groups ?? ALL;
  const ids = [...new Set(groups.map(({ batchId }) => batchId))];
  return lifeCurvesView({
    roots: [ROOT],
    root: ROOT,
    query: { ...lifeCurvesQuery.parse(address), part: ROOT.partNumber, cut: calendarDay("2026-12-01") },
    batches: ids.map(batch),
    groups,
    groupsBefore: groups,
    basis: { rule: "fitting", recorded: 9, due: 10, lagDays: 20, lagFittings: 90 },
    withoutUnit: 0,
    largest: null,
    ...over,
  });
}

const lineOf = (view: ReturnType<typeof viewOf>, key: string) =>
  view.batches.find((line) => line.key === key);

describe("the screen", () => {
  it("puts the bad batch first, on Act, and draws it", () => {
    const view = viewOf();
    expect(view.batches[0]).toMatchObject({ key: "bad", grade: "act", reason: "strong", style: 0 });
    expect(view.batches[0]?.ratio?.lower).toBeGreaterThan(1.5);
    expect(view.batches[0]?.adjustedP).toBeLessThan(0.001);
    expect(view.series.map(({ key }) => key)).toEqual(["bad"]);
    expect(view.comparisons).toBeGreaterThanOrEqual(4);
  });

  it("calls the other batches quiet, measured among themselves once the bad one is on Act", () => {
    const view = viewOf();
    for (const key of ["one", "two", "three"]) {
      expect(lineOf(view, key)).toMatchObject({ grade: "quiet", failed: 4 });
      expect(lineOf(view, key)?.ratio?.value).toBeCloseTo(1, 10);
    }
  });

  it("calls a batch of young units not yet known, however well it looks", () => {
    expect(lineOf(viewOf(), "young")).toMatchObject({ grade: "notYetKnown", failed: 0 });
  });

  it("only looks into what was not strong a month before", () => {
    const before = [...usual("one"), ...usual("two"), ...usual("three"), group("bad", "running", 170, 102)];
    expect(viewOf({ groupsBefore: before }).batches[0]).toMatchObject({
      key: "bad",
      grade: "lookInto",
      reason: "firstLook",
    });
  });

  it("has no comparison where there is one batch alone", () => {
    const view = viewOf({ groups: usual("one") });
    expect(view.batches).toMatchObject([
      { grade: "notYetKnown", reason: "alone", adjustedP: null, ratio: null },
    ]);
    expect(view).toMatchObject({ rest: null, compared: null, comparisons: 0 });
  });

  it("shows the ratio without the largest workshop beside the one with it", () => {
    const groups = ALL.map((one) =>
      one.batchId === "bad" && one.count === 1 ? { ...one, atLargest: true } : one,
    );
    const view = viewOf({ groups, largest: { name: "Saltmarsh", claims: 10 } });
    const line = lineOf(view, "bad");
    expect(line?.ratioWithout?.value).toBeLessThan(line?.ratio?.value ?? 0);
    expect(lineOf(viewOf({ groups }, { shop: "without" }), "bad")?.failed).toBe(2);
  });
});

describe("the curves", () => {
  it("fall by the product of those that stayed, and pool the batches that are not drawn", () => {
    const view = viewOf({}, { batch: "bad" });
    const [bad] = view.series;
    expect(bad?.curve[0]).toMatchObject({ ageDays: 60, atRisk: 102, failed: 1 });
    expect(bad?.curve[0]?.survival).toBeCloseTo(101 / 102, 12);
    expect(view.rest).toMatchObject({ key: null, units: 680, failed: 12 });
  });

  it("never give a p-value without the shares it stands for", () => {
    const { compared } = viewOf();
    expect(compared?.key).toBe("bad");
    expect(compared?.p).toBeLessThan(0.001);
    expect(compared?.ages).toMatchObject({ months: 6 });
    expect(compared?.ages.one).toBeCloseTo(90 / 102, 10);
    expect(compared?.ages.others).toBeGreaterThan(0.98);
  });

  it("draw, for the maker, the undecided as a band and not as failures", () => {
    const [bad] = viewOf({}, { batch: "bad", count: "upheld" }).series;
    expect(bad?.failed).toBe(10);
    expect(bad?.atMost?.at(-1)?.survival).toBeLessThan(bad?.curve.at(-1)?.survival ?? 0);
    expect(viewOf({}, { batch: "bad" }).series[0]?.atMost).toBeNull();
  });

  it("say from where fewer than ten are left", () => {
    const groups = [...usual("one"), group("thin", "running", 100, 5), group("thin", "confirmed", 90, 8)];
    expect(viewOf({ groups }, { batch: "thin" }).series[0]?.thinFrom).toBe(90);
    expect(viewOf({ groups }, { batch: "one" }).series[0]?.thinFrom).toBeNull();
  });

  it("lose no unit in the table under them until its last column", () => {
    const [bad] = viewOf({}, { batch: "bad" }).series;
    for (const [place, cell] of (bad?.risk ?? []).entries()) {
      const gone = (bad?.risk ?? [])
        .slice(0, place + 1)
        .reduce((sum, { failed, ended }) => sum + failed + ended, 0);
      expect(cell.atRisk + gone).toBe(102);
    }
  });

  it("draw five batches at most, whatever the address asks for", () => {
    const groups = ["a", "b", "c", "d", "e", "f", "g"].flatMap(usual);
    expect(viewOf({ groups }, { batch: ["a", "b", "c", "d", "e"] }).series).toHaveLength(5);
    expect(viewOf({ groups }, { batch: ["a", "b", "c", "d", "e", "f"] }).series).toHaveLength(1);
    expect(viewOf({ groups }, { batch: ["nothing"] }).series).toHaveLength(1);
  });
});

describe("the Weibull sheet", () => {
  it("gives shape, scale and B10 with limits, and a point for each fall", () => {
    const sheet = viewOf({}, { batch: "bad" }).series[0]?.weibull;
    expect(sheet).toMatchObject({ kind: "fit", failed: 12, isThin: false, b10Method: "profile" });
    if (sheet?.kind !== "fit") throw new Error("no fit");
    expect(sheet.shape.lower).toBeLessThan(sheet.shape.value);
    expect(sheet.points).toHaveLength(11);
  });

  it("warns under ten failures", () => {
    expect(viewOf({}, { batch: "one" }).series[0]?.weibull).toMatchObject({ kind: "fit", isThin: true });
  });

  it("says why there is no estimate, and prints no number", () => {
    const none = (groups: AgeGroup[]) => viewOf({ groups }).series[0]?.weibull;
    expect(none([group("a", "running", 90, 9)])).toEqual({ kind: "none", reason: "noFailures", failed: 0 });
    expect(none([group("a", "running", 40, 9), group("a", "confirmed", 90, 2)])).toEqual({
      kind: "none",
      reason: "allAtGreatestAge",
      failed: 2,
    });
  });
});

describe("months in service", () => {
  it("count every failure of the batch once, with the rate of the others beside", () => {
    const view = viewOf({}, { batch: "bad" });
    expect(view.months.reduce((sum, { failed }) => sum + failed, 0)).toBe(12);
    expect(view.months[0]).toMatchObject({ failed: 0, others: 0 });
    expect(view.months.every(({ rate }) => rate !== null && rate.lower <= rate.value)).toBe(true);
  });
});

describe("the table as a file", () => {
  const file = csvOf(
    viewOf({ batches: [{ ...batch("one"), code: '=cmd("x"),1' }, batch("bad")] }),
    (column) => column,
  );
  const lines = file.split("\r\n");

  it("has one head, one row a batch, the same columns in each, and the switches in every row", () => {
    expect(lines[0]).toBe(CSV_COLUMNS.join(","));
    expect(lines.at(-1)).toBe("");
    expect(lines[1]).toMatch(/^bad,LMB-2410,act,102,12,/u);
    expect(lines[1]).toMatch(/,filed,fitting,2026-12-01$/u);
  });

  it("runs no formula that hides in a batch code", () => {
    expect(file).toContain(`"'=cmd(""x""),1"`);
    expect(file).not.toMatch(/(^|,|\n)=/u);
  });
});
