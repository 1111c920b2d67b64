// npm run bench: costs as ratios to a yardstick of the same run, on a database and a store of their own.
import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { environmentFor, freshForTest, only } from "./environment.mjs";
import { checkNode, needModules, needPackages, root } from "./machine.mjs";
import { makeCluster, removeCluster, startCluster, stopCluster } from "./postgres.mjs";
import { Processes } from "./processes.mjs";
import { anyFreePort, step, Stop } from "./report.mjs";
import { fillDatabase, startFakes } from "./services.mjs";
import { tsxArgs } from "./tsx.mjs";

/** The day the demo is reckoned back from, so that every run measures the same rows. */
const TODAY = "2026-11-30";

const folder = mkdtempSync(join(tmpdir(), "partproof-bench-"));
const cluster = `/var/tmp/partproof-bench-${process.pid}`;
const processes = new Processes(join(folder, "log"), (name, code, log) =>
  process.stderr.write(
    `${name} stopped by itself (code ${code}):\n${readFileSync(log, "utf8").slice(-2000)}\n`,
  ),
);

let isClean = false;
async function clean() {
  if (isClean) return;
  isClean = true;
  await processes.stop();
  stopCluster(cluster);
  removeCluster(cluster);
  rmSync(folder, { recursive: true, force: true });
}
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
  process.on(signal, () => clean().then(() => process.exit(130)));

async function main() {
  await step("Node", checkNode);
  await step("Debian packages", () => needPackages("postgresql"));
  await step("npm packages", needModules);
  const ports = {};
  for (const name of ["web", "postgres", "store", "smtp", "mailbox"]) ports[name] = await anyFreePort();
  const secrets = freshForTest();
  const environment = environmentFor({ secrets, ports, folder });
  await step("PostgreSQL", () => {
    makeCluster(cluster, secrets.admin);
    startCluster(cluster, ports.postgres, { durable: false });
    return cluster;
  });
  await step("Store and mail catcher", () => startFakes(processes, environment));
  await fillDatabase(environment, secrets, { today: TODAY });
  // The statements run with the web's rights; the rows in bulk are written as the superuser.
  const env = { ...only(environment, "web"), DATABASE_URL_ADMIN: environment.DATABASE_URL_ADMIN };
  const run = spawnSync(process.execPath, tsxArgs("bench/main.ts", ...process.argv.slice(2)), {
    cwd: root,
    env,
    stdio: ["ignore", "inherit", "inherit"],
  });
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
