import { spawn, spawnSync } from "node:child_process";
import { join } from "node:path";
import { needModules, root } from "./machine.mjs";
import { step } from "./report.mjs";
import { staticSteps } from "./static-steps.mjs";

/** Runs a program and keeps what it says until it is done. */
export const runQuietly = (command, args, env = process.env) =>
  new Promise((resolve) => {
    const started = performance.now();
    const child = spawn(command, args, { cwd: root, env });
    const said = [];
    for (const stream of [child.stdout, child.stderr]) stream.on("data", (data) => said.push(data));
    child.once("close", (code) =>
      resolve({
        code: code ?? 1,
        said: Buffer.concat(said).toString("utf8"),
        seconds: ((performance.now() - started) / 1000).toFixed(1),
      }),
    );
  });

/** The checks that need no service, two at a time. Prints a line each, and what a failing one said. */
export async function runStatic(steps) {
  let failed = 0;
  const queue = [...steps];
  const lane = async () => {
    for (let next = queue.shift(); next; next = queue.shift()) {
      const { code, said, seconds } = await runQuietly(next.command, next.args);
      process.stdout.write(`${next.name}: ${code === 0 ? "passed" : "FAILED"} (${seconds} s)\n`);
      if (code !== 0) {
        failed += 1;
        process.stdout.write(`${said}\n`);
      }
    }
  };
  await Promise.all([lane(), lane()]);
  return { passed: steps.length - failed, failed };
}

/** Types of the pages' addresses, which the compiler wants before it can judge a link. */
export const makeRouteTypes = () =>
  step("Route types", () => {
    spawnSync(process.execPath, [join(root, "node_modules/next/dist/bin/next"), "typegen"], { cwd: root });
  });

if (process.argv[1]?.endsWith("check.mjs")) {
  await step("npm packages", needModules);
  await makeRouteTypes();
  const { failed } = await runStatic(staticSteps({ withUnit: true }));
  process.exit(failed === 0 ? 0 : 1);
}
