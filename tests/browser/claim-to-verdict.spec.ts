import { fillEvidence, fillFault, fillPart, goOn, startWithSerial } from "./draft-pages";
import type { Page } from "@playwright/test";
import { axe, expect, mailsTo, PHONE, signInAs, test } from "./fixtures";

const TECHNICIAN = "lou.tanner@saltmarsh.example";
const ASSESSOR = "ada.merrow@larkmoor.example";
const STRANGER = "idris.vale@tworivers.example";

const ADMINISTRATOR = "colin.thorpe@larkmoor.example";

// A stamp of its own, so that the walk can be walked again on the same database.
const STAMP = String(Date.now()).slice(-7);
const SERIAL = `W${STAMP}-4TK2`;
const TWIN = `W${STAMP}-4TK3`;
const REPLACEMENT = `W${STAMP}-4TK9`;
const OTHER_PART = `NEW-${STAMP}`;

// Three people and a stranger, one claim, in the order in which it happens.
test.describe.configure({ mode: "serial" });

/** An invoice file: three units of the usual brake, and a part the catalogue does not have yet. */
const invoiceFile = (): string =>
  [
    "Account;Invoice;Line;Invoice day;Part number;Serial;Batch;Net price;Tax category;Tax rate",
    ...[SERIAL, TWIN, REPLACEMENT].map(
      (serial) => `L-2041;W-${STAMP};1;2026-11-02;LMB-2410;${serial};R2642;86,40;S;20`,
    ),
    `L-2041;W-${STAMP};2;2026-11-02;${OTHER_PART};;;12,00;S;20`,
  ].join("\n");

const sendInvoiceFile = async (page: Page) => {
  await page.goto("/invoice-lines");
  const file = { name: `lines-${STAMP}.csv`, mimeType: "text/csv", buffer: Buffer.from(invoiceFile()) };
  await page.locator('input[type="file"]').setInputFiles(file);
  await page.getByRole("button", { name: "Check the file" }).click();
};

let number = "";
const digits = () => number.replace("-", "");

test("the administrator imports the invoice lines, all or nothing", async ({ page }) => {
  await signInAs(page, ADMINISTRATOR);
  await sendInvoiceFile(page);
  await expect(page.getByText("One line cannot be taken")).toBeVisible();
  await axe(page);
  await expect(page.getByRole("button", { name: /^Import / })).toHaveCount(0);

  // The unknown part is an error line whose link creates it; then the file goes in whole.
  await page.getByRole("link", { name: `Create part ${OTHER_PART}` }).click();
  await axe(page);
  await expect(page.locator('[name="partNumber"]')).toHaveValue(OTHER_PART);
  await page.locator('[name="name"]').fill("Brake lead, 400 mm");
  await page.locator('[name="family"]').selectOption("brake");
  await page.locator('[name="maker"]').fill("Ostrand");
  await page.getByRole("radio", { name: "No serial, units are counted" }).check();
  await page.getByRole("button", { name: "Add the part" }).click();
  await page.waitForURL(/\/invoice-lines\//);
  await page.getByRole("button", { name: /^Import / }).click();
  await expect(page.getByText("What the import wrote")).toBeVisible();
  await axe(page);

  await sendInvoiceFile(page);
  await expect(page.getByText("This file was sent before")).toBeVisible();
  await expect(page.getByRole("button", { name: /^Import / })).toHaveCount(0);
});

test.describe("at the bench, on a phone", () => {
  test.use({ viewport: PHONE, hasTouch: true });

  test("a technician starts a claim from the serial, proves it and sends it", async ({ page }) => {
    test.setTimeout(120_000);
    await signInAs(page, TECHNICIAN);
    await axe(page);
    number = await startWithSerial(page, SERIAL.replace("-", " ").toLowerCase());
    await axe(page);
    // Its twin was changed with it: one claim, two lines.
    await page.locator('[name="other"]').fill(TWIN);
    await page.getByRole("button", { name: "Look it up" }).click();
    await page.getByRole("button", { name: "Add it" }).click();
    await expect(page.getByText(TWIN)).toBeVisible();
    await fillPart(page, { fittedOn: "yesterday", replacement: REPLACEMENT, today: "today" });
    await goOn(page, "fault");
    await axe(page);

    // A day that is none gets its sentence at the field, and nothing typed is lost.
    await fillFault(page, "31 Novembr");
    await page.getByRole("button", { name: "Save and go on" }).click();
    await expect(page.getByText('"31 Novembr" is not a day we can read.').first()).toBeVisible();
    await expect(page.locator('[name="failedOn"]')).toHaveValue("31 Novembr");
    await expect(page.locator('[name="note"]')).toHaveValue(/Grabs after a quarter/);
    await page.locator('[name="failedOn"]').fill("today");
    await goOn(page, "evidence");

    await axe(page);
    await fillEvidence(page, SERIAL);
    await goOn(page, "check");
    await expect(page.getByText("Nothing an assessor would ask for is missing.")).toBeVisible();
    await axe(page);
    await page.getByRole("button", { name: "Send claim" }).click();

    await expect(page.getByText("Write the number on the part")).toBeVisible();
    await expect(page.getByText(number).first()).toBeVisible();
    await axe(page);
  });

  test("a draft saves itself while it is typed", async ({ page }) => {
    await signInAs(page, TECHNICIAN);
    const other = await startWithSerial(page, REPLACEMENT);
    const kept = page.waitForResponse((answer) => answer.url().endsWith("/draft") && answer.ok());
    await page.locator('[name="frameSerial"]').fill("HD4-SAVES-ITSELF");
    await kept;
    await expect(page.getByText(/^Safe with us, /)).toBeVisible();
    await page.goto(`/claims/${other}/part`);
    await expect(page.locator('[name="frameSerial"]')).toHaveValue("HD4-SAVES-ITSELF");
  });
});

test("the assessor takes it, sees the cover as steps and the log drawn, and asks once", async ({ page }) => {
  await signInAs(page, ASSESSOR);
  await expect(page.getByRole("heading", { level: 1, name: "To judge" })).toBeVisible();
  await axe(page);
  await page.goto(`/claims/${number}`);
  await page.getByRole("button", { name: "Take this claim" }).click();
  await expect(page.getByRole("link", { name: "Ask the workshop" })).toBeVisible();
  await expect(page.locator("figure svg[role=img]").first()).toBeVisible();
  await page.getByText("How this was worked out").first().click();
  await axe(page);

  await page.getByRole("link", { name: "Ask the workshop" }).click();
  await page.getByRole("checkbox", { name: "Photo of the friction face" }).check();
  await page.getByRole("button", { name: "Send query" }).click();
  await expect(page.locator('[name="question"]')).toHaveAttribute("aria-invalid", "true");
  await page.locator('[name="question"]').fill("Show us the friction face, without oil and with.");
  await page.getByRole("button", { name: "Send query" }).click();
  await expect(page.getByText("Answer needed").first()).toBeVisible();
  await expect
    .poll(async () => (await mailsTo(TECHNICIAN)).some(({ subject }) => subject.includes(number)), {
      timeout: 20_000,
    })
    .toBe(true);
});

test("the technician answers, which is revision 2", async ({ page }) => {
  await signInAs(page, TECHNICIAN);
  await page.goto(`/claims/${number}`);
  await page.getByRole("link", { name: "Answer the query" }).click();
  const row = page.locator('[id="rows.frictionFace"]');
  await expect(row.getByText("Asked for")).toBeVisible();
  await row
    .locator('[name="cannotGet.frictionFace"]')
    .fill("Photographed with the phone of a colleague; sent by talk.");
  await goOn(page, "check");
  await page.getByRole("button", { name: "Send answer" }).click();
  await expect(page.getByText("Revision 2").first()).toBeVisible();
});

test("the assessor decides line by line, on the revision that was on the screen", async ({ page }) => {
  await signInAs(page, ASSESSOR);
  await page.goto(`/claims/${number}`);
  await page.getByRole("button", { name: "Take this claim" }).click();
  await page.getByRole("link", { name: "Give the verdict" }).click();
  await axe(page);
  for (const place of [0, 1]) {
    const line = (name: string) => page.locator(`[name="lines.${place}.${name}"]`);
    await page.locator(`[name="lines.${place}.outcome"][value="upheld"]`).check();
    await line("shares.maker").fill(place === 0 ? "2/3" : "1");
    await line("reasonCode").selectOption("faultOfThePart");
    await line("reason").fill("The log shows it: free when cold, it grabs after 17 minutes.");
  }
  await page.locator('[name="letter"]').fill("We uphold the claim. The coil lost its force when hot.");
  await page.locator('[name="returnWaivedReason"]').fill("The log and the photos are clear.");
  await page.getByRole("button", { name: "Send verdict" }).click();
  // Shares that do not add to one are refused at their place, and nothing is lost.
  await expect(page.locator('[name="letter"]')).toHaveValue(/We uphold the claim/);
  await expect(page.locator('[name="lines.0.shares.maker"]')).toHaveValue("2/3");
  await expect(page.locator('[name="lines.0.reasonCode"]')).toHaveValue("faultOfThePart");
  await page.locator('[name="lines.0.shares.maker"]').fill("1");
  await page.getByRole("button", { name: "Send verdict" }).click();
  await expect(page.getByRole("heading", { name: "Verdict" })).toBeVisible();
  await expect(page.getByText("Verdict given on revision 2")).toBeVisible();
});

test("both sides read the same timeline", async ({ page, browser, watch }) => {
  const entries = [/Filed as revision 1/, /Taken to be judged/, /Verdict given on revision 2/];
  await signInAs(page, TECHNICIAN);
  await page.goto(`/claims/${number}`);
  for (const entry of entries) await expect(page.locator("#record").getByText(entry).first()).toBeVisible();
  const other = await browser.newContext();
  await watch(other);
  const desk = await other.newPage();
  await signInAs(desk, ASSESSOR);
  await desk.goto(`/claims/${number}`);
  for (const entry of entries) await expect(desk.locator("#record").getByText(entry).first()).toBeVisible();
  await other.close();
});

test.describe("a stranger", () => {
  test.use({ expectedConsole: [/status of 404/] });

  test("finds nothing of it: page, API, files, lists and search", async ({ page, browser }) => {
    const owner = await browser.newContext();
    const ownPage = await owner.newPage();
    await signInAs(ownPage, TECHNICIAN);
    const files = await (await ownPage.request.get(`/api/v1/claims/${digits()}/evidence`)).json();
    expect(files.files.length).toBeGreaterThan(1);

    await signInAs(page, STRANGER);
    const answer = await page.goto(`/claims/${number}`);
    expect(answer?.status()).toBe(404);
    const paths = [
      `/api/v1/claims/${digits()}/evidence`,
      `/api/v1/claims/${digits()}/messages`,
      ...files.files.map(({ id }: { id: string }) => `/api/v1/evidence/${id}`),
      ...files.files.map(({ id }: { id: string }) => `/api/v1/evidence/${id}/view`),
    ];
    for (const path of paths) {
      const missing = await page.request.get(path);
      expect(missing.status(), path).toBe(404);
      expect(await missing.text(), path).not.toContain(number);
    }
    for (const side of ["own", "received"]) {
      const list = await page.request.get(`/api/v1/claims?side=${side}&view=all&q=${number}`);
      expect((await list.json()).items).toEqual([]);
    }
    await page.goto(`/claims/new?serial=${SERIAL}`);
    await expect(page.getByText(/is not among the parts shipped to you/)).toBeVisible();
    await owner.close();
  });
});
