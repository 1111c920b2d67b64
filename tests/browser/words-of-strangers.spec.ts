import type { Page } from "@playwright/test";
import { MORE_SCREENS, SCREENS } from "../../docker-free-scripts/screens.mjs";
import { expect, mailsTo, test } from "./fixtures";
import { HOSTILE, hostileIn, makeEverythingHostile, sendHostileMails } from "./hostile-text";
import { openAs } from "./people";

// The last file of all: afterwards no word of the demo is what it was.

test.use({ expectedConsole: [/status of 404/], trace: "off" });

// A watch that never barks proves nothing.
test.describe("a hostile text that became markup", () => {
  const open = async (page: Page, body: string) => {
    await page.addInitScript(listen);
    await page.route("**/made-up", (route) => route.fulfill({ contentType: "text/html", body }));
    await page.goto("/made-up");
  };

  test.fail("is heard where it runs", async ({ page }) => {
    await open(page, HOSTILE[1] ?? "");
    await page.waitForTimeout(200);
  });

  test("is found where it does not", async ({ page }) => {
    await open(page, "<p>Seen on the bench.<x-h>h1h</p>");
    expect(await becameMarkup(page)).toHaveLength(1);
  });
});

type Found = { path: string; act?: (page: Page) => Promise<void> } | string | undefined;
type Place = string | ((page: Page) => Promise<Found>);
type Person = { role: string; email: string | null; screens: Record<string, Place | undefined> };
// The same pages in another language show the same words, and a visitor is shown none.
const PEOPLE: Person[] = [...SCREENS, ...MORE_SCREENS].filter(
  ({ role, email }) => email !== null && !/^german-|^technician-acting$/.test(role),
);

/** What ran says so on the console, where the watch over every test hears it. */
const listen = () => {
  Object.assign(window, { hostile: (which: number) => console.error(`hostile text ${which} ran`) });
};

/** What a page shows as text: in its elements, its fields and the words for those who do not see it. */
const shownOn = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const fields = [...document.querySelectorAll<HTMLInputElement>("input, textarea, select")];
    const marked = [...document.querySelectorAll("[title], [alt], [aria-label]")];
    const words = marked.flatMap((one) =>
      ["title", "alt", "aria-label"].map((name) => one.getAttribute(name)),
    );
    return [document.title, document.body.textContent, ...fields.map(({ value }) => value), ...words].join(
      " ",
    );
  });

/** Elements that only exist if a text was taken for markup. */
const becameMarkup = (page: Page): Promise<string[]> =>
  page.evaluate(() =>
    [...document.querySelectorAll("x-h, base, [onerror], [onload], [onfocus], [ontoggle]")]
      .concat([...document.querySelectorAll('[href^="javascript:"], [src^="javascript:"], [srcdoc]')])
      .map((one) => one.outerHTML.slice(0, 200)),
  );

test.describe("300 hostile texts in every word of the database", () => {
  test.describe.configure({ mode: "serial" });

  test("stand in every column people write into", async () => {
    expect(new Set(HOSTILE).size).toBe(300);
    const changed = await makeEverythingHostile();
    const rows = [...changed.values()].reduce((sum, count) => sum + count, 0);
    expect(changed.size).toBeGreaterThan(40);
    expect(rows).toBeGreaterThan(5000);
  });

  const seen = new Map<string, Set<number>>();
  for (const { role, email, screens } of PEOPLE)
    test(`are text on every page of the ${role}`, async ({ browser, watch }) => {
      test.setTimeout(120_000);
      const context = await openAs(browser, email);
      await context.addInitScript(listen);
      await watch(context);
      const page = await context.newPage();
      for (const [name, place] of Object.entries(screens)) {
        const found = typeof place === "function" ? await place(page) : place;
        const { path, act } = typeof found === "object" ? found : { path: found, act: undefined };
        if (path === undefined) continue;
        const answer = await page.goto(path);
        expect(answer?.status(), `${role}, ${path}`).toBeLessThan(name === "not-found" ? 405 : 300);
        await act?.(page);
        await page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 50)));
        expect(await becameMarkup(page), `${role}, ${path}`).toEqual([]);
        seen.set(`${role} ${name}`, new Set(hostileIn(await shownOn(page))));
      }
      await context.close();
    });

  test("were there to be seen: all of them on the Claim sheet, some wherever words are shown", () => {
    const all = new Set([...seen.values()].flatMap((numbers) => [...numbers]));
    expect(all.size).toBe(300);
    expect(Math.max(...[...seen.values()].map(({ size }) => size))).toBe(300);
    const without = [...seen].filter(([, numbers]) => numbers.size === 0).map(([name]) => name);
    process.stdout.write(`hostile texts: ${seen.size} pages, none on ${without.join(", ")}\n`);
    expect(seen.size - without.length).toBeGreaterThan(25);
  });

  test("are text in every mail, where no content policy helps", async ({ page }) => {
    test.setTimeout(120_000);
    await page.addInitScript(listen);
    const recipient = "reader@strangers.example";
    const count = await sendHostileMails(recipient);
    await expect.poll(async () => (await mailsTo(recipient)).length, { timeout: 60_000 }).toBe(count);
    const numbers = new Set<number>();
    for (const { html, subject } of await mailsTo(recipient)) {
      expect(subject).not.toMatch(/[\r\n]/);
      await page.route("**/a-mail", (route) => route.fulfill({ contentType: "text/html", body: html ?? "" }));
      await page.goto("/a-mail");
      expect(await becameMarkup(page)).toEqual([]);
      const links = await page
        .locator("a")
        .evaluateAll((all) => all.map((one) => one.getAttribute("href") ?? ""));
      expect(links.every((href) => href.startsWith(process.env.PUBLIC_URL ?? "-"))).toBe(true);
      for (const number of hostileIn(await shownOn(page))) numbers.add(number);
    }
    expect(numbers.size).toBe(300);
  });
});
