import type { Page } from "@playwright/test";
import { axe, test } from "./fixtures";

const PLAIN = '<!doctype html><html lang="en"><title>Plain</title><main><h1>Plain</h1></main></html>';

/** Opens a page that no server has to serve. */
async function open(page: Page, body: string, headers: Record<string, string> = {}): Promise<void> {
  await page.route("**/*", (route) => route.fulfill({ contentType: "text/html", body, headers }));
  await page.goto("/made-up");
}

// A watch that never barks proves nothing: each of these must fail, and the run fails if one of them passes.
test.describe("the watch over every browser test", () => {
  test("passes a plain page", async ({ page }) => {
    await open(page, PLAIN);
    await axe(page);
  });

  test.fail("hears an error in the console", async ({ page }) => {
    await open(page, `${PLAIN}<script>console.error("something is wrong")</script>`);
  });

  test.fail("hears a warning in the console", async ({ page }) => {
    await open(page, `${PLAIN}<script>console.warn("something is odd")</script>`);
  });

  test.fail("hears an uncaught error", async ({ page }) => {
    await open(page, `${PLAIN}<script>setTimeout(() => { throw new Error("thrown") })</script>`);
    await page.waitForTimeout(200);
  });

  test.fail("hears a breach of the content policy", async ({ page }) => {
    await open(page, `${PLAIN}<script>document.title = "ran"</script>`, {
      "content-security-policy": "script-src 'none'",
    });
  });

  test.fail("sees a request to a foreign host", async ({ page }) => {
    await open(page, `${PLAIN}<link rel="stylesheet" href="http://elsewhere.test/a.css">`);
  });

  test.fail("sees a second window as well", async ({ page, context }) => {
    await open(page, PLAIN);
    const second = await context.newPage();
    await open(second, `${PLAIN}<script>console.error("something is wrong")</script>`);
  });

  test.fail("sees a context the test opened itself", async ({ browser, baseURL, watch }) => {
    const context = await browser.newContext({ baseURL });
    await watch(context);
    await open(await context.newPage(), `${PLAIN}<script>console.error("something is wrong")</script>`);
    await context.close();
  });

  test.fail("finds an input without a name", async ({ page }) => {
    await open(page, PLAIN.replace("</main>", '<input type="text"></main>'));
    await axe(page);
  });

  test.fail("finds text too faint to read", async ({ page }) => {
    await open(page, PLAIN.replace("</main>", '<p style="color:#bbb;background:#fff">Faint</p></main>'));
    await axe(page);
  });

  test.describe("with a line it was told to expect", () => {
    test.use({ expectedConsole: [/status of 404/] });
    test("passes", async ({ page }) => {
      await open(page, `${PLAIN}<script>console.error("the server responded with a status of 404")</script>`);
    });
  });
});
