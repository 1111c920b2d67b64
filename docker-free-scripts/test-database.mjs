import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { root } from "./machine.mjs";
import { Stop } from "./report.mjs";
import { cleanOnSignal, testServices } from "./test-services.mjs";

// The database and route tests alone, on a cluster of their own: `node docker-free-scripts/test-database.mjs [filters]`.
// What follows is handed to the test runner: file filters, `-t` and a name, or `-u` to write the committed dump anew.

const services = testServices();
cleanOnSignal(services.clean);

async function main() {
  const { environment } = await services.start();
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
    await services.clean();
    process.exit(code);
  });
