import type { Page } from "@playwright/test";
import { expect, test } from "./fixtures";
import { ADA, LOU, openAs } from "./people";
import { screensOf } from "./screens";
import { focusedId, smallTargets, tabThrough } from "./reach";

const heldClaim = async (page: Page): Promise<string> => {
  const answer = await page.request.get("/api/v1/claims?side=received&view=held");
  const { items } = await answer.json();
  expect(items.length, "the assessor holds a claim").toBeGreaterThan(0);
  return `/claims/${items[0].number}`;
};

const draftPage = async (page: Page, step: string): Promise<string> => {
  const answer = await page.request.get("/api/v1/claims?side=own&view=onUs");
  const { items } = await answer.json();
  const draft = items.find(({ mark }: { mark: string }) => mark === "draft");
  expect(draft, "the technician has a draft").toBeTruthy();
  return `/claims/${draft.number}/${step}`;
};

/** Every link of an error summary leads into the field it names. */
async function walkSummary(page: Page) {
  const summary = page.locator('main section[role="alert"]');
  await expect(summary).toBeFocused();
  const links = summary.getByRole("link");
  const addresses = await links.evaluateAll((all) => all.map((link) => link.getAttribute("href") ?? ""));
  expect(addresses.length).toBeGreaterThan(0);
  for (const [place, address] of addresses.entries()) {
    await links.nth(place).focus();
    await page.keyboard.press("Enter");
    await expect.poll(() => focusedId(page), { message: `focus after ${address}` }).toBe(address.slice(1));
  }
}

test.describe("with the keyboard alone", () => {
  for (const [name, place] of [
    ["To judge", () => "/judging"],
    ["the Claim sheet", heldClaim],
  ] as const)
    test(`everything on ${name} is reached, past the skip link, and shows its ring`, async ({
      browser,
      watch,
    }) => {
      const context = await openAs(browser, ADA);
      await watch(context);
      const page = await context.newPage();
      await page.goto(await place(page));
      await page.keyboard.press("Tab");
      await expect(page.locator('a[href="#main"]')).toBeFocused();
      await page.keyboard.press("Enter");
      await expect(page.locator("#main")).toBeFocused();

      await page.goto(page.url().replace(/#.*/, ""));
      await page.waitForLoadState("networkidle");
      const { missed, ringless, count } = await tabThrough(page);
      expect(count).toBeGreaterThan(10);
      expect(missed, "never reached by Tab").toEqual([]);
      expect(ringless, "reached without a visible ring").toEqual([]);
      await context.close();
    });

  test("the menu of a phone closes with Escape and gives the focus back", async ({ browser, watch }) => {
    const context = await openAs(browser, LOU, { viewport: { width: 390, height: 844 } });
    await watch(context);
    const page = await context.newPage();
    await page.goto("/workshop-today");
    await page.waitForLoadState("networkidle");
    const menu = page.locator("header details");
    await menu.locator("summary").press("Enter");
    await expect(menu).toHaveAttribute("open");
    await page.keyboard.press("Tab");
    await expect(menu.getByRole("link").first()).toBeFocused();
    await page.keyboard.press("Escape");
    await expect(menu).not.toHaveAttribute("open");
    await expect(menu.locator("summary")).toBeFocused();
    await context.close();
  });

  test("words asked for on the Claim sheet close with Escape and give the focus back", async ({
    browser,
    watch,
  }) => {
    const context = await openAs(browser, ADA);
    await watch(context);
    const page = await context.newPage();
    await page.goto(await heldClaim(page));
    await page.waitForLoadState("networkidle");
    const drawer = page.locator("main details:has(form)").first();
    await drawer.locator("summary").press("Enter");
    await drawer.locator("textarea").fill("Not sent.");
    await page.keyboard.press("Escape");
    await expect(drawer).not.toHaveAttribute("open");
    await expect(drawer.locator("summary")).toBeFocused();
    // What was typed is there when it opens again.
    await page.keyboard.press("Enter");
    await expect(drawer.locator("textarea")).toHaveValue("Not sent.");
    await context.close();
  });

  test("a refusal takes the focus to its summary, and each line of it into its field", async ({
    browser,
    watch,
  }) => {
    const context = await openAs(browser, ADA);
    await watch(context);
    const page = await context.newPage();
    const claim = await heldClaim(page);
    await page.goto(`${claim}/decide`);
    await page.locator('[name="letter"]').fill("Too early.");
    await page.getByRole("button", { name: "Send verdict" }).click();
    await walkSummary(page);
    await expect(page.locator('[name="letter"]')).toHaveValue("Too early.");

    await page.goto(`${claim}/ask`);
    await page.getByRole("button", { name: "Send query" }).click();
    await walkSummary(page);
    await context.close();
  });

  test("a day that cannot be read takes the focus as well", async ({ browser, watch }) => {
    const context = await openAs(browser, LOU);
    await watch(context);
    const page = await context.newPage();
    await page.goto(await draftPage(page, "fault"));
    const before = await page.locator('[name="failedOn"]').inputValue();
    await page.locator('[name="failedOn"]').fill("the other day");
    await page.getByRole("button", { name: "Save and go on" }).click();
    await walkSummary(page);
    await page.locator('[name="failedOn"]').fill(before);
    await page.getByRole("button", { name: "Save and go on" }).click();
    await page.waitForURL(/\/evidence$/);
    await context.close();
  });
});

test.describe("everything that is pressed is large enough", () => {
  for (const { role, email, size, viewport } of [
    { role: "technician", email: LOU, size: 44, viewport: { width: 390, height: 844 } },
    { role: "assessor", email: ADA, size: 24, viewport: { width: 1440, height: 900 } },
  ])
    test(`${size} px for the ${role}`, async ({ browser, watch }) => {
      test.setTimeout(90_000);
      const context = await openAs(browser, email, { viewport, hasTouch: size === 44 });
      await watch(context);
      const page = await context.newPage();
      const small = [];
      for (const { name, pathFor } of screensOf(role)) {
        await page.goto((await pathFor(page)) ?? "/");
        small.push(...(await smallTargets(page, size)).map((target) => `${name}: ${target}`));
      }
      expect(small).toEqual([]);
      await context.close();
    });
});
