// npm run bench: costs as ratios to a yardstick of the same run, on a database and a store of their own.
import { spawnSync } from "node:child_process";
import { only } from "./environment.mjs";
import { checkNode, needModules, needPackages, root } from "./machine.mjs";
import { step, Stop } from "./report.mjs";
import { cleanOnSignal, testServices } from "./test-services.mjs";
import { tsxArgs } from "./tsx.mjs";

const services = testServices({ withDemo: true });
cleanOnSignal(services.clean);

async function main() {
  await step("Node", checkNode);
  await step("Debian packages", () => needPackages("postgresql"));
  await step("npm packages", needModules);
  const { environment } = await services.start();
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
    await services.clean();
    process.exit(code);
  });
