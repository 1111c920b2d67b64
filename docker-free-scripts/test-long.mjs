// npm run test:long [-- restart | shared-cache | part of the name of a mutation]
import { spawn } from "node:child_process";
import { join } from "node:path";
import { missingNginx } from "./long/nginx.mjs";
import { restart } from "./long/restart.mjs";
import { sharedCache } from "./long/shared-cache.mjs";
import { root } from "./machine.mjs";
import { step, Stop } from "./report.mjs";

// What takes minutes: the product behind a proxy, and the test of the tests, which counts for itself.

const BEHIND_A_PROXY = { restart, "shared-cache": sharedCache };
const wanted = process.argv.slice(2);
const total = { passed: 0, failed: 0, notRun: 0 };

let clean = async () => {};
for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"])
  process.on(signal, () => clean().then(() => process.exit(130)));

async function runBehindAProxy(name, run) {
  const missing = missingNginx();
  if (missing) {
    total.notRun += 1;
    process.stdout.write(`${name}: NOT RUN, ${missing}\n`);
    return;
  }
  try {
    await step(name, async () => {
      const { passed, failed } = await run((ending) => (clean = ending));
      total.passed += passed;
      total.failed += failed;
      return `${passed} held, ${failed} broken`;
    });
  } catch (fault) {
    total.failed += 1;
    process.stderr.write(`${name}: ${fault instanceof Stop ? fault.message : fault.stack}\n`);
  }
}

/** The mutations, which print what they found; one failure more where they end badly. */
async function runMutations(names) {
  const child = spawn(process.execPath, [join(root, "docker-free-scripts/mutations.mjs"), ...names], {
    stdio: "inherit",
  });
  clean = () => new Promise((resolve) => child.once("exit", resolve));
  const code = await new Promise((resolve) => child.once("exit", resolve));
  total[code === 0 ? "passed" : "failed"] += 1;
}

const parts = Object.entries(BEHIND_A_PROXY).filter(([name]) => wanted.length === 0 || wanted.includes(name));
for (const [name, run] of parts) await runBehindAProxy(name, run);
const mutations = wanted.filter((name) => !(name in BEHIND_A_PROXY));
if (wanted.length === 0 || mutations.length > 0) await runMutations(mutations);

const notRun = total.notRun > 0 ? `, ${total.notRun} NOT RUN` : "";
process.stdout.write(`${total.passed} passed, ${total.failed} failed${notRun}\n`);
process.exit(total.failed + total.notRun === 0 && total.passed > 0 ? 0 : 1);
