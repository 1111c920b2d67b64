import AxeBuilder from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { axe, expect, test } from "./fixtures";
import { openAs } from "./people";
import { PEOPLE } from "./screens";

const SIZES = [
  { width: 390, height: 844 },
  { width: 1440, height: 900 },
];
/** Where each person works: there the rules of access are looked at; that nothing sticks out, everywhere. */
const AT_HAND = new Set(["visitor", "technician", "manager", "goods-in"]);
// A trace would cost more than the looking.
test.use({ trace: "off" });

/** How far the page reaches past the window to the right. */
const overhang = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** A theme changes colours and nothing else, so in the dark only they are looked at. */
async function contrastInTheDark(page: Page, path: string) {
  await page.emulateMedia({ colorScheme: "dark" });
  await expect(page.locator("html"), path).toHaveAttribute("data-theme", "dark");
  const { violations } = await new AxeBuilder({ page }).withRules(["color-contrast"]).analyze();
  const faint = violations.flatMap(({ nodes }) => nodes.map(({ target }) => target.join(" ")));
  expect(faint, `${path} in the dark`).toEqual([]);
  await page.emulateMedia({ colorScheme: "light" });
  await expect(page.locator("html"), path).toHaveAttribute("data-theme", "light");
}

type Asked = { readonly path: string; readonly status: number; readonly axeAt: number };

async function checkScreen(page: Page, { path, status, axeAt }: Asked) {
  const answer = await page.goto(path);
  expect(answer?.status(), path).toBe(status);
  await expect(page.locator("h1"), path).toHaveCount(1);
  expect(await page.title(), path).toMatch(/\S+ · Partproof$/);
  for (const size of SIZES) {
    await page.setViewportSize(size);
    expect(await overhang(page), `${path} wider than a window of ${size.width} px by`).toBe(0);
    if (size.width === axeAt) await axe(page);
  }
  await contrastInTheDark(page, path);
}

test.describe("every page, on a phone and at the desk, light and dark", () => {
  // The page that is not there is told by the browser's own line about it.
  test.use({ expectedConsole: [/status of 404/] });

  for (const { role, email, screens } of PEOPLE)
    test(`of the ${role}`, async ({ browser, watch }) => {
      test.setTimeout(180_000);
      const context = await openAs(browser, email, { colorScheme: "light", reducedMotion: "reduce" });
      await watch(context);
      const page = await context.newPage();
      for (const { name, pathFor } of screens)
        await test.step(name, async () => {
          const path = await pathFor(page);
          expect(path, `the demo has a claim for ${name}`).toBeTruthy();
          const axeAt = AT_HAND.has(role) ? 390 : 1440;
          await checkScreen(page, { path: path ?? "", status: name === "not-found" ? 404 : 200, axeAt });
        });
      await context.close();
    });
});
