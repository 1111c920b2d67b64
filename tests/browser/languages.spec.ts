import type { Browser, Page } from "@playwright/test";
import { expect, test } from "./fixtures";
import { openAs } from "./people";
import { PEOPLE, screensOf } from "./screens";
import { englishPieces, german } from "./sentences";

// A trace would cost more than the looking.
test.use({ trace: "off" });

const JONAS = "jonas.ehrler@quayhead.example";
const GRETA = "greta.lindau@fenwright.example";
const PHONE_WIDE = { width: 390, height: 844 };

/** Walks the screens of a role that have something to show for this person; says how many there were. */
async function walk(page: Page, role: string, look: (name: string) => Promise<void>) {
  let walked = 0;
  for (const { name, pathFor } of screensOf(role)) {
    const path = await pathFor(page);
    if (!path) continue;
    await test.step(name, async () => {
      const answer = await page.goto(path);
      expect(answer?.status(), path).toBe(200);
      await look(name);
    });
    walked += 1;
  }
  return walked;
}

const words = (page: Page) => page.locator("body").innerText();

test.describe("German", () => {
  for (const { role, email, atLeast } of [
    { role: "technician", email: JONAS, atLeast: 9 },
    { role: "assessor", email: GRETA, atLeast: 4 },
  ])
    test(`is all the ${role} reads`, async ({ browser, watch }) => {
      const english = englishPieces();
      expect(english.length).toBeGreaterThan(300);
      const context = await openAs(browser, email, { viewport: PHONE_WIDE });
      await watch(context);
      const page = await context.newPage();
      const walked = await walk(page, role, async (name) => {
        await expect(page.locator("html")).toHaveAttribute("lang", /^de/);
        const text = await words(page);
        expect(
          english.filter((piece) => text.includes(piece)),
          `English on ${name}`,
        ).toEqual([]);
      });
      expect(walked).toBeGreaterThanOrEqual(atLeast);
      await context.close();
    });

  const heading = (page: Page, name: string) => page.getByRole("heading", { level: 1, name, exact: true });

  test("names pages, places and buttons", async ({ browser, watch }) => {
    const bench = await openAs(browser, JONAS);
    await watch(bench);
    const page = await bench.newPage();
    await page.goto("/workshop-today");
    await expect(heading(page, german("lists", "workshopTitle"))).toBeVisible();
    await page
      .getByRole("link", { name: german("navigation", "startClaim"), exact: true })
      .first()
      .click();
    await page.waitForURL(/\/claims\/new$/);
    await expect(heading(page, german("start", "title"))).toBeVisible();
    await expect(page.getByRole("button", { name: german("start", "lookUp") })).toBeVisible();
    await page.goto("/account");
    await expect(heading(page, german("account", "title"))).toBeVisible();
    await expect(page.getByRole("button", { name: german("account", "signOut") })).toBeVisible();
    await bench.close();

    const desk = await openAs(browser, GRETA);
    await watch(desk);
    const list = await desk.newPage();
    await list.goto("/judging");
    await expect(heading(list, german("lists", "judgingTitle"))).toBeVisible();
    await expect(list.getByRole("button", { name: german("live", "lists", "find") })).toBeVisible();
    await desk.close();
  });

  test("comes before the sign-in from what the browser asks for", async ({ browser, watch }) => {
    const context = await browser.newContext({ locale: "de-DE" });
    await watch(context);
    const page = await context.newPage();
    await page.goto("/sign-in");
    await expect(page.locator("html")).toHaveAttribute("lang", /^de/);
    await expect(heading(page, german("signIn", "title"))).toBeVisible();
    await expect(page.getByRole("button", { name: german("signIn", "submit") })).toBeVisible();
    await context.close();
  });
});

/** Buttons, links and headings whose words do not fit into them. A link inside a line of text breaks with the line. */
const cutOff = (page: Page) =>
  page.evaluate(() =>
    [...document.querySelectorAll<HTMLElement>("a, button, summary, h1, h2, h3, h4")]
      // What is kept for readers of the screen alone measures one pixel; inline boxes measure none.
      .filter((element) => element.checkVisibility({ visibilityProperty: true }) && element.clientWidth > 1)
      .filter((element) => element.scrollWidth > element.clientWidth)
      .map(
        ({ tagName, textContent, scrollWidth, clientWidth }) =>
          `${tagName} ${textContent.trim().slice(0, 60)}: ${scrollWidth} in ${clientWidth}`,
      ),
  );

const overhang = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** The window of a person who reads everything two fifths longer. */
async function openLong(browser: Browser, email: string, home: string) {
  const context = await openAs(browser, email, { viewport: PHONE_WIDE });
  await context.addCookies([{ name: "locale", value: "long", url: home }]);
  return context;
}

test.describe("a wordier language, on a phone", () => {
  for (const { role, email } of PEOPLE.filter((person) => ["technician", "assessor"].includes(person.role)))
    test(`cuts nothing off and pushes nothing out for the ${role}`, async ({ browser, watch, baseURL }) => {
      const context = await openLong(browser, email ?? "", baseURL ?? "");
      await watch(context);
      const page = await context.newPage();
      const walked = await walk(page, role, async (name) => {
        await expect(page.locator("h1")).toContainText(/ with\b|\d{4}-\d{4}/);
        expect(await overhang(page), `${name} wider than the window by`).toBe(0);
        expect(await cutOff(page), `cut off on ${name}`).toEqual([]);
      });
      expect(walked).toBe(screensOf(role).length);
      await context.close();
    });
});
