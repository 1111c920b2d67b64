import { beforeAll, beforeEach, describe, expect, it } from "vitest";
import { ask, problemOf } from "../../support/http";
import { adminQuery } from "../../support/database";
import { useOwnBucket } from "../storage/own-bucket";

beforeAll(useOwnBucket);

const beat = (age: string) =>
  adminQuery(
    `insert into worker_heartbeats (name, seen_at) values ('worker', now() - $1::interval)
     on conflict (name) do update set seen_at = excluded.seen_at`,
    [age],
  );

beforeEach(async () => {
  await beat("0 seconds");
});

const ready = async () => {
  const answer = await ask("GET", "/api/v1/ready", { headers: {} });
  return [answer.status, await problemOf(answer)];
};
const ALL = { database: true, migrations: true, store: true, worker: true };
const without = (part: keyof typeof ALL) => [503, { status: "notReady", parts: { ...ALL, [part]: false } }];

/** Alive whatever is missing: a restart would mend nothing of it. */
async function expectAlive() {
  const answer = await ask("GET", "/api/v1/health", { headers: {} });
  expect([answer.status, await answer.json()]).toEqual([200, { status: "live" }]);
  expect(answer.headers.get("cache-control")).toBe("no-store");
}

describe("readiness", () => {
  it("is said where nothing is missing, to anybody and without more than names", async () => {
    expect(await ready()).toEqual([200, { status: "ready", parts: ALL }]);
    await expectAlive();
  });

  it("ends a minute after the worker was last seen, and comes back with it", async () => {
    await beat("59 seconds");
    expect((await ready())[0]).toBe(200);
    await beat("61 seconds");
    expect(await ready()).toEqual(without("worker"));
    await expectAlive();
    await adminQuery("delete from worker_heartbeats");
    expect(await ready()).toEqual(without("worker"));
    await beat("0 seconds");
    expect((await ready())[0]).toBe(200);
  });

  it("ends while a migration is missing, or one is there that this build does not know", async () => {
    const [last] = await adminQuery(
      "delete from bookkeeping.schema_migrations where name = (select max(name) from bookkeeping.schema_migrations) returning name",
    );
    expect(await ready()).toEqual(without("migrations"));
    await expectAlive();
    for (const name of [last?.["name"], "20991231T0000-not-of-this-build.ts"])
      await adminQuery("insert into bookkeeping.schema_migrations (name) values ($1)", [name]);
    expect(await ready()).toEqual(without("migrations"));
    await adminQuery("delete from bookkeeping.schema_migrations where name like '2099%'");
    expect((await ready())[0]).toBe(200);
  });

  it("ends while the store has no bucket for us", async () => {
    const bucket = process.env["STORE_BUCKET"];
    process.env["STORE_BUCKET"] = "no-such-bucket";
    const said = await ready();
    process.env["STORE_BUCKET"] = bucket;
    expect(said).toEqual(without("store"));
    await expectAlive();
  });

  it("is answered within five seconds while the database hangs, and says so", async () => {
    const { default: pg } = await import("pg");
    const client = new pg.Client({ connectionString: process.env["DATABASE_URL_ADMIN"] });
    await client.connect();
    await client.query("begin");
    await client.query(
      "lock table worker_heartbeats, bookkeeping.schema_migrations in access exclusive mode",
    );
    const started = performance.now();
    const said = await ready();
    const waitedMs = performance.now() - started;
    await expectAlive();
    await client.query("rollback");
    await client.end();
    expect(said).toEqual([503, { status: "notReady", parts: { ...ALL, migrations: false, worker: false } }]);
    expect(waitedMs).toBeLessThan(5000);
    process.stdout.write(`readiness with a hanging database: 503 after ${waitedMs.toFixed(0)} ms\n`);
  });
});
