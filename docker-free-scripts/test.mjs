// npm test [-- --only=static,unit,database,browser] [file filters for the runners]
import { spawn } from "node:child_process";
import { once } from "node:events";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { only } from "./environment.mjs";
import { checkNode, needModules, needPackages, root } from "./machine.mjs";
import { step, Stop } from "./report.mjs";

const PARTS = ["static", "unit", "database", "browser"];

const wanted =
  process.argv
    .find((arg) => arg.startsWith("--only="))
    ?.slice("--only=".length)
    .split(",") ?? PARTS;
const filters = process.argv.slice(2).filter((arg) => !arg.startsWith("--only="));
const wants = (part) => wanted.includes(part);

const total = { passed: 0, failed: 0 };
const add = ({ passed, failed }) => {
  total.passed += passed;
  total.failed += failed;
};

const folder = mkdtempSync(join(tmpdir(), "partproof-test-"));
const reportOf = (name) => join(folder, `${name}.json`);

/** Runs a test runner to its end and counts from its report; no report at all is one failure. */
async function runTests({ name, args, env, count }) {
  const run = spawn(process.execPath, args, { cwd: root, env, stdio: ["ignore", "inherit", "inherit"] });
  const [status] = await once(run, "close");
  const report = reportOf(name);
  const counted = existsSync(report)
    ? count(JSON.parse(readFileSync(report, "utf8")))
    : { passed: 0, failed: 1 };
  if (status !== 0 && counted.failed === 0) counted.failed = 1;
  add(counted);
  return `${counted.passed} passed, ${counted.failed} failed`;
}

const ofVitest = ({ numPassedTests, numFailedTests, numFailedTestSuites, success }) => ({
  passed: numPassedTests,
  failed: numFailedTests || (success ? 0 : Math.max(1, numFailedTestSuites)),
});
// A test that never ran because an earlier one failed is not a pass.
const ofPlaywright = ({ stats }) => ({
  passed: stats.expected,
  failed: stats.unexpected + stats.flaky + stats.skipped,
});

const runVitest = (name, env) =>
  runTests({
    name,
    env,
    count: ofVitest,
    args: [
      join(root, "node_modules/vitest/vitest.mjs"),
      ...["run", "--project", name, "--reporter", "default", "--reporter", "json"],
      `--outputFile.json=${reportOf(name)}`,
      ...filters,
    ],
  });

async function runWithoutServices() {
  const { makeRouteTypes, runStatic } = await import("./check.mjs");
  const { staticSteps } = await import("./static-steps.mjs");
  if (wants("static")) {
    await makeRouteTypes();
    add(await runStatic(staticSteps()));
  }
}

const runUnit = async () =>
  wants("unit") && step("Unit tests", () => runVitest("unit", { ...process.env, NODE_NO_WARNINGS: "1" }));

/** What the web said of its own faults: the first thing wanted after a failure. */
function printFaults(log) {
  const faults = readFileSync(log, "utf8")
    .split("\n")
    .filter((line) => /"level":"error"|Error:/.test(line));
  if (faults.length > 0) process.stdout.write(`Faults of the web:\n${faults.slice(-20).join("\n")}\n`);
}

async function runInBrowser({ processes, ports, environment, log }) {
  const { nextArgs, workerArgs } = await import("./services.mjs");
  const { waitFor } = await import("./processes.mjs");
  const { needBuild } = await import("./build.mjs");
  const web = { ...only(environment, "web"), NODE_ENV: "production" };
  await step("Build", () => needBuild(web));
  await step("Web and worker", async () => {
    processes.start("worker", workerArgs(), only(environment, "worker"));
    processes.start("web", nextArgs("start", ports.web), web);
    await waitFor(`http://127.0.0.1:${ports.web}/api/v1/ready`);
  });
  const env = {
    ...process.env,
    ...environment,
    BROWSER_REPORT: reportOf("browser"),
  };
  const args = [join(root, "node_modules/@playwright/test/cli.js"), "test", ...filters];
  await step("Browser tests", () => runTests({ name: "browser", args, env, count: ofPlaywright }));
  if (total.failed > 0) printFaults(log);
}

/** The tests that need a database, the store and the mail catcher: their own, on free ports, gone afterwards. */
async function runWithServices() {
  const { cleanOnSignal, testServices } = await import("./test-services.mjs");
  const changes = { TEST_LOCALES: "1", TZ: "Asia/Kathmandu" };
  const { start, clean, processes, folder: log } = testServices({ withDemo: true, changes });
  cleanOnSignal(clean);
  try {
    const { environment, ports } = await start();
    if (wants("database"))
      await step("Database and route tests", () => runVitest("database", { ...process.env, ...environment }));
    // One browser leaves a core idle: what needs no service is done beside it.
    await Promise.all([
      runUnit(),
      wants("browser") && runInBrowser({ processes, ports, environment, log: join(log, "log", "web.log") }),
    ]);
  } finally {
    await clean();
  }
}

async function main() {
  await step("Node", checkNode);
  await step("Debian packages", () => needPackages("postgresql", "chromium"));
  await step("npm packages", needModules);
  await runWithoutServices();
  if (wants("database") || wants("browser")) await runWithServices();
  else await runUnit();
}

main()
  .catch((fault) => {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    total.failed += 1;
  })
  .finally(() => {
    rmSync(folder, { recursive: true, force: true });
    process.stdout.write(`${total.passed} passed, ${total.failed} failed\n`);
    process.exit(total.failed === 0 && total.passed > 0 ? 0 : 1);
  });
