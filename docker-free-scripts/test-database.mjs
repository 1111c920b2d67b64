import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { environmentFor, freshForTest } from "./environment.mjs";
import { root } from "./machine.mjs";
import { makeCluster, prepareDatabase, removeCluster, startCluster, stopCluster } from "./postgres.mjs";
import { Processes } from "./processes.mjs";
import { anyFreePort, step, Stop } from "./report.mjs";
import { startFakes } from "./services.mjs";

// The database and route tests alone, on a cluster of their own: `node docker-free-scripts/test-database.mjs [filters]`.
// What follows is handed to the test runner: file filters, `-t` and a name, or `-u` to write the committed dump anew.

const folder = mkdtempSync(join(tmpdir(), "partproof-test-"));
const cluster = `/var/tmp/partproof-test-${process.pid}`;
const processes = new Processes(join(folder, "log"), (name, code, log) =>
  process.stderr.write(
    `${name} stopped by itself (code ${code}):\n${readFileSync(log, "utf8").slice(-2000)}\n`,
  ),
);

let isCleaned = false;
async function clean() {
  if (isCleaned) return;
  isCleaned = true;
  await processes.stop();
  stopCluster(cluster);
  removeCluster(cluster);
  rmSync(folder, { recursive: true, force: true });
}
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
  process.on(signal, () => clean().then(() => process.exit(130)));

async function main() {
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
  const vitest = join(root, "node_modules/vitest/vitest.mjs");
  const run = spawnSync(
    process.execPath,
    [vitest, "run", "--project", "database", ...process.argv.slice(2)],
    {
      cwd: root,
      env: { ...process.env, ...environment, TZ: "Asia/Kathmandu" },
      stdio: ["ignore", "inherit", "inherit"],
    },
  );
  return run.status ?? 1;
}

main()
  .catch((fault) => {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    return 1;
  })
  .then(async (code) => {
    await clean();
    process.exit(code);
  });
