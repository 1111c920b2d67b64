import { randomInt } from "node:crypto";
import type { BrowserContext, Page } from "@playwright/test";
import { expect, signInAs, test } from "./fixtures";
import { ADA, COLIN, IDRIS, LOU, openAnew, openAs } from "./people";
import { PEOPLE } from "./screens";
import { askPlainly, variantsOf } from "./plain-request";

// Nobody else's tests use these two: what they have open is ended here, and one of them is shut out for a while.
const NADIA = { email: "nadia.brook@larkmoor.example", name: "Nadia Brook" };
const KIT = "kit.dunmore@larkmoor.example";

// Pages that are not there, and answers of 401, are told by the browser's own line about them.
test.use({ expectedConsole: [/status of 40[14]/], trace: "off" });

const password = () => process.env.DEMO_PASSWORD ?? "";
const cookieHeader = async (context: BrowserContext) =>
  (await context.cookies()).map(({ name, value }) => `${name}=${value}`).join("; ");
const sessionCookie = async (context: BrowserContext) =>
  (await context.cookies()).find(({ name }) => name.endsWith("partproof.session"));

/** Whether a window still opens anything: a page, its data alone, and the API. */
async function whatOpens(context: BrowserContext) {
  const ask = (path: string, headers = {}) => context.request.get(path, { headers, maxRedirects: 0 });
  const [page, api] = await Promise.all([ask("/account"), ask("/api/v1/claims?side=received&view=all")]);
  // The data alone is asked for under an address of its own, to which the product leads.
  const data = await context.request.get("/account", { headers: { rsc: "1" } });
  const texts = await Promise.all([page, data].map((answer) => answer.text()));
  return { page: page.status(), names: texts.map((text) => text.includes(NADIA.email)), api: api.status() };
}
const ALL = { page: 200, names: [true, true], api: 200 };
const NOTHING = { page: 307, names: [false, false], api: 401 };

test.describe("what a signed-in page answers", () => {
  test("is private and kept nowhere, on every page of every role", async ({ browser }) => {
    for (const { email, screens } of PEOPLE.filter((person) => person.email !== null)) {
      const context = await openAs(browser, email);
      const page = await context.newPage();
      for (const { pathFor } of screens) {
        const path = await pathFor(page);
        if (!path) continue;
        for (const headers of [undefined, { rsc: "1" }]) {
          const answer = await context.request.get(path, { headers });
          const kept = answer.headers()["cache-control"];
          expect(answer.status(), path).toBe(200);
          expect(kept, path).toContain("private");
          expect(kept, path).toContain("no-store");
          expect(kept, path).not.toContain("s-maxage");
        }
      }
      await context.close();
    }
  });

  test("carries a content policy with a nonce of its own each time", async ({ browser }) => {
    const context = await openAs(browser, LOU);
    const policies = [];
    for (let time = 0; time < 2; time += 1) {
      const answer = await context.request.get("/workshop-today");
      policies.push(answer.headers()["content-security-policy"] ?? "");
      const nonce = /'nonce-([^']+)'/.exec(policies[time] ?? "")?.[1] ?? "none";
      const scripts = (await answer.text()).match(/<script\b[^>]*>/g) ?? [];
      expect(scripts.length).toBeGreaterThan(0);
      expect(scripts.filter((tag) => !tag.includes(`nonce="${nonce}"`))).toEqual([]);
    }
    const nonces = policies.map((policy) => /script-src[^;]*'nonce-([^']+)'/.exec(policy)?.[1] ?? "");
    expect(new Set(nonces).size).toBe(2);
    for (const nonce of nonces) expect(nonce.length).toBeGreaterThanOrEqual(22);
    for (const policy of policies)
      expect(/script-src([^;]*)/.exec(policy)?.[1]).not.toMatch(/unsafe-inline|unsafe-eval|https?:|\*/);
    await context.close();
  });
});

test.describe("a session", () => {
  test("is over with the sign-out, also for a copy of its cookie", async ({ browser }) => {
    const context = await openAnew(browser, NADIA.email);
    const copy = await browser.newContext({ storageState: await context.storageState() });
    expect(await whatOpens(copy)).toEqual(ALL);
    const cookie = await sessionCookie(context);
    expect(cookie).toMatchObject({ httpOnly: true, sameSite: "Lax" });

    const page = await context.newPage();
    await page.goto("/account");
    await page.getByRole("button", { name: "Sign out" }).click();
    await page.waitForURL(/\/sign-in\?note=signedOut$/);
    expect(await sessionCookie(context)).toBeUndefined();
    expect(await whatOpens(copy)).toEqual(NOTHING);
    await context.close();
    await copy.close();
  });

  test("takes nothing from what a browser posts to it", async ({ browser }) => {
    const seed = randomInt(2 ** 31);
    const context = await openAnew(browser, LOU);
    const ask = async (path: string) => (await context.request.get(path, { maxRedirects: 0 })).status();
    const before = [await ask("/workshop-today"), await ask("/people"), await ask("/judging")];
    expect(before).toEqual([200, 404, 404]);
    const wishes = { role: "administrator", roles: ["administrator", "assessor"], organisationId: "other" };
    const nested = Array.from({ length: 40 }, (_one, place) => {
      const key = ["sid", "sub", "user", "token", "roles", "organisation", "actor", "__proto__"][
        (seed + place * 7) % 8
      ];
      return place % 2 ? { [`${key}`]: wishes } : { user: { [`${key}`]: wishes, ...wishes }, ...wishes };
    });
    for (const data of [{ user: wishes }, { sid: "00000000-0000-0000-0000-000000000000" }, ...nested]) {
      const { csrfToken } = await (await context.request.get("/api/auth/csrf")).json();
      const answer = await context.request.post("/api/auth/session", { data: { csrfToken, data } });
      expect(Object.keys(await answer.json()), `seed ${seed}`).toEqual(["expires"]);
    }
    expect([await ask("/workshop-today"), await ask("/people"), await ask("/judging")]).toEqual(before);
    expect(await (await context.request.get("/account")).text()).toContain(LOU);
    await context.close();
  });

  /** Opens a person's own page in the list of people, does one thing there and waits for the list. */
  const change = async (page: Page, name: string, act: () => Promise<void>) => {
    await page.goto("/people");
    await page.getByRole("link", { name: `Change ${name}` }).click();
    await page.waitForURL(/\/people\/[\w-]{36}$/);
    await act();
    await page.waitForURL(/\/people\?note=/);
  };

  test("ends at once when an administrator switches the person off", async ({ browser, watch }) => {
    const person = await openAnew(browser, NADIA.email);
    const office = await openAs(browser, COLIN);
    await watch(office);
    const page = await office.newPage();
    expect(await whatOpens(person)).toEqual(ALL);
    await change(page, NADIA.name, () => page.getByRole("button", { name: "Switch off access" }).click());
    try {
      expect(await whatOpens(person)).toEqual(NOTHING);
      const again = await person.newPage();
      await again.goto("/sign-in");
      await again.locator('input[name="email"]').fill(NADIA.email);
      await again.locator('input[name="password"]').fill(password());
      await again.getByRole("button", { name: "Sign in" }).click();
      await expect(again.getByText("do not open an account")).toBeVisible();
    } finally {
      await change(page, NADIA.name, () => page.getByRole("button", { name: "Switch on access" }).click());
    }
    await person.close();
    await office.close();
  });

  test("has its new roles at the next request", async ({ browser, watch }) => {
    const person = await openAnew(browser, NADIA.email);
    const office = await openAs(browser, COLIN);
    await watch(office);
    const page = await office.newPage();
    const catalogue = async () => (await person.request.get("/catalogue", { maxRedirects: 0 })).status();
    const tick = (isKeeper: boolean) =>
      change(page, NADIA.name, async () => {
        await page.getByRole("checkbox", { name: "Administrator" }).setChecked(isKeeper);
        await page.getByRole("button", { name: "Keep the roles" }).click();
      });
    expect(await catalogue()).toBe(404);
    await tick(true);
    try {
      // What was open has ended; signed in anew, the new role is there.
      expect(await catalogue()).toBe(307);
      await signInAs(await person.newPage(), NADIA.email);
      expect(await catalogue()).toBe(200);
    } finally {
      await tick(false);
    }
    expect(await catalogue()).toBe(307);
    await person.close();
    await office.close();
  });
});

test.describe("no spelling of an address and no header", () => {
  test("shows a signed-in page to somebody who is not", async ({ browser, baseURL }) => {
    const home = baseURL ?? "";
    for (const { email, path, marks } of [
      { email: LOU, path: "/workshop-today", marks: ["Lou Tanner", "Larkmoor Parts"] },
      { email: LOU, path: "/account", marks: ["Lou Tanner", "Saltmarsh Mobility"] },
      { email: COLIN, path: "/people", marks: ["Nadia Brook", "Colin Thorpe"] },
      { email: ADA, path: "/judging", marks: ["Ada Merrow", "Saltmarsh Mobility"] },
    ]) {
      const context = await openAs(browser, email);
      const own = await askPlainly(home, path, { cookie: await cookieHeader(context) });
      for (const mark of marks) expect(own.body, `${path} for its reader`).toContain(mark);
      for (const variant of variantsOf(path)) {
        const { body } = await askPlainly(home, variant.path, variant.headers);
        const leaked = marks.filter((mark) => body.includes(mark));
        expect(leaked, JSON.stringify(variant)).toEqual([]);
      }
      await context.close();
    }
  });

  test("shows a claim to a workshop it does not belong to", async ({ browser, baseURL }) => {
    const home = baseURL ?? "";
    const owner = await openAs(browser, LOU);
    const { items } = await (await owner.request.get("/api/v1/claims?side=own&view=onThem")).json();
    const [{ number, serial }] = items;
    const path = `/claims/${number}`;
    const own = await askPlainly(home, path, { cookie: await cookieHeader(owner) });
    expect(own.body).toContain(serial);
    const stranger = await openAs(browser, IDRIS);
    const cookie = await cookieHeader(stranger);
    for (const variant of variantsOf(path))
      for (const whose of [undefined, { cookie }]) {
        const { body } = await askPlainly(home, variant.path, { ...variant.headers, ...whose });
        expect(body.includes(serial), JSON.stringify(variant)).toBe(false);
      }

    // A claim of others and one that never was are the same answer, but for what differs at every request.
    const answers = [];
    for (const one of [number, "9999-9999"]) {
      const { status, body } = await askPlainly(home, `/claims/${one}`, { cookie });
      answers.push({
        status,
        body: body.replaceAll(one, "NUMBER").replace(/nonce(=|\\?":\\?)"?[\w+/=]+/g, "NONCE"),
      });
    }
    expect(answers[0]?.status).toBe(404);
    expect(answers[0]?.body.length).toBe(answers[1]?.body.length);
    await owner.close();
    await stranger.close();
  });
});

test.describe("the framework's own ways to sign in", () => {
  const attempt = async (context: BrowserContext, secret: string) => {
    const { csrfToken } = await (await context.request.get("/api/auth/csrf")).json();
    await context.request.post("/api/auth/callback/credentials", {
      form: { csrfToken, email: KIT, password: secret, json: "true" },
      maxRedirects: 0,
    });
    return (await sessionCookie(context)) !== undefined;
  };

  test("count tries as the form does, and open nothing without its token", async ({ browser }) => {
    const context = await browser.newContext({
      extraHTTPHeaders: { "x-forwarded-for": `10.9.${randomInt(256)}.${randomInt(1, 255)}` },
    });
    const form = { email: KIT, password: password(), json: "true" };
    await context.request.post("/api/auth/callback/credentials", { form, maxRedirects: 0 });
    await context.request.post("/api/auth/signin/credentials", { form, maxRedirects: 0 });
    const query = new URLSearchParams(form);
    await context.request.get(`/api/auth/callback/credentials?${query}`, { maxRedirects: 0 });
    expect(await sessionCookie(context)).toBeUndefined();

    for (let time = 0; time < 10; time += 1) expect(await attempt(context, `wrong ${time}`)).toBe(false);
    expect(await attempt(context, password()), "the right password after ten wrong ones").toBe(false);
    const page = await context.newPage();
    await page.goto("/sign-in");
    await page.locator('input[name="email"]').fill(KIT);
    await page.locator('input[name="password"]').fill(password());
    await page.getByRole("button", { name: "Sign in" }).click();
    await expect(page.getByText("do not open an account")).toBeVisible();
    await context.close();
  });
});
