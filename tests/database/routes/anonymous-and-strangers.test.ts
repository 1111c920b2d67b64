import { randomUUID } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { printClaimNumber } from "@/lib/claims/number";
import { apiRoutes, ask, FROM_OUR_PAGES, type ApiRoute, type Method } from "../../support/http";
import { buildClaim, buildFile, buildPerson, FILED } from "../../support/build";
import { adminQuery } from "../../support/database";
import { startSession } from "../signed-in";
import { twoShops } from "../shops";

/** The only routes that answer without a session, and why. */
const OPEN_TO_ALL: Readonly<Record<string, string>> = {
  "/api/v1/health": "says that the process lives",
  "/api/v1/ready": "says which part is missing",
};

/** A stranger is shown nothing for these; the others belong to whoever asks and are tested by what they list. */
const NAMES = /\{(number|id)\}/u;

let routes: readonly ApiRoute[];
let world: Awaited<ReturnType<typeof twoShops>>;
let claim: { id: string; number: string };
let file: { id: string };
let owner: string;
let stranger: string;

beforeAll(async () => {
  routes = await apiRoutes;
  world = await twoShops();
  const [shop, other] = world.shops;
  claim = await buildClaim(shop, { ...FILED, state: "filed" });
  file = await buildFile(shop, claim);
  owner = await startSession(shop.person, shop.workshop);
  stranger = await startSession(await buildPerson(other.workshop, ["technician"]), other.workshop);
});

const everyMethod = (): (readonly [Method, ApiRoute])[] =>
  routes.flatMap((route) => route.methods.map((method) => [method, route] as const));

const filled = ({ address }: ApiRoute, number: string, id: string): string =>
  address.replace("{number}", number).replace("{id}", id);

/** A body that every route with a JSON shape takes as it is; the others never look at it. */
const BODIES: Readonly<Record<string, unknown>> = {
  "/api/v1/claims/{number}/messages": { body: "Is anybody there?", audience: "both" },
  "/api/v1/claims/{number}/draft": { note: "a note" },
};

const send = (method: Method, route: ApiRoute, path: string, session?: string) =>
  ask(method, path, {
    ...(session === undefined ? {} : { session }),
    headers: {
      ...FROM_OUR_PAGES(),
      "content-type": "application/json",
      "x-request-id": "sweep-of-every-route",
      "idempotency-key": randomUUID(),
    },
    ...(method === "GET" || method === "HEAD" ? {} : { body: JSON.stringify(BODIES[route.address] ?? {}) }),
  });

describe("without a session", () => {
  it("the walk found the routes, and each answers something", () => {
    expect(routes.length).toBeGreaterThanOrEqual(11);
    for (const route of routes) expect(route.methods, route.address).not.toEqual([]);
    for (const address of Object.keys(OPEN_TO_ALL))
      expect(routes.map((route) => route.address)).toContain(address);
  });

  it("every method of every route answers 401 and gives nothing away", async () => {
    const swept = everyMethod().filter(([, { address }]) => !(address in OPEN_TO_ALL));
    for (const [method, route] of swept) {
      for (const session of [undefined, randomUUID()]) {
        const said = `${method} ${route.address}`;
        const answer = await send(method, route, filled(route, claim.number, file.id), session);
        expect(answer.status, said).toBe(401);
        expect(answer.headers.get("content-type"), said).toBe("application/problem+json");
        expect(answer.headers.get("cache-control"), said).toBe("private, no-store");
        const body = await answer.text();
        expect(JSON.parse(body), said).toEqual({
          type: "/problems/signedOut",
          title: "You are signed out. Sign in, then try again.",
          status: 401,
          instance: "urn:uuid:sweep-of-every-route",
          code: "signedOut",
        });
      }
    }
    process.stdout.write(
      `anonymous sweep: ${swept.length} methods, without a cookie and with one of no session, 0 let in\n`,
    );
  });

  it("a token of another secret is no session", async () => {
    const secret = process.env["NEXTAUTH_SECRET"];
    process.env["NEXTAUTH_SECRET"] = "somebody else's secret of enough length";
    const { encode } = await import("next-auth/jwt");
    const token = await encode({ token: { sid: owner }, secret: process.env["NEXTAUTH_SECRET"] });
    process.env["NEXTAUTH_SECRET"] = secret;
    const answer = await ask("GET", "/api/v1/claims", { headers: { cookie: `partproof.session=${token}` } });
    expect(answer.status).toBe(401);
  });
});

describe("a stranger who asks for a thing by its number or id", () => {
  it("is answered byte for byte as for one that does not exist", async () => {
    const swept = everyMethod().filter(([, { address }]) => NAMES.test(address));
    expect(swept.length).toBeGreaterThanOrEqual(7);
    for (const [method, route] of swept) {
      const said = `${method} ${route.address}`;
      const there = await send(method, route, filled(route, claim.number, file.id), stranger);
      const nowhere = await send(method, route, filled(route, "99999993", randomUUID()), stranger);
      expect(there.status, said).toBe(404);
      expect([...there.headers], said).toEqual([...nowhere.headers]);
      expect(await there.text(), said).toBe(await nowhere.text());
    }
    process.stdout.write(`strangers: ${swept.length} methods by number or id, 0 told apart\n`);
  });

  it("is answered so for text that is no number and no id too", async () => {
    const swept = everyMethod().filter(([, { address }]) => NAMES.test(address));
    for (const [method, route] of swept) {
      for (const text of ["0", "abc", "' or 1=1 --", "٣٣٣٣٣٣٣٣", "x".repeat(3000), "\0", "-".repeat(36)]) {
        const path = filled(route, encodeURIComponent(text), encodeURIComponent(text));
        const answer = await send(method, route, path, owner);
        expect(answer.status, `${method} ${route.address} for ${text.slice(0, 20)}`).toBe(404);
      }
    }
  });

  it("finds none of it in the list", async () => {
    const answer = await ask("GET", "/api/v1/claims?side=own&view=all", { session: stranger });
    expect(answer.status).toBe(200);
    expect(await answer.text()).not.toContain(printClaimNumber(claim.number));
    const own = await ask("GET", "/api/v1/claims?side=own&view=all", { session: owner });
    expect(await own.text()).toContain(printClaimNumber(claim.number));
  });
});

describe("with a session", () => {
  it("no answer of any route may be kept by a cache", async () => {
    const reads = everyMethod().filter(([method]) => method === "GET");
    for (const [method, route] of reads) {
      const answer = await send(method, route, filled(route, claim.number, file.id), owner);
      expect(answer.headers.get("cache-control"), route.address).toMatch(/no-store/u);
      if (!(route.address in OPEN_TO_ALL)) {
        expect(answer.headers.get("cache-control"), route.address).toBe("private, no-store");
        expect(answer.headers.get("x-request-id"), route.address).toBe("sweep-of-every-route");
      }
      await answer.body?.cancel();
    }
  });

  it.each<[string, string]>([
    ["the person was disabled", "update users set disabled_at = now() where id = $1"],
    ["the membership was ended", "update memberships set disabled_at = now() where user_id = $1"],
    ["they signed out everywhere", "update users set session_version = session_version + 1 where id = $1"],
    [
      "the session ran out",
      "update sessions set expires_at = now() - interval '1 second' where user_id = $1",
    ],
    ["the session was deleted", "delete from sessions where user_id = $1"],
  ])("the next request is refused once %s, whatever the cookie says", async (_said, sql) => {
    const { workshop } = world.shops[0];
    const person = await buildPerson(workshop, ["technician"]);
    const session = await startSession(person, workshop);
    const reads = [
      `/api/v1/claims/${claim.number}/evidence`,
      `/api/v1/evidence/${file.id}`,
      "/api/v1/claims",
    ];
    expect((await ask("GET", reads[0] ?? "", { session })).status).toBe(200);
    await adminQuery(sql, [person.id]);
    for (const read of reads) expect((await ask("GET", read, { session })).status, read).toBe(401);
    const body = JSON.stringify({ body: "still here", audience: "both" });
    const said = await ask("POST", `/api/v1/claims/${claim.number}/messages`, { session, body });
    expect(said.status).toBe(401);
  });

  it("who lost the role may no longer do what it allowed, at once", async () => {
    const { workshop } = world.shops[0];
    const person = await buildPerson(workshop, ["technician"]);
    const session = await startSession(person, workshop);
    const draft = await buildClaim(world.shops[0]);
    const save = () =>
      ask("PUT", `/api/v1/claims/${draft.number}/draft`, { session, body: JSON.stringify({ note: "mine" }) });
    expect((await save()).status).toBe(200);
    await adminQuery("delete from membership_roles where user_id = $1", [person.id]);
    expect([401, 403]).toContain((await save()).status);
  });
});
