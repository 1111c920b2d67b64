import { beforeAll, describe, expect, it } from "vitest";
import { unitOfWork } from "@/lib/db/unit-of-work";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { countGroups, listBehind, type Observing } from "@/lib/reports/life-curves/queries";
import { actorAt } from "../support/actor";
import { buildBatch, buildDistributor, buildPerson } from "../support/build";
import {
  batchOf,
  endOf,
  gathered,
  observedWorld,
  playUnit,
  type UnitPlan,
  type World,
} from "./observed-world";

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

const SHIPPED = "2026-01-10";
const FITTED = "2026-02-01";
const on = (days: number) => addDays(calendarDay(FITTED), days);

/** Numbers that are the same on every run. */
function draws(seed: number) {
  let at = seed;
  return (below: number) => {
    at = (at * 1_103_515_245 + 12_345) % 2_147_483_648;
    return Math.floor((at / 2_147_483_648) * below);
  };
}

function anyPlan(draw: (below: number) => number): UnitPlan {
  const shippedOn = addDays(calendarDay("2024-03-01"), draw(800));
  const isFitted = draw(10) < 7;
  const fittedOn = addDays(shippedOn, draw(120));
  const removedOn = draw(10) < 3 ? addDays(fittedOn, draw(300)) : null;
  const again = removedOn !== null && draw(2) === 0 ? addDays(removedOn, draw(60)) : null;
  const told = (["undecided", "upheld", "carrier", "declined", "withdrawn"] as const)[draw(5)] ?? "upheld";
  const failedOn = addDays(isFitted ? fittedOn : shippedOn, draw(500) - 10);
  const filedOn = addDays(failedOn, draw(50));
  return {
    shippedOn: draw(20) === 0 ? null : shippedOn,
    fittings: isFitted
      ? [[fittedOn, removedOn] as const, ...(again === null ? [] : [[again, null] as const])]
      : [],
    claims: draw(10) < 4 ? [{ told, failedOn, filedOn, decidedOn: addDays(filedOn, draw(60)) }] : [],
  };
}

describe("counts by batch, age and outcome", () => {
  it("are those of the rules applied unit by unit, old and new number together", async () => {
    const mixed = await observedWorld();
    const draw = draws(20_261_201);
    const batches = [await batchOf(mixed), await buildBatch(mixed.seller, mixed.old)] as const;
    const plans: { batchId: string; plan: UnitPlan }[] = [];
    for (let unit = 0; unit < 150; unit += 1) {
      const place = draw(2);
      const batch = batches[place === 0 ? 0 : 1];
      const plan = anyPlan(draw);
      await playUnit(mixed, batch, plan, place === 0 ? mixed.part : mixed.old);
      plans.push({ batchId: batch.id, plan });
    }
    const actor = actorAt(mixed.seller, mixed.analyst, ["analyst"]);
    for (const start of ["fitting", "lag"] as const)
      for (const cutOn of [CUT, calendarDay("2025-09-15")]) {
        const rules = { cutOn, lagDays: LAG, start };
        const shipped = plans.filter(({ plan }) => plan.shippedOn === null || plan.shippedOn <= cutOn);
        const wanted = gathered(shipped.map(({ batchId, plan }) => ({ batchId, ...endOf(plan, rules) })));
        const found = await groupsOf({ partIds: [mixed.part.id, mixed.old.id], ...rules }, actor);
        const counts = found.map(({ atLargest: _atLargest, ...group }) => group);
        expect(counts).toHaveLength(wanted.length);
        expect(counts).toEqual(expect.arrayContaining(wanted));
      }
  });

  it("open exactly the claims they count", async () => {
    const batch = await batchOf(world);
    const fittings = [[FITTED, null]] as const;
    for (const failed of [10, 10, 45])
      await playUnit(world, batch, {
        shippedOn: SHIPPED,
        fittings,
        claims: [{ told: "undecided", failedOn: on(failed) }],
      });
    const behind = (fromDays: number, toDays: number) =>
      unitOfWork(analyst(), (work) =>
        listBehind(work, asking(), {
          behind: {
            batchIds: [batch.id],
            outcomes: ["confirmed", "otherCause", "undecided"],
            withoutLargest: false,
            fromDays,
            toDays,
          },
          page: 1,
        }),
      );
    expect((await behind(10, 10)).map(({ ageDays, total }) => [ageDays, total])).toEqual([
      [10, 2],
      [10, 2],
    ]);
    expect((await behind(11, 45)).map(({ ageDays }) => ageDays)).toEqual([45]);
    expect(await behind(46, 900)).toEqual([]);
  });
});

describe("another organisation", () => {
  it("counts nothing of these units, be it a distributor, the workshop that has them, or one that names their part", async () => {
    const batch = await batchOf(world);
    await playUnit(world, batch, { shippedOn: SHIPPED, fittings: [[FITTED, null]] });
    const stranger = await buildDistributor();
    const spy = await buildPerson(stranger, ["analyst"]);
    expect(await groupsOf({}, actorAt(stranger, spy, ["analyst"]))).toEqual([]);
    expect(await groupsOf({}, actorAt(world.buyer, world.between.person, ["technician"]))).toEqual([]);
    expect((await groupsOf()).length).toBeGreaterThan(0);
  });
});
