import { beforeAll, describe, expect, it, vi } from "vitest";

vi.hoisted(() => {
  process.env["DATABASE_POOL"] = "5";
});

import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { actorAt } from "../support/actor";
import { answerOf } from "../support/database";
import { twoDistributors, type World } from "./two-distributors";

const CALLS = 10_000;
/** More than the pool has, and few enough that nobody waits for a connection until it gives up. */
const AT_ONCE = 50;

let world: World;
beforeAll(async () => {
  world = await twoDistributors();
});

const CONTEXT = `select coalesce(nullif(current_setting('app.organisation_id', true), ''), 'nobody') as org,
  coalesce(nullif(current_setting('app.actor_id', true), ''), 'nobody') as actor,
  (select count(*)::integer from claims) as claims, pg_backend_pid() as pid`;
type Context = { org: string; actor: string; claims: number; pid: number };

const outside = () => sequelize.query<Context>(CONTEXT, { type: QueryTypes.SELECT });

describe("a pool of five connections shared by two organisations", () => {
  it("never shows one the other's rows, whatever fails in between", { timeout: 240_000 }, async () => {
    const { north, south } = world;
    const [ofNorth, ofSouth] = [
      actorAt(north, north.person, ["assessor"]),
      actorAt(south, south.person, ["assessor"]),
    ];
    const pids = new Set<number>();
    const call = async (at: number) => {
      const actor = at % 2 === 0 ? ofNorth : ofSouth;
      const work = unitOfWork(actor, async (unit) => {
        const found = await rows<{ seller: string }>(
          unit,
          "select seller_id as seller, pg_sleep(0.002) from claims",
        );
        expect(new Set(found.map(({ seller }) => seller))).toEqual(new Set([actor.organisationId]));
        if (at % 5 === 0) await rows(unit, "select 1 / 0");
        const [context] = await rows<Context>(unit, CONTEXT);
        expect([context?.org, context?.actor]).toEqual([actor.organisationId, actor.userId]);
        if (context) pids.add(context.pid);
      });
      expect(await answerOf(work)).toBe(at % 5 === 0 ? "22012" : "done");
      const [after] = await outside();
      expect(after).toMatchObject({ org: "nobody", actor: "nobody", claims: 0 });
    };
    for (let first = 0; first < CALLS; first += AT_ONCE)
      await Promise.all(Array.from({ length: AT_ONCE }, (_call, place) => call(first + place)));
    expect(pids.size).toBeGreaterThan(1);
    expect(pids.size).toBeLessThanOrEqual(5);
  });

  it("shows nothing to a query outside of a unit of work", async () => {
    expect((await outside())[0]?.claims).toBe(0);
    const actor = actorAt(world.north, world.north.person, ["assessor"]);
    expect((await unitOfWork(actor, (work) => rows<Context>(work, CONTEXT)))[0]?.claims).toBe(3);
  });

  it("forgets who asked when the work fails in the middle", async () => {
    const actor = actorAt(world.north, world.north.person, ["assessor"]);
    for (let round = 0; round < 20; round += 1) {
      const failing = unitOfWork(actor, async (work) => {
        await rows(work, "select 1");
        throw new Error("in the middle");
      });
      await expect(failing).rejects.toThrow("in the middle");
      expect((await outside())[0]).toMatchObject({ org: "nobody", claims: 0 });
    }
  });
});
