import { existsSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline/promises";
import { root } from "./machine.mjs";
import { clusterFolder, isRunning, removeCluster, stopCluster } from "./postgres.mjs";

const folder = join(root, ".local");

async function isSure() {
  if (process.argv.includes("--yes")) return true;
  const ask = createInterface({ input: process.stdin, output: process.stdout });
  const answer = await ask.question(
    "This deletes every claim, file and mail of this checkout. Type yes to go on: ",
  );
  ask.close();
  return answer.trim() === "yes";
}

const pidFile = join(folder, "run", "start.pid");
if (existsSync(pidFile)) {
  const { pid } = JSON.parse(readFileSync(pidFile, "utf8"));
  try {
    process.kill(pid, 0);
    process.stdout.write(`Partproof is running (process ${pid}). Stop it first.\n`);
    process.exit(1);
  } catch {
    // Nothing runs any more.
  }
}
if (await isSure()) {
  const cluster = clusterFolder();
  if (isRunning(cluster)) stopCluster(cluster);
  removeCluster(cluster);
  for (const name of ["store", "mail", "log", "run", "people.json", "secrets.json"])
    rmSync(join(folder, name), { recursive: true, force: true });
  process.stdout.write("Everything is gone. npm start makes it anew.\n");
} else process.stdout.write("Nothing was changed.\n");
