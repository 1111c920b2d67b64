import { randomUUID } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { ask, askJson, FROM_OUR_PAGES, problemOf } from "../../support/http";
import { buildClaim, buildPerson, FILED } from "../../support/build";
import { startSession } from "../signed-in";
import { twoShops, type Shop } from "../shops";

let session: string;
let shop: Shop;
let part: { readonly id: string };
let number: string;
let filed: string;
const draft = () => `/api/v1/claims/${number}/draft`;

/** Every route that takes a JSON body. */
const jsonRoutes = () =>
  [
    ["POST", "/api/v1/claims"],
    ["PUT", draft()],
    ["POST", `/api/v1/claims/${number}/messages`],
  ] as const;

beforeAll(async () => {
  const world = await twoShops();
  [shop] = world.shops;
  part = world.part;
  session = await startSession(shop.person, shop.workshop);
  number = (await buildClaim(shop)).number;
  filed = (await buildClaim(shop, { ...FILED, state: "filed" })).number;
});

const headers = () => ({
  ...FROM_OUR_PAGES(),
  "content-type": "application/json",
  "idempotency-key": randomUUID(),
});

/** The members RFC 9457 names, and ours beside them; `type` and `instance` are URI references. */
async function expectProblem(response: Response, status: number, code: string) {
  expect(response.headers.get("content-type")).toBe("application/problem+json");
  expect(response.headers.get("cache-control")).toBe("private, no-store");
  const problem = await problemOf(response);
  expect(problem).toMatchObject({ type: `/problems/${code}`, status, code });
  expect(response.status).toBe(status);
  expect(String(problem["title"])).toMatch(/^[A-Z].*\.$/u);
  expect(problem["instance"]).toBe(`urn:uuid:${response.headers.get("x-request-id")}`);
  return problem;
}

describe("a body that is not what the route needs", () => {
  const BROKEN = ["", "{", "{'a':1}", "undefined", "\0", '{"a":1}}', "\ufeff{}", "<xml/>"];

  it.each(BROKEN)("is no JSON (%j): 400, never a fault", async (body) => {
    for (const [method, path] of jsonRoutes())
      await expectProblem(await ask(method, path, { session, headers: headers(), body }), 400, "notJson");
  });

  it("is JSON of a form: another content type is read as what it holds, and refused", async () => {
    const form = new URLSearchParams({ note: "a form" });
    const sent = { ...headers(), "content-type": "application/x-www-form-urlencoded" };
    const answer = await ask("PUT", draft(), { session, headers: sent, body: form.toString() });
    await expectProblem(answer, 400, "notJson");
  });

  it.each(["null", "[]", "1", '"text"', "true"])("is JSON but no object (%s): 422", async (body) => {
    for (const [method, path] of jsonRoutes()) {
      const problem = await expectProblem(
        await ask(method, path, { session, headers: headers(), body }),
        422,
        "shape",
      );
      expect(problem["errors"]).toHaveLength(1);
    }
  });

  it("has fields nobody knows: each is refused, in no case ignored", async () => {
    for (const [method, path] of jsonRoutes()) {
      const sent = { state: "decided", __proto__: { a: 1 }, constructor: "x" };
      const answer = await askJson(method, path, sent, {
        session,
        headers: { "idempotency-key": randomUUID() },
      });
      await expectProblem(answer, 422, "shape");
    }
  });

  it("names every wrong field by a JSON pointer into what was sent", async () => {
    const sent = { note: 5, swapHeat: "perhaps", lines: { "3": { position: "above", "a/b~c": 1 } } };
    const problem = await expectProblem(await askJson("PUT", draft(), sent, { session }), 422, "shape");
    expect(problem["errors"]).toEqual([
      { pointer: "/note", detail: "This field does not have the shape it needs." },
      { pointer: "/swapHeat", detail: "This field does not have the shape it needs." },
      { pointer: "/lines/3/position", detail: "This field does not have the shape it needs." },
      { pointer: "/lines/3/a~1b~0c", detail: "This field does not have the shape it needs." },
    ]);
  });

  it("escapes what has a meaning of its own in a pointer", async () => {
    const sent = { answers: { "a/b~c": 5 } };
    const problem = await expectProblem(await askJson("PUT", draft(), sent, { session }), 422, "shape");
    expect(problem["errors"]).toEqual([expect.objectContaining({ pointer: "/answers/a~1b~0c" })]);
  });

  it("says the sentences in the person's language", async () => {
    const world = await twoShops();
    const [{ workshop }] = world.shops;
    const german = await startSession(
      await buildPerson(workshop, ["technician"], { locale: "de" }),
      workshop,
    );
    const answer = await ask("PUT", draft(), { session: german, headers: headers(), body: "{" });
    expect((await problemOf(answer))["title"]).toBe("Der Inhalt ist kein JSON.");
  });
});

describe("a text the database cannot keep", () => {
  it.each(["a\0b", "\ud800", "\udfff x"])("is no fault where it is typed (%j)", async (text) => {
    const answers = [
      await askJson("PUT", draft(), { note: text }, { session }),
      await askJson("PUT", draft(), { answers: { [text]: text } }, { session }),
      await askJson(
        "POST",
        `/api/v1/claims/${filed}/messages`,
        { body: text, audience: "both" },
        { session },
      ),
      await askJson(
        "POST",
        "/api/v1/claims",
        { accountId: shop.account.id, partId: part.id, serial: text },
        {
          session,
          headers: { "idempotency-key": randomUUID() },
        },
      ),
    ];
    for (const [at, { status }] of answers.entries()) expect(status, `request ${at}`).toBeLessThan(500);
  });
});

describe("a body that is too large", () => {
  it("is refused with 413 while it comes in, long before its end", async () => {
    let handedOut = 0;
    const piece = new Uint8Array(64 * 1024).fill(0x20);
    const body = new ReadableStream<Uint8Array>({
      pull(controller) {
        if (handedOut >= 64_000_000) return controller.close();
        handedOut += piece.length;
        controller.enqueue(piece);
      },
    });
    const answer = await ask("PUT", draft(), { session, headers: headers(), body });
    const handedOutBytes = handedOut;
    await expectProblem(answer, 413, "tooLarge");
    expect(handedOutBytes).toBeLessThan(16_000_000);
    process.stdout.write(`JSON body without end: answered after ${handedOutBytes} of 64 MB, limit 262144\n`);
  });

  it("is not believed about its length", async () => {
    const sent = { ...headers(), "content-length": "2" };
    const body = JSON.stringify({ note: "x".repeat(300_000) });
    await expectProblem(await ask("PUT", draft(), { session, headers: sent, body }), 413, "tooLarge");
  });

  it("in depth is refused without a fault", async () => {
    const body = `${"[".repeat(100_000)}${"]".repeat(100_000)}`;
    const answer = await ask("PUT", draft(), { session, headers: headers(), body });
    expect([400, 422]).toContain(answer.status);
  });

  it("that breaks off is no success", async () => {
    const body = new ReadableStream<Uint8Array>({
      start(controller) {
        controller.enqueue(new TextEncoder().encode('{"note":"half a bo'));
      },
      pull(controller) {
        controller.error(new Error("the line went dead"));
      },
    });
    const answer = await ask("PUT", draft(), { session, headers: headers(), body });
    expect(answer.status).toBeGreaterThanOrEqual(400);
  });
});

describe("a query nobody wrote by hand", () => {
  it.each([
    "page=-1&view=nothing&sort=1;drop table claims",
    "page=1e9",
    "page=99999999999999999999",
    "q=%00",
    "search=%25%27%20or%20true--",
    "view=all&view=own",
    `q=${"x".repeat(5000)}`,
  ])("is answered, never a fault (%s)", async (query) => {
    const answer = await ask("GET", `/api/v1/claims?${query}`, { session });
    expect(answer.status).toBeLessThan(500);
  });
});
