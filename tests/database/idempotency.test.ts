import { randomUUID } from "node:crypto";
import { beforeEach, describe, expect, it, vi } from "vitest";

// The sentences of a refusal are the wording tests' business; outside of a request the framework has none.
vi.mock("next-intl/server", () => ({ getTranslations: () => Promise.resolve((key: string) => key) }));

import type { Actor } from "@/lib/access/actor";
import { withIdempotency } from "@/lib/web/idempotency";
import { actorAt } from "../support/actor";
import { buildOrganisation, buildPerson } from "../support/build";
import { adminQuery } from "../support/database";

const ROUTE = "POST /api/v1/claims";

let actor: Actor;
let runs: number;
const act = () => {
  runs += 1;
  return Promise.resolve(Response.json({ number: `4107382${runs}` }, { status: 201 }));
};

beforeEach(async () => {
  runs = 0;
  const workshop = await buildOrganisation();
  actor = actorAt(workshop, await buildPerson(workshop, ["technician"]), ["technician"]);
});

const send = (
  key: string | null,
  fingerprint = "body one",
  over: { actor?: Actor; route?: string } = {},
  work = act,
) => withIdempotency({ actor, route: ROUTE, key, fingerprint, ...over }, work);
const codeOf = async (response: Response) => {
  const body: unknown = await response.json();
  return [response.status, Reflect.get(Object(body), "code")];
};

describe("a request with a key", () => {
  it("sent twice takes effect once and is answered alike", async () => {
    const key = randomUUID();
    const [first, again] = [await send(key), await send(key)];
    expect([first.status, await first.json()]).toEqual([201, { number: "41073821" }]);
    expect([again.status, await again.json()]).toEqual([201, { number: "41073821" }]);
    expect(again.headers.get("idempotent-replay")).toBe("true");
    expect(again.headers.get("cache-control")).toBe("private, no-store");
    expect(runs).toBe(1);
  });

  it("with another body is refused as unprocessable, before and after the first is done", async () => {
    const key = randomUUID();
    await send(key);
    expect(await codeOf(await send(key, "body two"))).toEqual([422, "keyReused"]);
    expect(runs).toBe(1);
  });

  it("while the first still runs is refused as a conflict; ten at once take effect once", async () => {
    const key = randomUUID();
    let finish = () => {};
    const running = new Promise<void>((resolve) => (finish = resolve));
    const slow = async () => {
      await running;
      return act();
    };
    const first = send(key, "body one", {}, slow);
    await vi.waitFor(async () => {
      expect(await adminQuery("select 1 from idempotency_keys where key = $1", [key])).toHaveLength(1);
    });
    const others = await Promise.all(Array.from({ length: 9 }, () => send(key, "body one", {}, slow)));
    for (const other of others) expect(await codeOf(other)).toEqual([409, "keyRunning"]);
    expect(await codeOf(await send(key, "body two", {}, slow))).toEqual([422, "keyReused"]);
    finish();
    expect((await first).status).toBe(201);
    expect((await send(key)).status).toBe(201);
    expect(runs).toBe(1);
  });

  it("replays a refusal as it was", async () => {
    const key = randomUUID();
    const refused = () => Promise.resolve(Response.json({ code: "draftIncomplete" }, { status: 422 }));
    await send(key, "body one", {}, refused);
    expect(await codeOf(await send(key))).toEqual([422, "draftIncomplete"]);
    expect(runs).toBe(0);
  });

  it.each([null, "short", "x".repeat(201)])("that is missing or of no use (%s) is refused", async (key) => {
    expect(await codeOf(await send(key))).toEqual([400, "keyMissing"]);
    expect(runs).toBe(0);
  });

  it("belongs to one organisation and one route", async () => {
    const key = randomUUID();
    await send(key);
    const other = await buildOrganisation();
    const stranger = actorAt(other, await buildPerson(other, ["technician"]), ["technician"]);
    expect(await (await send(key, "body one", { actor: stranger })).json()).toEqual({ number: "41073822" });
    expect(await (await send(key, "body one", { route: "POST /api/v1/files" })).json()).toEqual({
      number: "41073823",
    });
  });

  it("left without an answer by a crash is free again after a minute, and not before", async () => {
    const key = randomUUID();
    await expect(send(key, "body one", {}, () => Promise.reject(new Error("crashed")))).rejects.toThrow(
      "crashed",
    );
    expect(await codeOf(await send(key))).toEqual([409, "keyRunning"]);
    await adminQuery(
      "update idempotency_keys set created_at = now() - interval '61 seconds' where key = $1",
      [key],
    );
    expect((await send(key)).status).toBe(201);
    expect(runs).toBe(1);
  });
});
