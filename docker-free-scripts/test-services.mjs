import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { environmentFor, freshForTest } from "./environment.mjs";
import { makeCluster, prepareDatabase, removeCluster, startCluster, stopCluster } from "./postgres.mjs";
import { Processes } from "./processes.mjs";
import { anyFreePort, step } from "./report.mjs";
import { fillDatabase, startFakes } from "./services.mjs";

const showDeath = (name, code, log) =>
  process.stderr.write(
    `${name} stopped by itself (code ${code}):\n${readFileSync(log, "utf8").slice(-2000)}\n`,
  );

/** Ends a command that is told to stop only after it has cleaned up. */
export function cleanOnSignal(clean) {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
    process.on(signal, () => clean().then(() => process.exit(130)));
}

/** The day the demo is reckoned back from wherever something is tried, so that every run sees the same claims. */
const TODAY = "2026-11-30";

/**
 * What anything that tries the product needs, on free ports and gone afterwards: a cluster, the store and the mail
 * catcher; with `withDemo` also the migrated database with the demo in it. `changes` go into the environment. `clean` may
 * be called at any moment and more than once.
 */
export function testServices({ withDemo = false, changes = {} } = {}) {
  const folder = mkdtempSync(join(tmpdir(), "partproof-test-"));
  const cluster = `/var/tmp/partproof-test-${process.pid}`;
  const processes = new Processes(join(folder, "log"), showDeath);
  let cleaned;

  const cleanOnce = async () => {
    await processes.stop();
    stopCluster(cluster);
    removeCluster(cluster);
    rmSync(folder, { recursive: true, force: true });
  };

  // Whoever comes second waits for the first: a command must not end in the middle of it.
  const clean = () => (cleaned ??= cleanOnce());

  const start = async () => {
    const ports = {};
    for (const name of ["web", "postgres", "store", "smtp", "mailbox"]) ports[name] = await anyFreePort();
    const secrets = freshForTest();
    const environment = { ...environmentFor({ secrets, ports, folder }), ...changes };
    const admin = Object.assign(new URL(environment.DATABASE_URL_ADMIN), { pathname: "/postgres" }).href;
    await step("PostgreSQL", () => {
      makeCluster(cluster, secrets.admin);
      startCluster(cluster, ports.postgres, { durable: false });
      return cluster;
    });
    await step("Store and mail catcher", () => startFakes(processes, environment));
    if (withDemo) await fillDatabase(environment, secrets, { today: TODAY });
    else await step("Database roles", () => prepareDatabase(admin, secrets));
    return { environment, ports };
  };

  return { start, clean, processes, folder };
}
