import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { environmentFor, freshForTest, only } from "./environment.mjs";
import { checkNode, needModules, needPackages, root } from "./machine.mjs";
import { anyFreePort, step, Stop } from "./report.mjs";

/** The day the demo is reckoned back from in tests, so that every run sees the same claims. */
const TODAY = "2026-11-30";

const total = { passed: 0, failed: 0 };
const add = ({ passed, failed }) => {
  total.passed += passed;
  total.failed += failed;
};

const folder = mkdtempSync(join(tmpdir(), "partproof-test-"));
const reports = {
  unit: join(folder, "unit.json"),
  database: join(folder, "database.json"),
  browser: join(folder, "browser.json"),
};

/** Runs a test runner to its end and counts from its report; no report at all is one failure. */
function runTests(name, args, env, report, count) {
  const run = spawnSync(process.execPath, args, { cwd: root, env, stdio: ["ignore", "inherit", "inherit"] });
  const counted = existsSync(report)
    ? count(JSON.parse(readFileSync(report, "utf8")))
    : { passed: 0, failed: 1 };
  if (run.status !== 0 && counted.failed === 0) counted.failed = 1;
  add(counted);
  return `${counted.passed} passed, ${counted.failed} failed`;
}

const ofVitest = ({ numPassedTests, numFailedTests, numFailedTestSuites, success }) => ({
  passed: numPassedTests,
  failed: numFailedTests || (success ? 0 : Math.max(1, numFailedTestSuites)),
});
const ofPlaywright = ({ stats }) => ({ passed: stats.expected + stats.flaky, failed: stats.unexpected });

const vitest = (project, report) => [
  join(root, "node_modules/vitest/vitest.mjs"),
  "run",
  "--project",
  project,
  "--reporter",
  "default",
  "--reporter",
  "json",
  `--outputFile.json=${report}`,
];

async function main() {
  await step("Node", checkNode);
  await step("Debian packages", () => needPackages("postgresql", "chromium"));
  await step("npm packages", needModules);
  const { makeCluster, startCluster, stopCluster, removeCluster } = await import("./postgres.mjs");
  const { Processes, waitFor } = await import("./processes.mjs");
  const { fillDatabase, nextArgs, startFakes, workerArgs } = await import("./services.mjs");
  const { needBuild } = await import("./build.mjs");
  const { runStatic } = await import("./check.mjs");
  const { staticSteps } = await import("./static-steps.mjs");

  const ports = {
    web: await anyFreePort(),
    postgres: await anyFreePort(),
    store: await anyFreePort(),
    smtp: await anyFreePort(),
    mailbox: await anyFreePort(),
  };
  const secrets = freshForTest();
  const environment = {
    ...environmentFor({ secrets, ports, folder }),
    TEST_LOCALES: "1",
    TZ: "Asia/Kathmandu",
  };
  const cluster = `/var/tmp/partproof-test-${process.pid}`;
  const processes = new Processes(join(folder, "log"), (name, code, log) =>
    process.stderr.write(
      `${name} stopped by itself (code ${code}):\n${readFileSync(log, "utf8").slice(-2000)}\n`,
    ),
  );

  let cleaned = false;
  const clean = async () => {
    if (cleaned) return;
    cleaned = true;
    await processes.stop();
    stopCluster(cluster);
    removeCluster(cluster);
    rmSync(folder, { recursive: true, force: true });
  };
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
    process.on(signal, () => clean().then(() => process.exit(130)));

  try {
    await step("Route types", () => {
      spawnSync(process.execPath, [join(root, "node_modules/next/dist/bin/next"), "typegen"], {
        cwd: root,
        env: { ...process.env, ...environment },
      });
    });
    add(await runStatic(staticSteps()));
    await step("Unit tests", () =>
      runTests(
        "unit",
        vitest("unit", reports.unit),
        { ...process.env, NODE_NO_WARNINGS: "1" },
        reports.unit,
        ofVitest,
      ),
    );
    await step("PostgreSQL", () => {
      makeCluster(cluster, secrets.admin);
      startCluster(cluster, ports.postgres, { durable: false });
      return cluster;
    });
    await step("Store and mail catcher", () => startFakes(processes, environment));
    await fillDatabase(environment, secrets, { today: TODAY });
    const testEnv = { ...process.env, ...environment };
    await step("Database and route tests", () =>
      runTests("database", vitest("database", reports.database), testEnv, reports.database, ofVitest),
    );
    const web = { ...only(environment, "web"), NODE_ENV: "production" };
    await step("Build", () => needBuild(web));
    await step("Web and worker", async () => {
      processes.start("worker", workerArgs(), only(environment, "worker"));
      processes.start("web", nextArgs("start", ports.web), web);
      await waitFor(`http://127.0.0.1:${ports.web}/api/v1/ready`);
    });
    await step("Browser tests", () =>
      runTests(
        "browser",
        [join(root, "node_modules/@playwright/test/cli.js"), "test"],
        { ...testEnv, BROWSER_REPORT: reports.browser, WEB_LOG: join(folder, "log", "web.log") },
        reports.browser,
        ofPlaywright,
      ),
    );
  } catch (fault) {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    total.failed += 1;
  } finally {
    await clean();
  }
}

main()
  .catch((fault) => {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    total.failed += 1;
  })
  .finally(() => {
    process.stdout.write(`${total.passed} passed, ${total.failed} failed\n`);
    process.exit(total.failed === 0 && total.passed > 0 ? 0 : 1);
  });
