import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { environmentFor, only, secretsIn } from "./environment.mjs";
import { checkNode, needModules, needPackages, root } from "./machine.mjs";
import { needFreePort, step, Stop } from "./report.mjs";

const isDevelopment = process.argv.includes("--dev");
const folder = join(root, ".local");
const pidFile = join(folder, "run", "start.pid");

const port = (name, usual) => Number(process.env[name] ?? usual);
const ports = {
  web: port("PORT", 3000),
  postgres: port("PGPORT", 55432),
  store: port("STORE_PORT", 9400),
  smtp: port("SMTP_PORT", 9425),
  mailbox: port("MAILBOX_PORT", 9480),
};
const VARIABLE = {
  web: "PORT",
  postgres: "PGPORT",
  store: "STORE_PORT",
  smtp: "SMTP_PORT",
  mailbox: "MAILBOX_PORT",
};

const isAlive = (pid) => {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
};

/** Another start of this checkout is still running: say where, and leave it alone. */
function stopIfRunning() {
  if (!existsSync(pidFile)) return;
  const { pid, url } = JSON.parse(readFileSync(pidFile, "utf8"));
  if (!isAlive(pid)) return;
  process.stdout.write(`Partproof is already running at ${url} (process ${pid}). Ctrl-C there stops it.\n`);
  process.exit(0);
}

function printPeople(environment) {
  const people = existsSync(environment.PEOPLE_FILE)
    ? JSON.parse(readFileSync(environment.PEOPLE_FILE, "utf8"))
    : [];
  const width = Math.max(0, ...people.map(({ email }) => email.length));
  process.stdout.write(
    `\nPartproof is ready: ${environment.PUBLIC_URL}\n\nPeople of the demo, all with the password  ${environment.DEMO_PASSWORD}\n`,
  );
  for (const { email, name, organisation, roles } of people)
    process.stdout.write(`  ${email.padEnd(width)}  ${name}, ${organisation}: ${roles.join(", ")}\n`);
  process.stdout.write(`\nMails: ${environment.MAILBOX_URL}\nCtrl-C stops everything; the data stays.\n`);
}

async function main() {
  stopIfRunning();
  await step("Node", checkNode);
  await step("Debian packages", () => needPackages("postgresql"));
  await step("npm packages", needModules);
  // Only now are there packages to import.
  const { clusterFolder, isRunning, makeCluster, startCluster, stopCluster } = await import("./postgres.mjs");
  const { Processes, waitFor } = await import("./processes.mjs");
  const { fillDatabase, nextArgs, startFakes, workerArgs } = await import("./services.mjs");
  const { needBuild } = await import("./build.mjs");

  const secrets = secretsIn(folder);
  const environment = environmentFor({ secrets, ports, folder });
  const cluster = clusterFolder();
  if (isRunning(cluster)) stopCluster(cluster);
  for (const [name, number] of Object.entries(ports)) await needFreePort(number, VARIABLE[name]);
  // Mails, evidence and logs are for the owner of the checkout alone, on a machine others share too.
  for (const name of ["log", "mail", "run", "store"])
    mkdirSync(join(folder, name), { recursive: true, mode: 0o700 });
  writeFileSync(pidFile, JSON.stringify({ pid: process.pid, url: environment.PUBLIC_URL }));

  let exitCode = 0;
  let isLeaving = false;
  const processes = new Processes(join(folder, "log"), (name, code, log) => {
    process.stderr.write(`${name} stopped by itself (code ${code}). Its last words are in ${log}\n`);
    exitCode = 1;
    void leave();
  });
  const leave = async () => {
    if (isLeaving) return;
    isLeaving = true;
    await processes.stop();
    stopCluster(cluster);
    rmSync(pidFile, { force: true });
    process.exit(exitCode);
  };
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, leave);

  try {
    await step("PostgreSQL", () => {
      const made = makeCluster(cluster, secrets.admin);
      startCluster(cluster, ports.postgres);
      return `${made}, ${cluster}, port ${ports.postgres}`;
    });
    await step("Store and mail catcher", () => startFakes(processes, environment));
    await fillDatabase(environment, secrets);
    const web = only(environment, "web");
    if (!isDevelopment) await step("Build", () => needBuild({ ...web, NODE_ENV: "production" }));
    await step("Web and worker", async () => {
      processes.start("worker", workerArgs(), only(environment, "worker"));
      processes.start(
        "web",
        nextArgs(isDevelopment ? "dev" : "start", ports.web),
        { ...web, NODE_ENV: isDevelopment ? "development" : "production" },
        { isShown: isDevelopment },
      );
      await waitFor(`http://127.0.0.1:${ports.web}/api/v1/ready`);
    });
    printPeople(environment);
  } catch (fault) {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    exitCode = 1;
    await leave();
  }
}

main().catch((fault) => {
  process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
  process.exit(1);
});
