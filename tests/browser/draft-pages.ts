import { expect, type Page } from "@playwright/test";
import { photoWithPlace, runLogCsv } from "./material";
import { wordsIn, type Words } from "./words";

const ENGLISH = wordsIn("en");

/** What the meter of this test's workshop shows, by row of the Evidence list. */
const READINGS: Readonly<Record<string, { raw: string; temperature?: string }>> = {
  coilResistanceCold: { raw: "58,4", temperature: "21" },
  releaseVoltage: { raw: "18.6 V", temperature: "21" },
  voltageAtPlug: { raw: "24,1" },
  airGap: { raw: "0,25" },
};

/** Looks the serial up and starts a claim for what it answers; returns the claim's number. */
export async function startWithSerial(page: Page, serial: string, t: Words = ENGLISH): Promise<string> {
  await page.goto("/claims/new");
  await page.locator('input[name="serial"]').fill(serial);
  await page.getByRole("button", { name: t("start.lookUp") }).click();
  await page.getByRole("button", { name: t("start.startWithThis") }).click();
  await page.waitForURL(/\/claims\/[\d-]+\/part$/);
  return /claims\/([\d-]+)\//.exec(page.url())?.[1] ?? "";
}

/** Page 1: where it sat, when it was fitted and by whom, what took its place, in which vehicle. */
export async function fillPart(
  page: Page,
  facts: { fittedOn: string; replacement: string; today: string },
  t: Words = ENGLISH,
) {
  const line = (name: string) => page.locator(`[name="lines.0.${name}"]`);
  await page
    .getByRole("radio", { name: t("draft.line.positions.left") })
    .first()
    .check();
  await line("fittedOn").fill(facts.fittedOn);
  await line("installer").fill("Neil Harker");
  await line("replacementSerial").fill(facts.replacement);
  await line("replacementFittedOn").fill(facts.today);
  await page.locator('[name="frameSerial"]').fill("HD4-55102-0098");
  await page.locator('[name="vehicleModel"]').fill("Haddle 4");
}

/** Page 2: what it did, since when, what was ruled out, how it was found, what the swap showed. */
export async function fillFault(page: Page, failedOn: string, t: Words = ENGLISH) {
  await page.getByRole("radio", { name: t("families.brake.symptoms.grabsWhenWarm") }).check();
  await page.locator('[name="failedOn"]').fill(failedOn);
  await page.locator('[name="note"]').fill("Drives well cold. Grabs after a quarter of an hour.");
  await page
    .getByRole("radio", { name: t("draft.fault.no"), exact: true })
    .first()
    .check();
  for (const box of await page.locator('input[type="checkbox"][name^="ruledOut."]').all()) await box.check();
  await page.locator('[name="earlierWork"]').fill("New tyres last spring, nothing on the drive.");
  await page.locator('[name="swapMinutes"]').fill("12");
}

type Sent = { rowId: string; name: string; mimeType: string; buffer: Buffer };

/** A photo or a log into its row, and the row says when it is safe. */
async function upload(page: Page, { rowId, ...file }: Sent, t: Words) {
  const row = page.locator(`[id="rows.${rowId}"]`);
  await row.locator('input[type="file"]:not([capture])').setInputFiles(file);
  await expect(row.getByText(t("ui.upload.sent"))).toBeVisible({ timeout: 30_000 });
}

/** Page 3: everything that is still to do, by its kind; what cannot be had says why. */
export async function fillEvidence(page: Page, serial: string, t: Words = ENGLISH) {
  const rows = page.locator('li[id^="rows."]');
  const photo = await photoWithPlace(serial);
  await upload(page, { rowId: "label", name: "label.jpg", mimeType: "image/jpeg", buffer: photo }, t);
  const log = Buffer.from(runLogCsv());
  await upload(page, { rowId: "runLog", name: "bench run.csv", mimeType: "text/csv", buffer: log }, t);
  for (const row of await rows.all()) {
    const id = (await row.getAttribute("id"))?.replace("rows.", "") ?? "";
    if (["label", "runLog"].includes(id)) continue;
    const reading = row.locator(`[name="readings.${id}.raw"]`);
    if (await reading.count()) {
      await reading.fill(READINGS[id]?.raw ?? "1");
      const temperature = row.locator(`input[type="text"][name="readings.${id}.temperature"]`);
      if (await temperature.count()) await temperature.fill(READINGS[id]?.temperature ?? "21");
    } else if (await row.locator("textarea").count()) await row.locator("textarea").fill("Dry and clean.");
    else {
      await row.locator("summary").click();
      await row.locator(`[name="cannotGet.${id}"]`).fill("The camera of the bench was in repair.");
    }
  }
}

/** On to the next page of the flow. */
export async function goOn(page: Page, step: "fault" | "evidence" | "check", t: Words = ENGLISH) {
  await page.getByRole("button", { name: t("draft.goOn") }).click();
  await page.waitForURL(new RegExp(`/${step}$`));
}
