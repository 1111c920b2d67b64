import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { environmentFor, freshForTest } from "./environment.mjs";
import { makeCluster, prepareDatabase, removeCluster, startCluster, stopCluster } from "./postgres.mjs";
import { Processes } from "./processes.mjs";
import { anyFreePort, step } from "./report.mjs";
import { startFakes } from "./services.mjs";

const showDeath = (name, code, log) =>
  process.stderr.write(
    `${name} stopped by itself (code ${code}):\n${readFileSync(log, "utf8").slice(-2000)}\n`,
  );

/**
 * What the database tests need, on free ports and gone afterwards: a cluster without a database of the product, the store
 * and the mail catcher. `clean` may be called at any moment and more than once.
 */
export function testServices() {
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
    const ports = {
      web: await anyFreePort(),
      postgres: await anyFreePort(),
      store: await anyFreePort(),
      smtp: await anyFreePort(),
      mailbox: await anyFreePort(),
    };
    const secrets = freshForTest();
    const environment = environmentFor({ secrets, ports, folder });
    const admin = Object.assign(new URL(environment.DATABASE_URL_ADMIN), { pathname: "/postgres" }).href;
    await step("PostgreSQL", () => {
      makeCluster(cluster, secrets.admin);
      startCluster(cluster, ports.postgres, { durable: false });
      return cluster;
    });
    await step("Store and mail catcher", () => startFakes(processes, environment));
    await step("Database roles", () => prepareDatabase(admin, secrets));
    return environment;
  };

  return { start, clean };
}
