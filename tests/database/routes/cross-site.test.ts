import { randomUUID } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { apiRoutes, ask, problemOf, type ApiRoute, type Method } from "../../support/http";
import { buildClaim } from "../../support/build";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops } from "../shops";

const here = (): URL => new URL(process.env["PUBLIC_URL"] ?? "");

/** What a browser says of a request that a page elsewhere started, and what something that is no browser leaves out. */
const foreign = (): readonly (readonly [string, Record<string, string>])[] => [
  ["another host", { origin: "https://elsewhere.example" }],
  ["our host on another port", { origin: `http://${here().hostname}:1` }],
  ["our host over another scheme", { origin: `https://${here().host}` }],
  ["a host that begins like ours", { origin: `${here().origin}.elsewhere.example` }],
  ["no nameable origin", { origin: "null" }],
  ["an empty origin", { origin: "" }],
  ["no origin from another site", { "sec-fetch-site": "cross-site" }],
  ["no origin from a sister site", { "sec-fetch-site": "same-site" }],
  ["no origin, typed by hand", { "sec-fetch-site": "none" }],
  ["neither", {}],
  [
    "another host that forges what a proxy says",
    {
      origin: "https://elsewhere.example",
      "x-forwarded-host": "elsewhere.example",
      "sec-fetch-site": "same-origin",
    },
  ],
];

let writes: readonly (readonly [Method, ApiRoute])[];
let session: string;
let number: string;

beforeAll(async () => {
  const world = await twoShops();
  const [shop] = world.shops;
  session = await startSession(shop.person, shop.workshop);
  number = (await buildClaim(shop)).number;
  writes = (await apiRoutes).flatMap((route) =>
    route.methods
      .filter((method) => method !== "GET" && method !== "HEAD")
      .map((method) => [method, route] as const),
  );
});

const send = (method: Method, { address }: ApiRoute, headers: Record<string, string>) =>
  ask(method, address.replace("{number}", number).replace("{id}", randomUUID()), {
    session,
    headers: { "content-type": "application/json", "idempotency-key": randomUUID(), ...headers },
    ...(method === "GET" ? {} : { body: JSON.stringify({ note: "written from elsewhere" }) }),
  });

describe("a write with the cookie of somebody signed in", () => {
  it("is refused wherever it comes from but a page of ours, on every route that writes", async () => {
    expect(writes.length).toBeGreaterThanOrEqual(6);
    for (const [method, route] of writes) {
      for (const [from, headers] of foreign()) {
        const answer = await send(method, route, headers);
        expect(answer.status, `${method} ${route.address} from ${from}`).toBe(403);
        expect(await problemOf(answer)).toMatchObject({ code: "crossSite", status: 403 });
      }
    }
    expect(await adminQuery("select 1 from claim_drafts")).toEqual([]);
    expect(await adminQuery("select 1 from idempotency_keys")).toEqual([]);
    process.stdout.write(
      `cross-site: ${writes.length} writes from ${foreign().length} foreign places, 0 taken\n`,
    );
  });

  it("from a page of ours is never refused for where it came from", async () => {
    const ours: readonly Record<string, string>[] = [
      { origin: here().origin },
      { origin: here().origin, "sec-fetch-site": "same-origin" },
      { "sec-fetch-site": "same-origin" },
    ];
    for (const [method, route] of writes)
      for (const headers of ours)
        expect((await send(method, route, headers)).status, `${method} ${route.address}`).not.toBe(403);
  });
});

describe("a read", () => {
  it("is answered alike wherever it comes from: nothing changes by it", async () => {
    for (const [from, headers] of foreign()) {
      const answer = await ask("GET", `/api/v1/claims/${number}/evidence`, { session, headers });
      expect(answer.status, from).toBe(200);
      expect(answer.headers.get("access-control-allow-origin"), from).toBeNull();
    }
  });
});
