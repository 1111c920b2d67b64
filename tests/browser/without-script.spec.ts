import { expect, signInAs, test } from "./fixtures";
import { ADA, LOU } from "./people";

// Everything here happens in forms and links alone.
test.use({ javaScriptEnabled: false });

const SERIAL = "R2614661KM";

test("a claim is started, filled and looked over without script", async ({ page }) => {
  await signInAs(page, LOU);
  await page.goto("/claims/new");
  await page.locator('input[name="serial"]').fill(SERIAL.toLowerCase());
  await page.getByRole("button", { name: "Look it up" }).click();
  await expect(page.getByText("R2614-661KM").first()).toBeVisible();
  await page.getByRole("button", { name: "Start with this part" }).click();
  await page.waitForURL(/\/claims\/[\d-]+\/part$/);

  await page.locator('[name="lines.0.fittedOn"]').fill("3 mar 26");
  await page.locator('[name="lines.0.installer"]').fill("Neil Harker");
  await page.locator('[name="frameSerial"]').fill("HD4-NO-SCRIPT");
  await page.getByRole("button", { name: "Save and go on" }).click();
  await page.waitForURL(/\/fault$/);

  // A day that is none gets its sentence at the field, and nothing typed is lost.
  await page.locator('[name="symptom"]').first().check();
  await page.locator('[name="failedOn"]').fill("31 Novembr");
  await page.locator('[name="note"]').fill("Grabs after a quarter of an hour.");
  await page.locator('[name="swapMinutes"]').fill("12");
  await page.getByRole("button", { name: "Save and go on" }).click();
  const refused = page.locator("#failedOn-error");
  await expect(refused).toContainText('"31 Novembr" is not a day we can read.');
  await expect(page.locator('main section[role="alert"]')).toContainText('"31 Novembr" is not a day');
  await expect(page.locator('[name="failedOn"]')).toHaveValue("31 Novembr");
  await expect(page.locator('[name="failedOn"]')).toHaveAttribute("aria-invalid", "true");
  await expect(page.locator('[name="note"]')).toHaveValue("Grabs after a quarter of an hour.");
  await expect(page.locator('[name="swapMinutes"]')).toHaveValue("12");
  await expect(page.locator('[name="symptom"]').first()).toBeChecked();

  await page.locator('[name="failedOn"]').fill("today");
  await page.getByRole("button", { name: "Save and go on" }).click();
  await page.waitForURL(/\/evidence$/);
  await page.getByRole("button", { name: "Save and check" }).click();
  await page.waitForURL(/\/check$/);
  await expect(page.getByText("HD4-NO-SCRIPT")).toBeVisible();
  await expect(page.getByText("Grabs after a quarter of an hour.")).toBeVisible();
  // What is still missing leads to its place, and sending too early says so.
  await page.getByRole("button", { name: "Send claim" }).click();
  await page.waitForURL(/\/check\?show=all$/);
  await expect(page.locator('main section[role="alert"]').getByRole("link").first()).toBeVisible();

  await page.getByRole("button", { name: "Discard this draft" }).click();
  await page.waitForURL(/\/workshop-today$/);
});

test("a claim is taken, judged as far as the refusal, and given back without script", async ({ page }) => {
  await signInAs(page, ADA);
  await page.goto("/judging?view=toJudge");
  await page.locator('main a[href^="/claims/"]').last().click();
  await page.getByRole("button", { name: "Take this claim" }).click();
  await page.getByRole("link", { name: "Give the verdict" }).click();
  await page.waitForURL(/\/decide$/);

  const line = (name: string) => page.locator(`[name="lines.0.${name}"]`);
  await page.locator('[name="lines.0.outcome"][value="declined"]').check();
  await line("shares.maker").fill("1/3");
  await line("shares.wear").fill("1/3");
  await line("reasonCode").selectOption("ordinaryWear");
  await line("reason").fill("Photo 3 shows the lining worn down to the rivets.");
  await page.locator('[name="letter"]').fill("We decline the claim: the lining was worn out.");
  await page.getByRole("button", { name: "Send verdict" }).click();

  await expect(page.locator('main section[role="alert"]')).toBeVisible();
  await expect(page.locator('[name="lines.0.outcome"][value="declined"]')).toBeChecked();
  await expect(line("shares.maker")).toHaveValue("1/3");
  await expect(line("shares.wear")).toHaveValue("1/3");
  await expect(line("reasonCode")).toHaveValue("ordinaryWear");
  await expect(line("reason")).toHaveValue("Photo 3 shows the lining worn down to the rivets.");
  await expect(page.locator('[name="letter"]')).toHaveValue("We decline the claim: the lining was worn out.");

  // Back where it was, so that whoever comes next finds it waiting.
  await page.goto(page.url().replace(/\/decide.*/, ""));
  await page.locator("summary", { hasText: "Put it back on the list" }).click();
  const drawer = page.locator("details[open]");
  await drawer.locator('[name="reason"]').fill("Taken to look at it only.");
  await drawer.getByRole("button").click();
  await expect(page.getByRole("button", { name: "Take this claim" })).toBeVisible();

  await page.goto("/account");
  await page.getByRole("button", { name: "Sign out" }).click();
  await page.waitForURL(/\/sign-in\?note=signedOut$/);
  await expect(page.getByText("You are signed out.")).toBeVisible();
  await page.goto("/judging");
  await page.waitForURL(/\/sign-in$/);
});

test("a list stands in its place without script: its rows and no skeleton, and what is not one's own is 404", async ({
  page,
}) => {
  await signInAs(page, ADA);
  for (const list of ["/judging?view=all", "/rule-book"]) {
    expect((await page.goto(list))?.status()).toBe(200);
    await expect(page.locator("main tbody tr").first()).toBeVisible();
    // What streams in later waits in such a place until a script moves it.
    await expect(page.locator('[hidden][id^="S:"]')).toHaveCount(0);
    await expect(page.getByText("Loading", { exact: true })).toHaveCount(0);
  }
  for (const path of ["/claims/9999-9999", "/catalogue"])
    expect([path, (await page.request.get(path)).status()]).toEqual([path, 404]);
});

test("an alert is found, opened and read without script", async ({ page }) => {
  await signInAs(page, ADA);
  await page.goto("/judging?view=toJudge");
  const row = page.locator("main tbody tr", { hasText: "Saltmarsh" }).last();
  const number = (await row.locator('a[href^="/claims/"]').innerText()).trim();
  await page.goto(`/claims/${number}`);
  await page.getByRole("button", { name: "Take this claim" }).click();
  await page.goto(`/claims/${number}/ask`);
  await page.locator('[name="question"]').fill("Which air gap did you measure?");
  await page.getByRole("button", { name: "Send query" }).click();
  await page.waitForURL(new RegExp(`/claims/${number}$`, "u"));
  await page.goto("/account");
  await page.getByRole("button", { name: "Sign out" }).click();

  await signInAs(page, LOU);
  await page.getByRole("link", { name: /^Alerts .*unread/u }).click();
  await page.waitForURL(/\/alerts$/u);
  const alert = page.locator("main li", { hasText: number }).first();
  await expect(alert).toContainText("has a question. Answer by");
  await expect(alert).toContainText("Unread");
  await alert.getByRole("link", { name: number }).click();
  await page.waitForURL(new RegExp(`/claims/${number}$`, "u"));
  await page.goto("/alerts");
  await expect(alert).not.toContainText("Unread");
  await expect(alert).toContainText("Read");

  const readAll = page.getByRole("button", { name: "Mark all as read" });
  if ((await readAll.count()) > 0) await readAll.click();
  await page.goto("/alerts");
  await expect(page.getByText("Unread", { exact: true })).toHaveCount(0);
  await expect(page.getByRole("link", { name: "Alerts", exact: true })).toBeVisible();
});
