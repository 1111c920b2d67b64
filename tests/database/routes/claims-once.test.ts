import { randomUUID } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { askJson, problemOf } from "../../support/http";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops, type Shop } from "../shops";

let world: Awaited<ReturnType<typeof twoShops>>;
let session: string;
let other: string;

beforeAll(async () => {
  world = await twoShops();
  const [shop, second] = world.shops;
  session = await startSession(shop.person, shop.workshop);
  other = await startSession(second.person, second.workshop);
});

const post = (key: string | null, unitId: string, asker = session) =>
  askJson(
    "POST",
    "/api/v1/claims",
    { unitId },
    { session: asker, headers: key === null ? {} : { "idempotency-key": key } },
  );

const soldTo = (shop: Shop = world.shops[0]) => world.sell(shop);

const claimsOf = async ({ workshop }: Shop = world.shops[0]): Promise<number> => {
  const rows = await adminQuery("select 1 from claims where workshop_id = $1", [workshop.id]);
  return rows.length;
};

describe("POST /claims", () => {
  it("without a key is refused with 400 and starts nothing", async () => {
    const before = await claimsOf();
    const unit = await soldTo();
    for (const key of [null, "", "short", "x".repeat(201)]) {
      const answer = await post(key, unit.id);
      expect(answer.status).toBe(400);
      expect((await problemOf(answer))["code"]).toBe("keyMissing");
    }
    expect(await claimsOf()).toBe(before);
  });

  it("with the same key and body again is the same answer and one claim", async () => {
    const before = await claimsOf();
    const [unit, key] = [await soldTo(), randomUUID()];
    const [first, again] = [await post(key, unit.id), await post(key, unit.id)];
    expect([first.status, again.status]).toEqual([200, 200]);
    expect(await again.text()).toBe(await first.text());
    expect(again.headers.get("idempotent-replay")).toBe("true");
    expect(again.headers.get("content-type")).toBe(first.headers.get("content-type"));
    expect(await claimsOf()).toBe(before + 1);
  });

  it("with the same key and another body is refused with 422", async () => {
    const before = await claimsOf();
    const key = randomUUID();
    await post(key, (await soldTo()).id);
    const answer = await post(key, (await soldTo()).id);
    expect(answer.status).toBe(422);
    expect((await problemOf(answer))["code"]).toBe("keyReused");
    expect(await claimsOf()).toBe(before + 1);
  });

  it("200 keys sent five times at once are 200 claims", async () => {
    const before = await claimsOf();
    const unit = await soldTo();
    const statuses: Record<number, number> = {};
    for (let round = 0; round < 200; round += 10) {
      const keys = Array.from({ length: 10 }, () => randomUUID());
      const sent = keys.flatMap((key) => Array.from({ length: 5 }, () => post(key, unit.id)));
      for (const { status } of await Promise.all(sent)) statuses[status] = (statuses[status] ?? 0) + 1;
    }
    expect(await claimsOf()).toBe(before + 200);
    expect(Object.keys(statuses).filter((status) => status !== "200" && status !== "409")).toEqual([]);
    process.stdout.write(`idempotency: 200 keys x 5, 200 effects, answers ${JSON.stringify(statuses)}\n`);
  }, 120_000);

  it("that names nothing to start from, or half of it, is refused like a thing that is not there", async () => {
    const before = await claimsOf();
    const { account } = world.shops[0];
    for (const sent of [{}, { serial: "BR-1" }, { accountId: account.id }, { partId: world.part.id }]) {
      const answer = await askJson("POST", "/api/v1/claims", sent, {
        session,
        headers: { "idempotency-key": randomUUID() },
      });
      expect([answer.status, (await problemOf(answer))["code"]]).toEqual([404, "notFound"]);
    }
    expect(await claimsOf()).toBe(before);
  });

  it("a key of another organisation is apart", async () => {
    const key = randomUUID();
    const mine = await problemOf(await post(key, (await soldTo()).id));
    const theirs = await problemOf(await post(key, (await soldTo(world.shops[1])).id, other));
    expect(theirs["number"]).toMatch(/^\d{8}$/u);
    expect(theirs["number"]).not.toBe(mine["number"]);
  });

  it("a refusal is replayed as the problem it was", async () => {
    const [key, unit] = [randomUUID(), await soldTo(world.shops[1])];
    const [first, again] = [await post(key, unit.id), await post(key, unit.id)];
    expect([first.status, again.status]).toEqual([404, 404]);
    expect(again.headers.get("content-type")).toBe("application/problem+json");
    expect((await problemOf(again))["code"]).toBe((await problemOf(first))["code"]);
  });
});
