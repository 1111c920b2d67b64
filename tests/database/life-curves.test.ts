import { beforeAll, describe, expect, it } from "vitest";
import { unitOfWork } from "@/lib/db/unit-of-work";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { countGroups, findLag, type Observing } from "@/lib/reports/life-curves/queries";
import { actorAt } from "../support/actor";
import { batchOf, observedWorld, playUnit, type UnitPlan, type World } from "./observed-world";

const CUT = calendarDay("2026-06-30");
const LAG = 20;

let world: World;
beforeAll(async () => {
  world = await observedWorld();
});

const analyst = () => actorAt(world.seller, world.analyst, ["analyst"]);
const asking = (over: Partial<Observing> = {}): Observing => ({
  partIds: [world.part.id, world.old.id],
  cutOn: CUT,
  lagDays: LAG,
  start: "fitting",
  largestId: null,
  ...over,
});
const groupsOf = (over?: Partial<Observing>, actor = analyst()) =>
  unitOfWork(actor, (work) => countGroups(work, asking(over)));

/** What the database says of one unit that is alone in its batch. */
async function said(plan: UnitPlan, over: Partial<Observing> = {}) {
  const batch = await batchOf(world);
  await playUnit(world, batch, plan);
  const groups = (await groupsOf(over)).filter(({ batchId }) => batchId === batch.id);
  expect(groups).toHaveLength(1);
  const { outcome, ageDays, assumed, count } = groups[0] ?? {};
  expect(count).toBe(1);
  return { outcome, ageDays, assumed };
}

const SHIPPED = "2026-01-10";
const FITTED = "2026-02-01";
const on = (days: number) => addDays(calendarDay(FITTED), days);

describe("the end of observation of one unit", () => {
  it("is the data cut while it runs under cover", async () => {
    expect(await said({ shippedOn: SHIPPED, fittings: [[FITTED, null]] })).toEqual({
      outcome: "running",
      ageDays: 149,
      assumed: false,
    });
  });

  it("is the failure day of a claim that was not declined, by what became of it", async () => {
    for (const [told, outcome] of [
      ["undecided", "undecided"],
      ["upheld", "confirmed"],
      ["carrier", "otherCause"],
      ["declined", "declined"],
      ["withdrawn", "declined"],
    ] as const)
      expect(
        await said({
          shippedOn: SHIPPED,
          fittings: [[FITTED, on(70)]],
          claims: [{ told, failedOn: on(60), filedOn: on(66) }],
        }),
      ).toEqual({ outcome, ageDays: 60, assumed: false });
  });

  it("is the last day of cover plus the filing days, by the terms of the shipment day", async () => {
    // Shipped under the first terms: 12 months from the fitting, its last day 31 July 2025, and 30 days to file.
    expect(await said({ shippedOn: "2024-07-20", fittings: [["2024-08-01", null]] })).toEqual({
      outcome: "coverEnded",
      ageDays: 394,
      assumed: false,
    });
    // The same fitting day under the later ones, 24 months: still running.
    expect(await said({ shippedOn: "2025-01-02", fittings: [["2025-02-01", null]] })).toMatchObject({
      outcome: "running",
    });
  });

  it("is, for a unit supplied under a claim, that of the unit bought, or of its least cover where that is later", async () => {
    const bought = await playUnit(world, await batchOf(world), {
      shippedOn: "2024-07-20",
      fittings: [["2024-08-01", "2025-01-10"]],
    });
    // What is left of the first term ends with 31 July 2025; 30 days to file by the terms of the first shipment day.
    const early = { shippedOn: "2024-12-20", fittings: [["2025-01-10", null]], replaces: bought } as const;
    expect(await said(early)).toEqual({ outcome: "coverEnded", ageDays: 232, assumed: false });
    // Fitted on 1 July 2025: 90 days of least cover reach further, and 45 days to file by the later terms.
    const late = { shippedOn: "2025-06-20", fittings: [["2025-07-01", null]], replaces: bought } as const;
    expect(await said(late)).toEqual({ outcome: "coverEnded", ageDays: 134, assumed: false });
  });

  it("leaves out a failure that comes after it", async () => {
    expect(
      await said({
        shippedOn: "2024-07-20",
        fittings: [["2024-08-01", null]],
        claims: [{ told: "undecided", failedOn: "2025-09-30" }],
      }),
    ).toEqual({ outcome: "coverEnded", ageDays: 394, assumed: false });
  });

  it("is the removal of a unit nobody claimed", async () => {
    expect(await said({ shippedOn: SHIPPED, fittings: [[FITTED, on(40)]] })).toEqual({
      outcome: "removed",
      ageDays: 40,
      assumed: false,
    });
  });

  it("adds several fittings up and leaves out the days between them", async () => {
    expect(
      await said({
        shippedOn: SHIPPED,
        fittings: [
          [FITTED, on(40)],
          [on(60), null],
        ],
        claims: [{ told: "upheld", failedOn: on(75) }],
      }),
    ).toEqual({ outcome: "confirmed", ageDays: 55, assumed: false });
  });

  it("is told by the claim that was upheld, not by an earlier one that was declined", async () => {
    const claims = [
      { told: "declined", failedOn: on(20) },
      { told: "upheld", failedOn: on(90) },
    ] as const;
    expect(await said({ shippedOn: SHIPPED, fittings: [[FITTED, null]], claims })).toEqual({
      outcome: "confirmed",
      ageDays: 90,
      assumed: false,
    });
  });

  it("is the removal, where the unit was fitted again only after the data cut", async () => {
    const fittings = [
      [FITTED, on(40)],
      [on(60), null],
    ] as const;
    expect(await said({ shippedOn: SHIPPED, fittings }, { cutOn: on(50) })).toEqual({
      outcome: "removed",
      ageDays: 40,
      assumed: false,
    });
  });

  it("knows nothing of what happened after the data cut", async () => {
    const claims = [{ told: "upheld", failedOn: on(60), filedOn: on(66), decidedOn: on(80) }] as const;
    const plan = { shippedOn: SHIPPED, fittings: [[FITTED, on(66)]], claims } as const;
    expect(await said(plan, { cutOn: on(50) })).toMatchObject({ outcome: "running", ageDays: 50 });
    expect(await said(plan, { cutOn: on(70) })).toMatchObject({ outcome: "undecided", ageDays: 60 });
    expect(await said(plan, { cutOn: on(80) })).toMatchObject({ outcome: "confirmed", ageDays: 60 });
  });
});

describe("the start of service", () => {
  it("keeps a unit without fitting and claim on the shelf", async () => {
    expect(await said({ shippedOn: SHIPPED })).toEqual({ outcome: "shelf", ageDays: null, assumed: false });
  });

  it("is estimated for a claimed unit without a fitting", async () => {
    const claims = [{ told: "undecided", failedOn: "2026-03-01" }] as const;
    expect(await said({ shippedOn: SHIPPED, claims })).toEqual({
      outcome: "undecided",
      ageDays: 30,
      assumed: true,
    });
  });

  it("is shipment plus lag for failed and running units alike where too few starts are recorded", async () => {
    const lag = { start: "lag" } as const;
    expect(await said({ shippedOn: SHIPPED }, lag)).toEqual({
      outcome: "running",
      ageDays: 151,
      assumed: true,
    });
    expect(await said({ shippedOn: SHIPPED, fittings: [[FITTED, null]] }, lag)).toEqual({
      outcome: "running",
      ageDays: 151,
      assumed: true,
    });
  });

  it("leaves out a failure before it, a unit fitted after cover, and one never shipped", async () => {
    const early = [{ told: "undecided", failedOn: "2026-01-15" }] as const;
    expect(await said({ shippedOn: SHIPPED, claims: early })).toMatchObject({ outcome: "beforeStart" });
    expect(await said({ shippedOn: "2024-01-10", fittings: [["2026-01-10", null]] })).toMatchObject({
      outcome: "afterCover",
      ageDays: null,
    });
    expect(await said({ shippedOn: null, fittings: [[FITTED, null]] })).toMatchObject({
      outcome: "noShipment",
    });
  });

  it("is at age 0 for a part dead on arrival", async () => {
    const claims = [{ told: "upheld", failedOn: FITTED }] as const;
    expect(await said({ shippedOn: SHIPPED, fittings: [[FITTED, FITTED]], claims })).toEqual({
      outcome: "confirmed",
      ageDays: 0,
      assumed: false,
    });
  });

  it("takes the median lag of the family's recorded first fittings", async () => {
    const seller = await observedWorld();
    const batch = await batchOf(seller);
    for (const days of [2, 9, 30, 31, 400])
      await playUnit(seller, batch, {
        shippedOn: SHIPPED,
        fittings: [[addDays(calendarDay(SHIPPED), days), null]],
      });
    const lag = await unitOfWork(actorAt(seller.seller, seller.analyst, ["analyst"]), (work) =>
      findLag(work, "brake", CUT),
    );
    // The one of 400 days lies after the data cut.
    expect(lag).toEqual({ lagDays: 9, fittings: 4 });
  });
});
