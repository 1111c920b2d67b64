import AxeBuilder from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { axe, expect, test } from "./fixtures";
import { openAs } from "./people";
import { PEOPLE } from "./screens";

const SIZES = [
  { width: 390, height: 844 },
  { width: 1440, height: 900 },
];
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

async function checkScreen(page: Page, path: string, status: number) {
  const answer = await page.goto(path);
  expect(answer?.status(), path).toBe(status);
  await expect(page.locator("h1"), path).toHaveCount(1);
  expect(await page.title(), path).toMatch(/\S+ · Partproof$/);
  for (const size of SIZES) {
    await page.setViewportSize(size);
    expect(await overhang(page), `${path} wider than a window of ${size.width} px by`).toBe(0);
    await axe(page);
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
          await checkScreen(page, path ?? "", name === "not-found" ? 404 : 200);
        });
      await context.close();
    });
});
