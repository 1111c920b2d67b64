import { expect, type Page } from "@playwright/test";
import { photoWithPlace, runLogCsv } from "./material";

/** What the meter of this test's workshop shows, by row of the Evidence list. */
const READINGS: Readonly<Record<string, { raw: string; temperature?: string }>> = {
  coilResistanceCold: { raw: "58,4", temperature: "21" },
  releaseVoltage: { raw: "18.6 V", temperature: "21" },
  voltageAtPlug: { raw: "24,1" },
  airGap: { raw: "0,25" },
};

/** Looks the serial up and starts a claim for what it answers; returns the claim's number. */
export async function startWithSerial(page: Page, serial: string): Promise<string> {
  await page.goto("/claims/new");
  await page.locator('input[name="serial"]').fill(serial);
  await page.getByRole("button", { name: "Look it up" }).click();
  await page.getByRole("button", { name: "Start with this part" }).click();
  await page.waitForURL(/\/claims\/[\d-]+\/part$/);
  return /claims\/([\d-]+)\//.exec(page.url())?.[1] ?? "";
}

/** Page 1: where it sat, when it was fitted and by whom, what took its place, in which vehicle. */
export async function fillPart(page: Page, facts: { fittedOn: string; replacement: string; today: string }) {
  const line = (name: string) => page.locator(`[name="lines.0.${name}"]`);
  await page.getByRole("radio", { name: "Left" }).first().check();
  await line("fittedOn").fill(facts.fittedOn);
  await line("installer").fill("Neil Harker");
  await line("replacementSerial").fill(facts.replacement);
  await line("replacementFittedOn").fill(facts.today);
  await page.locator('[name="frameSerial"]').fill("HD4-55102-0098");
  await page.locator('[name="vehicleModel"]').fill("Haddle 4");
}

/** Page 2: what it did, since when, what was ruled out, how it was found, what the swap showed. */
export async function fillFault(page: Page, failedOn: string) {
  await page.getByRole("radio", { name: "Grabs or drags when warm" }).check();
  await page.locator('[name="failedOn"]').fill(failedOn);
  await page.locator('[name="note"]').fill("Drives well cold. Grabs after a quarter of an hour.");
  await page.getByRole("radio", { name: "No", exact: true }).first().check();
  for (const box of await page.locator('input[type="checkbox"][name^="ruledOut."]').all()) await box.check();
  await page.locator('[name="earlierWork"]').fill("New tyres last spring, nothing on the drive.");
  await page.locator('[name="swapMinutes"]').fill("12");
}

/** A photo or a log into its row, and the row says when it is safe. */
async function upload(page: Page, rowId: string, file: { name: string; mimeType: string; buffer: Buffer }) {
  const row = page.locator(`[id="rows.${rowId}"]`);
  await row.locator('input[type="file"]:not([capture])').setInputFiles(file);
  await expect(row.getByText("Safe with us")).toBeVisible({ timeout: 30_000 });
}

/** Page 3: everything that is still to do, by its kind; what cannot be had says why. */
export async function fillEvidence(page: Page, serial: string) {
  const rows = page.locator('li[id^="rows."]');
  await upload(page, "label", {
    name: "label.jpg",
    mimeType: "image/jpeg",
    buffer: await photoWithPlace(serial),
  });
  await upload(page, "runLog", {
    name: "bench run.csv",
    mimeType: "text/csv",
    buffer: Buffer.from(runLogCsv()),
  });
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
export async function goOn(page: Page, step: "fault" | "evidence" | "check") {
  await page.getByRole("button", { name: "Save and go on" }).click();
  await page.waitForURL(new RegExp(`/${step}$`));
}
