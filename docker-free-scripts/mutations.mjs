import { execFileSync, spawn } from "node:child_process";
import { cpSync, existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { root } from "./machine.mjs";
import { MUTATIONS } from "./mutations/index.mjs";
import { step, Stop } from "./report.mjs";
import { testServices } from "./test-services.mjs";

// The test of the tests: `npm run test:long [part of a name]`. Each defence of a table is taken away in a copy of the
// project, and the tests that guard it must then fail. Works in copies alone: the project itself is never changed.

const PROJECTS = ["unit", "database"];

const folder = mkdtempSync(join(tmpdir(), "partproof-mutations-"));
const services = testServices();
const running = new Set();

let cleaned;
// Whoever comes second waits for the first: a command must not end in the middle of it.
const clean = () => (cleaned ??= cleanOnce());
async function cleanOnce() {
  for (const { pid } of running) {
    try {
      process.kill(-pid, "SIGKILL");
    } catch {
      // Already gone.
    }
  }
  await services.clean();
  rmSync(folder, { recursive: true, force: true });
}
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
  process.on(signal, () => clean().then(() => process.exit(130)));

/** What is in the project, new files too, with the packages beside it: linked, or copied from another disk. */
function copyTo(target) {
  const listed = execFileSync("git", ["ls-files", "-z", "--cached", "--others", "--exclude-standard"], {
    cwd: root,
    encoding: "utf8",
  });
  for (const file of listed.split("\0")) {
    if (file !== "" && existsSync(join(root, file))) cpSync(join(root, file), join(target, file));
  }
  const modules = [join(root, "node_modules"), join(target, "node_modules")];
  try {
    execFileSync("cp", ["-al", ...modules], { stdio: "ignore" });
  } catch {
    rmSync(modules[1], { recursive: true, force: true });
    execFileSync("cp", ["-a", ...modules]);
  }
  // What the runner remembers of earlier runs would be shared through the links.
  for (const kept of [".vite", ".vite-temp", ".vitest"])
    rmSync(join(modules[1], kept), { recursive: true, force: true });
}

/** Runs the named test files of a copy; gives the exit code, every test with its outcome, and what was said. */
async function runTests(copy, project, filters, { env, bail }) {
  const report = join(folder, `${project}.json`);
  rmSync(report, { force: true });
  const args = ["run", "--project", project, "--reporter=json", `--outputFile=${report}`, `--bail=${bail}`];
  const child = spawn(process.execPath, [join(copy, "node_modules/vitest/vitest.mjs"), ...args, ...filters], {
    cwd: copy,
    // The bank test has a minute here, and seconds in `npm test`.
    env: { ...process.env, ...env, TZ: "Asia/Kathmandu", BANK_SECONDS: process.env.BANK_SECONDS ?? "60" },
    stdio: ["ignore", "pipe", "pipe"],
    detached: true,
  });
  running.add(child);
  let said = "";
  for (const stream of [child.stdout, child.stderr]) stream.on("data", (data) => (said += data));
  const code = await new Promise((resolve) => child.once("close", resolve));
  running.delete(child);
  const results = existsSync(report) ? JSON.parse(readFileSync(report, "utf8")).testResults : [];
  return { code, results, tests: results.flatMap((file) => file.assertionResults), said };
}

// What the runner throws where a test demanded something else; `rejects` and the property tests have words of their own.
const DENIAL =
  /AssertionError|Property failed after|promise (resolved|rejected) "|\(\) expects to receive|Snapshot .* mismatched/u;

/** The names of the tests that failed because something was not as they demand, not because something fell over. */
const deniedBy = (tests) =>
  tests
    .filter(({ status, failureMessages }) => {
      const fault = failureMessages?.join("\n") ?? "";
      return status === "failed" && DENIAL.test(fault);
    })
    .map(({ fullName }) => fullName);

/** Without a mutation every filter names a test file and every one is green; gives the filters of which that is not so. */
async function findRed(copy, project, { mutations, env }) {
  const filters = [...new Set(mutations.flatMap(({ tests }) => tests))];
  const run = await runTests(copy, project, filters, { env, bail: 0 });
  const isGreen = (filter) => {
    const files = run.results.filter(({ name }) => name.includes(filter));
    return files.length > 0 && files.every(({ status }) => status === "passed");
  };
  const failed = run.tests.filter(({ status }) => status === "failed").map(({ fullName }) => fullName);
  if (run.code !== 0) process.stdout.write(`Red without a mutation: ${failed.join("; ") || said(run)}\n`);
  process.stdout.write(`${run.tests.length} ${project} tests in ${run.results.length} files\n`);
  return filters.filter((filter) => !isGreen(filter));
}

async function tryMutation(copy, { file, from, to, tests, project }, env) {
  const path = join(copy, file);
  const text = readFileSync(path, "utf8");
  const found = text.split(from).length - 1;
  if (found !== 1) return { isFound: false, why: `the text to change stands in ${file} ${found} times` };
  writeFileSync(
    path,
    text.replace(from, () => to),
  );
  try {
    const run = await runTests(copy, project, tests, { env, bail: 1 });
    const denied = deniedBy(run.tests);
    if (denied.length > 0) return { isFound: true, why: denied[0] };
    if (run.code === 0) return { isFound: false, why: "every test passed" };
    const fell = run.tests.find(({ status }) => status === "failed");
    const why = fell ? `${fell.fullName}: ${fell.failureMessages.join(" ")}` : said(run);
    return { isFound: false, why: `fell over, no test denied it: ${why.slice(0, 600)}` };
  } finally {
    writeFileSync(path, text);
  }
}

const said = (run) =>
  [...run.results.map(({ message }) => message), run.said].filter(Boolean).join("\n").slice(0, 600);

const total = { found: 0, missed: 0 };

/** One copy, one project, one mutation after the other. */
async function runLane(project, mutations, env) {
  if (mutations.length === 0) return;
  const copy = join(folder, project);
  await step(`Copy for the ${project} tests`, () => copyTo(copy));
  let red = [];
  await step(`The ${project} tests without a mutation`, async () => {
    red = await findRed(copy, project, { mutations, env });
  });
  for (const mutation of mutations) {
    if (cleaned) return;
    const started = performance.now();
    const isRed = mutation.tests.some((filter) => red.includes(filter));
    const { isFound, why } = isRed
      ? { isFound: false, why: "its tests are missing, or fail without it" }
      : await tryMutation(copy, mutation, env);
    total[isFound ? "found" : "missed"] += 1;
    const seconds = ((performance.now() - started) / 1000).toFixed(1);
    const line = `${mutation.name}, check ${mutation.guarantee}, ${isFound ? "found" : "MISSED"}, ${seconds} s`;
    process.stdout.write(`${line}\n  ${isFound ? "by" : "because"}: ${why}\n`);
  }
}

async function main() {
  const wanted = process.argv.slice(2);
  const chosen = MUTATIONS.filter(
    ({ name }) => wanted.length === 0 || wanted.some((part) => name.includes(part)),
  );
  if (chosen.length === 0) throw new Stop(`No mutation is called ${wanted.join(", ")}.`);
  const lanes = PROJECTS.map((project) => chosen.filter((mutation) => mutation.project === project));
  const [unit, database] = lanes;
  const environment = database.length > 0 ? (await services.start()).environment : {};
  const ended = await Promise.allSettled([
    runLane("unit", unit, {}),
    runLane("database", database, environment),
  ]);
  for (const { reason } of ended) if (reason) throw reason;
}

main()
  .catch((fault) => {
    process.stderr.write(`${fault instanceof Stop ? fault.message : fault.stack}\n`);
    total.missed += 1;
  })
  .then(async () => {
    await clean();
    process.stdout.write(`${total.found} found, ${total.missed} missed\n`);
    process.exit(total.missed === 0 && total.found > 0 ? 0 : 1);
  });
