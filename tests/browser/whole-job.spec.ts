import type { Page } from "@playwright/test";
import { fillEvidence, fillFault, fillPart, goOn, startWithSerial } from "./draft-pages";
import { axe, expect, mailsTo, PHONE, signInAs, test } from "./fixtures";
import { wordsIn } from "./words";

type Story = {
  readonly locale: "en" | "de";
  readonly account: string;
  readonly part: string;
  readonly batch: string;
  readonly price: string;
  readonly taxRate: string;
  readonly people: Readonly<
    Record<
      "administrator" | "technician" | "assessor" | "goodsIn" | "manager" | "accounts" | "analyst",
      string
    >
  >;
};

/** Between Larkmoor Parts and Saltmarsh Mobility in English, between Fenwright Supply and Quayhead Wheels in German. */
const STORIES: readonly Story[] = [
  {
    locale: "en",
    account: "L-2041",
    part: "LMB-2410",
    batch: "R2643",
    price: "86,40",
    taxRate: "20",
    people: {
      administrator: "colin.thorpe@larkmoor.example",
      technician: "lou.tanner@saltmarsh.example",
      assessor: "ada.merrow@larkmoor.example",
      goodsIn: "rosa.finchley@larkmoor.example",
      manager: "maren.holt@saltmarsh.example",
      accounts: "edwin.marsh@larkmoor.example",
      analyst: "nadia.brook@larkmoor.example",
    },
  },
  {
    locale: "de",
    account: "70018",
    part: "FS-1104",
    batch: "R2644",
    price: "93,20",
    taxRate: "19",
    people: {
      administrator: "holger.bruns@fenwright.example",
      technician: "jonas.ehrler@quayhead.example",
      assessor: "greta.lindau@fenwright.example",
      goodsIn: "holger.bruns@fenwright.example",
      manager: "wiebke.sandner@quayhead.example",
      accounts: "holger.bruns@fenwright.example",
      analyst: "imke.rahn@fenwright.example",
    },
  },
];

test.describe.configure({ mode: "serial" });

for (const story of STORIES) walk(story);

/** One claim from the invoice line to the allocated credit and to the curve, by everybody whose job it is. */
function walk({ locale, account, part, batch, price, taxRate, people }: Story) {
  const t = wordsIn(locale);
  // A stamp of its own, so that the walk can be walked again on the same database.
  const stamp = `${locale.toUpperCase()}${String(Date.now()).slice(-7)}`;
  const [serial, replacement] = [`J${stamp}-1`, `J${stamp}-9`];
  let claim = "";
  let returned = "";
  let note = "";

  // The same screens in another language: their parts and roles were looked at once.
  const look = locale === "en" ? axe : () => Promise.resolve();
  const press = (page: Page, key: string) => page.getByRole("button", { name: t(key), exact: true }).click();
  const openClaim = async (page: Page, who: string) => {
    await signInAs(page, who);
    await page.goto(`/claims/${claim}`);
  };

  test(`${locale}: the administrator imports what was sold`, async ({ page }) => {
    await signInAs(page, people.administrator);
    await page.goto("/invoice-lines");
    const lines = [
      "Account;Invoice;Line;Invoice day;Part number;Serial;Batch;Net price;Tax category;Tax rate",
      ...[serial, replacement].map(
        (one) => `${account};J-${stamp};1;2026-11-02;${part};${one};${batch};${price};S;${taxRate}`,
      ),
    ];
    const file = { name: `job-${stamp}.csv`, mimeType: "text/csv", buffer: Buffer.from(lines.join("\n")) };
    await page.locator('input[type="file"]').setInputFiles(file);
    await press(page, "imports.send.button");
    await page.getByRole("button", { name: t("imports.preview.import", { count: 2 }) }).click();
    await expect(page.getByText(t("imports.preview.written"))).toBeVisible();
  });

  test.describe(`${locale}: at the bench, on a phone`, () => {
    test.use({ viewport: PHONE, hasTouch: true });

    test("the technician claims the part, and asks for the labour too", async ({ page }) => {
      test.setTimeout(120_000);
      const today = t("ui.day.today").toLowerCase();
      await signInAs(page, people.technician);
      claim = await startWithSerial(page, serial, t);
      const fittedOn = t("ui.day.yesterday").toLowerCase();
      await fillPart(page, { fittedOn, replacement, today }, t);
      await goOn(page, "fault", t);
      await fillFault(page, today, t);
      await page.locator('[name="labourMinutes"]').fill("90");
      await page.locator('[name="carriageAsked"]').fill("9,50");
      await goOn(page, "evidence", t);
      await fillEvidence(page, serial, t);
      await goOn(page, "check", t);
      await press(page, "draft.check.send");
      await expect(page.getByText(t("sheet.sent.write"))).toBeVisible();
    });
  });

  test(`${locale}: the assessor calls the part in, and cannot decide before it is examined`, async ({
    page,
  }) => {
    await openClaim(page, people.assessor);
    await press(page, "sheet.actions.take");
    await page.getByRole("link", { name: t("returns.card.callIn") }).click();
    await look(page);
    await press(page, "returns.callIn.submit");
    await expect(page.getByText(t("returns.card.title")).first()).toBeVisible();
    await page.goto(`/claims/${claim}/decide`);
    await expect(page.getByText(t("returns.waits.title"))).toBeVisible();
  });

  test(`${locale}: the technician prints the label and sends the part`, async ({ page }) => {
    await openClaim(page, people.technician);
    const plate = page.locator("#called-in").getByText(/^R\d{3}-\d{3}-\d{3}$/u);
    returned = (await plate.first().textContent()) ?? "";
    expect(returned).toMatch(/^R\d{3}-\d{3}-\d{3}$/u);
    await look(page);
    const label = await page.request.get(`/api/v1/returns/${returned.replace(/\D/gu, "")}/label?size=a4`);
    expect(label.headers()["content-type"]).toContain("application/pdf");
    expect((await label.body()).subarray(0, 5).toString()).toBe("%PDF-");
    await page.locator('[name="carrier"]').fill("Moor Freight");
    await press(page, "returns.dispatch.submit");
    await expect(page.getByText(t("ui.mark.part.sent")).first()).toBeVisible();
  });

  test(`${locale}: goods-in receives it by its number, and no fault found is not open to a short run`, async ({
    page,
  }) => {
    await signInAs(page, people.goodsIn);
    await page.goto("/goods-in");
    await look(page);
    await page.locator('[name="find"]').fill(returned);
    await press(page, "goodsIn.find");
    await page.locator('[name="lines.0.serialSeen"]').fill(serial);
    await page.locator('[name="place"]').fill("B-07");
    await look(page);
    await press(page, "goodsIn.receive.submit");
    await expect(page.getByText(t("goodsIn.notes.received"))).toBeVisible();
    await page.goto(`/goods-in/returns/${returned}/bench/1`);
    await look(page);
    await page.locator('[name="kind"][value="noFaultFound"]').check();
    await page
      .locator('[name="note"]')
      .fill("Ran it warm on the rig. It let go at 17 minutes and 30 seconds.");
    await page.locator('[name="runMinutes"]').fill("5");
    await press(page, "goodsIn.bench.submit");
    await expect(page.getByText(t("ui.problemTitle", { count: 1 }))).toBeVisible();
    await expect(page.locator('[name="note"]')).toHaveValue(/^Ran it warm/u);
    await page.locator('[name="kind"][value="faultConfirmed"]').check();
    await page.locator('[name="runMinutes"]').fill("20");
    await press(page, "goodsIn.bench.submit");
    await expect(page.getByText(t("returns.findings.faultConfirmed")).first()).toBeVisible();
  });

  test(`${locale}: the assessor upholds three quarters, and the credit explains itself`, async ({ page }) => {
    await openClaim(page, people.assessor);
    const take = page.getByRole("button", { name: t("sheet.actions.take") });
    if (await take.count()) await take.click();
    await page.getByRole("link", { name: t("sheet.actions.decide") }).click();
    await expect(page.getByText(t("returns.findings.faultConfirmed")).first()).toBeVisible();
    const line = (name: string) => page.locator(`[name="lines.0.${name}"]`);
    await page.locator('[name="lines.0.outcome"][value="upheldInPart"]').check();
    await line("shares.maker").fill("3/4");
    await line("shares.wear").fill("1/4");
    await line("reasonCode").selectOption("partlyWorn");
    await line("reason").fill("The coil lost its force when hot; the lining was half worn.");
    await page.locator('[name="letter"]').fill("Three quarters of it are ours.");
    await press(page, "live.decide.submit");
    const card = page.locator("#credit");
    await expect(card.getByText(t("credits.card.promised"))).toBeVisible();
    await card.getByText(t("credits.card.why")).first().click();
    await look(page);
    await expect
      .poll(
        async () =>
          (await mailsTo(people.technician)).filter(({ subject }) => subject.includes(claim)).length,
        {
          timeout: 20_000,
        },
      )
      .toBeGreaterThan(1);
  });

  test(`${locale}: the manager accepts the verdict`, async ({ page }) => {
    await openClaim(page, people.manager);
    await press(page, "sheet.actions.accept");
    await expect(page.getByText(t("sheet.record.kinds.accepted")).first()).toBeVisible();
  });

  test(`${locale}: accounts issues the note, which both sides read, and allocates it`, async ({ page }) => {
    await signInAs(page, people.accounts);
    await page.goto("/credits");
    await look(page);
    const box = page.getByRole("checkbox", { name: t("credits.due.tick", { number: claim }) });
    await box.check();
    await press(page, "credits.due.submit");
    await expect(box).toHaveCount(0);
    await page.goto(`/claims/${claim}`);
    const link = page.locator("#credit").getByRole("link").first();
    note = (await link.getAttribute("href")) ?? "";
    await page.goto(note);
    await look(page);
    const pdf = await page.request.get(
      (await page.getByRole("link", { name: t("credits.page.pdf") }).getAttribute("href")) ?? "",
    );
    expect((await pdf.body()).subarray(0, 5).toString()).toBe("%PDF-");
    await page.locator('[name="reference"]').fill(`J-${stamp}`);
    await press(page, "credits.allocations.submit");
    await expect(page.locator("#allocations").getByText(`J-${stamp}`)).toBeVisible();
    await page.goto("/day-book");
    await look(page);
    await expect(page.getByText(t("dayBook.proof.agrees")).first()).toBeVisible();
  });

  test(`${locale}: the workshop is mailed the note, and the claim settles`, async ({ page }) => {
    await openClaim(page, people.manager);
    await expect
      .poll(async () => (await mailsTo(people.manager)).some(({ subject }) => subject.includes(claim)), {
        timeout: 20_000,
      })
      .toBe(true);
    await expect
      .poll(
        async () => {
          await page.reload();
          return page.getByText(t("ui.mark.claim.settled")).count();
        },
        { timeout: 30_000 },
      )
      .toBeGreaterThan(0);
    await page.goto(note);
    await expect(page.getByText(`J-${stamp}`).first()).toBeVisible();
  });

  test(`${locale}: the analyst finds it behind the curve of its batch`, async ({ page }) => {
    await signInAs(page, people.analyst);
    await page.goto(`/life-curves?part=${part}`);
    await expect(page.locator("figure svg").first()).toBeVisible();
    await look(page);
    await page
      .getByRole("link", { name: new RegExp(`^${batch}\\b`, "u") })
      .first()
      .click();
    await expect(page.getByRole("link", { name: claim })).toBeVisible();
    await look(page);
  });
}
