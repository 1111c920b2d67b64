import pg from "pg";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { acceptVerdict, contestVerdict, reopenClaim } from "@/lib/claims/contesting/service";
import { takeOverClaim } from "@/lib/claims/judging/service";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { allocateCredit, takeBackAllocation } from "@/lib/day-book/allocating/service";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { findNote } from "@/lib/day-book/notes/queries";
import { settleClaims } from "@/lib/jobs/tasks/settle-claims";
import { actorAt } from "../support/actor";
import { buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import {
  creditWorld,
  decidedClaim,
  issued,
  judge,
  type CreditWorld,
  type DecidedClaim,
} from "./credit-world";

const AT_ONCE = 10;

let world: CreditWorld;
let pool: pg.Pool;
beforeAll(async () => {
  world = await creditWorld();
  pool = new pg.Pool({ connectionString: process.env["DATABASE_URL_WORKER"], max: AT_ONCE });
});
afterAll(() => pool.end());

async function withPgClient<T>(act: (client: pg.PoolClient) => Promise<T>): Promise<T> {
  const client = await pool.connect();
  try {
    return await act(client);
  } finally {
    client.release();
  }
}
const settle = () => settleClaims({}, { withPgClient });

const stateOf = async ({ id }: { id: string }) => {
  const [row] = await adminQuery<{ state: string; holds: boolean; settled: number }>(
    `select state, exists (select 1 from claim_lines l where l.claim_id = c.id and l.holds_unit) as holds,
       (select count(*)::integer from timeline_entries t where t.claim_id = c.id and t.kind = 'settle') as settled
     from claims c where id = $1`,
    [id],
  );
  return row;
};

const manager = () => world.managers[0];

/** Issued and allocated in full. */
async function used(claim: DecidedClaim): Promise<string> {
  const number = await issued(world, claim);
  const form = { number, how: "invoice" as const, amount: "192.11", reference: "R 1", rowsBefore: 0 };
  expect(await allocateCredit(world.clerk, form)).toMatchObject({ ok: true });
  return number;
}

describe("a claim", () => {
  it("is settled once when its credit is closed and its verdict accepted, however many workers run", async () => {
    const claim = await decidedClaim(world);
    await used(claim);
    await settle();
    expect(await stateOf(claim)).toMatchObject({ state: "decided", settled: 0 });
    expect(await acceptVerdict(manager(), claim)).toMatchObject({ ok: true });
    await Promise.all(Array.from({ length: AT_ONCE }, settle));
    expect(await stateOf(claim)).toEqual({ state: "settled", holds: true, settled: 1 });
  });

  it("is settled without a word of the workshop once its days to object are over, and not on the last of them", async () => {
    const claim = await decidedClaim(world);
    await used(claim);
    const today = "(now() at time zone 'Europe/Berlin')::date";
    await adminQuery(`update claims set contest_until = ${today} where id = $1`, [claim.id]);
    await settle();
    expect(await stateOf(claim)).toMatchObject({ state: "decided" });
    await adminQuery(`update claims set contest_until = ${today} - 1 where id = $1`, [claim.id]);
    await settle();
    expect(await stateOf(claim)).toMatchObject({ state: "settled" });
  });

  it("stays open while anything of its credit is", async () => {
    const claim = await decidedClaim(world);
    expect(await acceptVerdict(manager(), claim)).toMatchObject({ ok: true });
    await settle();
    expect(await stateOf(claim)).toMatchObject({ state: "decided" });
    await issued(world, claim);
    await settle();
    expect(await stateOf(claim)).toMatchObject({ state: "decided" });
  });

  it("that was declined lets go of its unit when it is settled", async () => {
    const claim = await decidedClaim(world, { outcome: "declined" });
    expect(await stateOf(claim)).toMatchObject({ holds: true });
    expect(await acceptVerdict(manager(), claim)).toMatchObject({ ok: true });
    await settle();
    expect(await stateOf(claim)).toEqual({ state: "settled", holds: false, settled: 1 });
  });

  it("that is settled has its credit left alone until an administrator opens it again, with a reason", async () => {
    const claim = await decidedClaim(world);
    const number = await used(claim);
    await acceptVerdict(manager(), claim);
    await settle();
    const note = await findNote(world.clerk, { number, of: "" });
    const allocationId = note?.allocations[0]?.id ?? "";
    expect(await takeBackAllocation(world.clerk, { number, allocationId })).toMatchObject({
      code: "creditSettled",
    });
    expect(await counterCredit(world.clerk, { number, reason: "x" })).toMatchObject({
      code: "creditSettled",
    });

    const keeper = await buildPerson(world.seller, ["administrator"]);
    const administrator = actorAt(world.seller, keeper, ["administrator"]);
    expect(await reopenClaim(world.assessor, { ...claim, reason: "x" })).toMatchObject({
      code: "moveNotOpen",
    });
    expect(await reopenClaim(administrator, { ...claim, reason: "New evidence." })).toMatchObject({
      ok: true,
    });
    expect(await takeOverClaim(world.assessor, claim)).toMatchObject({ code: "moveNotOpen" });
    expect(await takeOverClaim(world.second, claim)).toMatchObject({ ok: true });
    await judge(world.second, claim, "upheldInPart");
    expect(await takeBackAllocation(world.clerk, { number, allocationId })).toMatchObject({ ok: true });
    expect(await counterCredit(world.clerk, { number, reason: "New verdict." })).toMatchObject({ ok: true });
  });
});

describe("the days to object", () => {
  it("are given up by the workshop's manager alone, once, and then nobody objects", async () => {
    const claim = await decidedClaim(world);
    expect((await findClaimSheet(manager(), claim.number))?.canAccept).toBe(true);
    for (const other of [world.clerk, world.assessor, world.managers[1]])
      expect(await acceptVerdict(other, claim)).toMatchObject({ ok: false });
    expect(await acceptVerdict(manager(), claim)).toMatchObject({ ok: true });
    expect(await acceptVerdict(manager(), claim)).toMatchObject({ code: "moveNotOpen" });
    expect(await contestVerdict(manager(), { ...claim, reason: "x" })).toMatchObject({
      code: "contestWaived",
    });
    const sheet = await findClaimSheet(manager(), claim.number);
    expect([sheet?.canAccept, sheet?.moves.includes("contest"), sheet?.isContestOpen]).toEqual([
      false,
      false,
      false,
    ]);
    expect(sheet?.timeline.map(({ kind }) => kind)).toContain("accepted");
  });

  it("are over after the last of them: the button is gone, and the service refuses the day after", async () => {
    const claim = await decidedClaim(world);
    const today = "(now() at time zone 'Europe/Berlin')::date";
    await adminQuery(`update claims set contest_until = ${today} where id = $1`, [claim.id]);
    expect((await findClaimSheet(manager(), claim.number))?.moves).toContain("contest");
    await adminQuery(`update claims set contest_until = ${today} - 1 where id = $1`, [claim.id]);
    const sheet = await findClaimSheet(manager(), claim.number);
    expect([sheet?.canAccept, sheet?.moves.includes("contest")]).toEqual([false, false]);
    expect(await contestVerdict(manager(), { ...claim, reason: "x" })).toMatchObject({ code: "contestOver" });
  });
});
