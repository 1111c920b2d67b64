import { defineConfig } from "@playwright/test";

// Debian's Chromium, kept from calling home; the product is already running when these tests start.
const CHROMIUM = {
  executablePath: "/usr/bin/chromium",
  args: [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
  ],
};

const report = process.env.BROWSER_REPORT;

export default defineConfig({
  testDir: "tests/browser",
  testMatch: "**/*.spec.ts",
  // Everybody shares one database and one story.
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: report ? [["list"], ["json", { outputFile: report }]] : [["list"]],
  use: {
    baseURL: process.env.PUBLIC_URL ?? "http://127.0.0.1:3000",
    launchOptions: CHROMIUM,
    viewport: { width: 1440, height: 900 },
    locale: "en-GB",
    // Far from UTC, with an odd offset: a day written in the browser's zone shows at once.
    timezoneId: "Asia/Kathmandu",
    trace: "retain-on-failure",
    screenshot: "only-on-failure",
  },
});
