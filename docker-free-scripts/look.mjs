// Pictures of every screen, at phone and desk, light and dark, a contact sheet for each person: npm run look
// [--only=text] [--role=assessor] [--width=390] [--theme=dark]; the product must be running.
import { mkdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { chromium } from "@playwright/test";
import sharp from "sharp";
import { root } from "./machine.mjs";
import { MORE_SCREENS, SCREENS } from "./screens.mjs";

const SIZES = { 390: { width: 390, height: 844 }, 1440: { width: 1440, height: 900 } };
const THEMES = ["light", "dark"];
const TILE = { 390: 300, 1440: 640 };
const GAP = 24;
const MOST_TALL = 3;

const option = (name) => process.argv.find((arg) => arg.startsWith(`--${name}=`))?.split("=")[1];
const baseURL = process.env.PUBLIC_URL ?? `http://localhost:${process.env.PORT ?? 3000}`;
const password =
  process.env.DEMO_PASSWORD ??
  JSON.parse(readFileSync(join(root, ".local/secrets.json"), "utf8")).demoPassword;

async function signIn(page, email) {
  await page.goto("/sign-in");
  await page.locator('input[name="email"]').fill(email);
  await page.locator('input[name="password"]').fill(password);
  await page.locator('form:has(input[name="password"]) button[type="submit"]').click();
  await page.waitForURL((url) => url.pathname !== "/sign-in");
}

async function shoot(page, { path, act }, file) {
  await page.goto(path, { waitUntil: "networkidle" });
  if (act) await act(page);
  // Pictures load as they come into sight.
  await page.evaluate(async () => {
    for (let top = 0; top < document.body.scrollHeight; top += window.innerHeight) {
      window.scrollTo(0, top);
      await new Promise((resolve) => setTimeout(resolve, 60));
    }
    window.scrollTo(0, 0);
  });
  await page.waitForLoadState("networkidle");
  const wide = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  if (wide > 0) process.stdout.write(`${file}: ${wide} px wider than the window\n`);
  await page.screenshot({ path: file, fullPage: true });
  return file;
}

/** All pictures of a person side by side, each cut where it grows longer than three windows. */
async function contactSheet(files, { width, theme, file }) {
  const tiles = await Promise.all(
    files.map(async (one) => {
      const scaled = await sharp(one).resize({ width: TILE[width] }).toBuffer({ resolveWithObject: true });
      const tall = Math.round((SIZES[width].height / width) * TILE[width] * MOST_TALL);
      if (scaled.info.height <= tall) return { input: scaled.data, height: scaled.info.height };
      const input = await sharp(scaled.data)
        .extract({ left: 0, top: 0, width: TILE[width], height: tall })
        .toBuffer();
      return { input, height: tall };
    }),
  );
  const columns = width === "390" ? 6 : 3;
  const tops = Array.from({ length: columns }, () => GAP);
  const placed = tiles.map(({ input, height }) => {
    const column = tops.indexOf(Math.min(...tops));
    const top = tops[column];
    tops[column] += height + GAP;
    return { input, left: GAP + column * (TILE[width] + GAP), top };
  });
  const ground = theme === "dark" ? "#3a3f44" : "#b9b3a4";
  await sharp({
    create: {
      width: columns * (TILE[width] + GAP) + GAP,
      height: Math.max(...tops),
      channels: 3,
      background: ground,
    },
  })
    .composite(placed)
    .png()
    .toFile(file);
  process.stdout.write(`${file}\n`);
}

async function lookAs(browser, { role, email, screens }, { width, theme }) {
  const context = await browser.newContext({
    baseURL,
    viewport: SIZES[width],
    colorScheme: theme,
    locale: option("locale") ?? "en-GB",
    reducedMotion: "reduce",
    hasTouch: width === "390",
  });
  const page = await context.newPage();
  if (email) await signIn(page, email);
  const folder = join(root, "look", role);
  mkdirSync(folder, { recursive: true });
  const files = [];
  for (const [name, place] of Object.entries(screens)) {
    if (option("only") && !name.includes(option("only"))) continue;
    const found = typeof place === "string" ? place : await place(page);
    const target = typeof found === "string" ? { path: found } : found;
    if (target) files.push(await shoot(page, target, join(folder, `${name}-${width}-${theme}.png`)));
    else process.stdout.write(`${role}: no claim for ${name}\n`);
  }
  await context.close();
  if (files.length > 0)
    await contactSheet(files, { width, theme, file: join(root, "look", `${role}-${width}-${theme}.png`) });
}

const browser = await chromium.launch({
  executablePath: "/usr/bin/chromium",
  args: ["--no-sandbox", "--disable-gpu"],
});
for (const person of [...SCREENS, ...MORE_SCREENS].filter(
  ({ role }) => !option("role") || role === option("role"),
))
  for (const width of Object.keys(SIZES).filter((one) => !option("width") || one === option("width")))
    for (const theme of THEMES.filter((one) => !option("theme") || one === option("theme")))
      await lookAs(browser, person, { width, theme });
await browser.close();
