import AxeBuilder from "@axe-core/playwright";
import { expect, test as base, type BrowserContext, type Page } from "@playwright/test";
import { z } from "zod";

const WCAG_22_AA = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

type Watched = {
  /** Console lines a test expects, such as the browser's own line about an answer of 404. */
  readonly expectedConsole: readonly RegExp[];
  readonly watch: (context: BrowserContext) => Promise<void>;
  readonly watched: void;
};

const setting = (name: string): string => {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: run the tests with npm test`);
  return value;
};

/** Whether a request leaves the product: another host or port, over any protocol that has one. */
const isForeign = (address: string, home: string): boolean => {
  const { host, protocol } = new URL(address);
  return protocol !== "data:" && protocol !== "blob:" && host !== new URL(home).host;
};

/** Writes down what must not happen on any page of a context, of whichever window. */
async function noteFaults(context: BrowserContext, home: string, faults: string[]): Promise<void> {
  // A blocked script or style is told to the page alone; the console is where it can be heard.
  await context.addInitScript(() => {
    document.addEventListener("securitypolicyviolation", ({ violatedDirective, blockedURI }) =>
      console.error(`content policy: ${violatedDirective} blocked ${blockedURI}`),
    );
  });
  context.on("console", (line) => {
    if (["error", "warning"].includes(line.type())) faults.push(`console ${line.type()}: ${line.text()}`);
  });
  context.on("weberror", (fault) => faults.push(`uncaught: ${fault.error().message}`));
  context.on("request", (request) => {
    if (isForeign(request.url(), home)) faults.push(`foreign host: ${request.url()}`);
  });
  context.on("page", (page) =>
    page.on("websocket", (socket) => {
      if (isForeign(socket.url(), home)) faults.push(`foreign host: ${socket.url()}`);
    }),
  );
}

/**
 * The test of this project: it fails on any error or warning in the console, uncaught error, breach of the content
 * policy or request to a foreign host. `watch` does the same for a context the test opens itself.
 */
export const test = base.extend<Watched>({
  expectedConsole: [[], { option: true }],
  watch: async ({ baseURL, expectedConsole }, use) => {
    const faults: string[] = [];
    await use((context) => noteFaults(context, baseURL ?? "", faults));
    const unexpected = faults.filter((fault) => !expectedConsole.some((pattern) => pattern.test(fault)));
    expect(unexpected, "what the browser complained about").toEqual([]);
  },
  watched: [
    async ({ context, watch }, use) => {
      await watch(context);
      await use();
    },
    { auto: true },
  ],
});

export { expect };

/** The screen of a phone in the workshop. */
export const PHONE = { width: 360, height: 740 };

/** Signs a seeded person in through the form, and waits until their first page stands. */
export async function signInAs(page: Page, email: string): Promise<void> {
  await page.goto("/sign-in");
  await page.locator('input[name="email"]').fill(email);
  await page.locator('input[name="password"]').fill(setting("DEMO_PASSWORD"));
  await page.locator('form:has(input[name="password"]) button[type="submit"]').click();
  await page.waitForURL((url) => url.pathname !== "/sign-in");
}

/** Fails for anything on the page that breaks WCAG 2.2 at level A or AA, naming rule and element. */
export async function axe(page: Page): Promise<void> {
  const { violations, passes } = await new AxeBuilder({ page }).withTags(WCAG_22_AA).analyze();
  expect(passes.length, "axe looked at something").toBeGreaterThan(0);
  expect(
    violations.map(
      ({ id, help, nodes }) => `${id}: ${help}: ${nodes.map(({ target }) => target.join(" ")).join(", ")}`,
    ),
    "WCAG 2.2 AA",
  ).toEqual([]);
}

const mailShape = z.object({
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  html: z.string().nullable(),
});
export type CaughtMail = z.infer<typeof mailShape>;

/** The mails an address has been sent, as the mail catcher tells them. */
export async function mailsTo(address: string): Promise<CaughtMail[]> {
  const query = new URLSearchParams({ to: address });
  const answer = await fetch(`${setting("MAILBOX_URL")}/api/mails?${query}`);
  if (!answer.ok) throw new Error(`The mail catcher answered ${answer.status}`);
  return z.object({ mails: z.array(mailShape) }).parse(await answer.json()).mails;
}
