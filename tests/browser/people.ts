import { randomInt } from "node:crypto";
import type { Browser, BrowserContext, BrowserContextOptions } from "@playwright/test";
import { signInAs } from "./fixtures";

export const LOU = "lou.tanner@saltmarsh.example";
export const ADA = "ada.merrow@larkmoor.example";
export const COLIN = "colin.thorpe@larkmoor.example";
export const IDRIS = "idris.vale@tworivers.example";

type State = Awaited<ReturnType<BrowserContext["storageState"]>>;
const kept = new Map<string, State>();

// Tries to sign in are counted by network address: each run comes from one of its own, so that runs do not add up.
const runAddress = ["10", randomInt(256), randomInt(256), randomInt(1, 255)].join(".");

/** A window of its own for a person who signs in anew, for tests that end sessions. */
export async function openAnew(browser: Browser, email: string): Promise<BrowserContext> {
  const context = await browser.newContext({ extraHTTPHeaders: { "x-forwarded-for": runAddress } });
  await signInAs(await context.newPage(), email);
  return context;
}

/** What the browser of a signed-in person keeps. Signs in once for all tests that leave the session alone. */
async function stateOf(browser: Browser, email: string): Promise<State> {
  const known = kept.get(email);
  if (known) return known;
  const context = await openAnew(browser, email);
  const state = await context.storageState();
  await context.close();
  kept.set(email, state);
  return state;
}

/** A window in which the person is signed in already; nobody is without an address. */
export async function openAs(
  browser: Browser,
  email: string | null,
  options: BrowserContextOptions = {},
): Promise<BrowserContext> {
  if (email === null) return browser.newContext(options);
  return browser.newContext({ ...options, storageState: await stateOf(browser, email) });
}
