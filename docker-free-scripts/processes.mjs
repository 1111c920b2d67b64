import { spawn } from "node:child_process";
import { createWriteStream, mkdirSync } from "node:fs";
import { join } from "node:path";
import { root } from "./machine.mjs";
import { Stop } from "./report.mjs";

/** The processes one command started; stopped in the reverse order, each given time to finish what it is doing. */
export class Processes {
  running = [];
  isStopping = false;

  constructor(logFolder, onDeath) {
    mkdirSync(logFolder, { recursive: true });
    this.logFolder = logFolder;
    this.onDeath = onDeath;
  }

  /** Starts a program of the project. Its output goes to a log, and to the screen where `isShown`. */
  start(name, args, env, { isShown = false } = {}) {
    const child = spawn(process.execPath, args, {
      cwd: root,
      env,
      stdio: ["ignore", "pipe", "pipe"],
      detached: true,
    });
    const log = createWriteStream(join(this.logFolder, `${name}.log`), { flags: "a" });
    for (const stream of [child.stdout, child.stderr]) {
      stream.pipe(log);
      if (isShown) stream.on("data", (data) => process.stdout.write(data));
    }
    const gone = new Promise((resolve) => child.once("exit", resolve));
    child.once("exit", (code) => {
      if (!this.isStopping) this.onDeath(name, code, join(this.logFolder, `${name}.log`));
    });
    this.running.push({ name, child, gone });
    return child;
  }

  async stop() {
    this.isStopping = true;
    for (const { child, gone } of this.running.reverse()) {
      if (child.exitCode !== null) continue;
      const signal = (name) => {
        try {
          process.kill(-child.pid, name);
        } catch {
          // Already gone.
        }
      };
      signal("SIGTERM");
      const timer = setTimeout(() => signal("SIGKILL"), 15_000);
      await gone;
      clearTimeout(timer);
    }
    this.running = [];
  }
}

/** Waits until an address answers as wanted. Throws Stop with what it last said. */
export async function waitFor(url, { seconds = 90, isGood = (response) => response.ok } = {}) {
  let last = "no answer";
  for (const end = Date.now() + seconds * 1000; Date.now() < end;) {
    try {
      const response = await fetch(url, { redirect: "manual" });
      if (isGood(response)) return;
      last = `${response.status} ${(await response.text()).slice(0, 300)}`;
    } catch (fault) {
      last = fault.cause?.code ?? fault.message;
    }
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
  throw new Stop(`${url} did not answer as it should within ${seconds} s: ${last}`);
}
