import { join } from "node:path";
import { needBuild } from "../build.mjs";
import { only } from "../environment.mjs";
import { waitFor } from "../processes.mjs";
import { anyFreePort, step, Stop } from "../report.mjs";
import { nextArgs, workerArgs } from "../services.mjs";
import { testServices } from "../test-services.mjs";

/**
 * The product as it is built, with the demo in it, to be reached through a proxy at `front`. `startWeb` starts one more
 * web and gives its port and its process; `clean` ends everything.
 */
export async function openProduct() {
  const front = await anyFreePort();
  const home = `http://localhost:${front}`;
  const services = testServices({ withDemo: true, changes: { PUBLIC_URL: home, NEXTAUTH_URL: home } });
  const clean = services.clean;
  try {
    const { environment } = await services.start();
    const web = { ...only(environment, "web"), NODE_ENV: "production" };
    await step("Build", () => needBuild(web));
    const worker = services.processes.start("worker", workerArgs(), only(environment, "worker"));
    const startWeb = async (port) => {
      const taken = port ?? (await anyFreePort());
      const child = services.processes.start(`web-${taken}`, nextArgs("start", taken), web);
      await waitFor(`http://127.0.0.1:${taken}/api/v1/ready`);
      return { port: taken, child };
    };
    const logOf = (port) => join(services.folder, "log", `web-${port}.log`);
    return {
      front,
      home,
      environment,
      worker,
      startWeb,
      logOf,
      clean,
      processes: services.processes,
      folder: services.folder,
    };
  } catch (fault) {
    await clean();
    throw fault;
  }
}

const cookiesOf = (answer) => answer.headers.getSetCookie().map((cookie) => cookie.split(";")[0]);

/** Signs a person of the demo in and gives the cookies of their browser. */
export async function signIn(home, email, password) {
  const token = await fetch(`${home}/api/auth/csrf`);
  const { csrfToken } = await token.json();
  const answer = await fetch(`${home}/api/auth/callback/credentials`, {
    method: "POST",
    redirect: "manual",
    headers: { cookie: cookiesOf(token).join("; "), origin: home },
    body: new URLSearchParams({ csrfToken, email, password, json: "true" }),
  });
  const cookie = cookiesOf(answer).find((one) => one.includes("session="));
  if (!cookie) throw new Stop(`${email} could not sign in: ${answer.status}`);
  return cookie;
}
