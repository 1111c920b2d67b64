import { execFileSync, spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { Stop } from "./report.mjs";

export const root = new URL("..", import.meta.url).pathname.replace(/\/$/, "");
export const isRoot = process.getuid?.() === 0;

/** Node 20 is what every pinned version was tried on. */
export function checkNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major !== 20 || minor < 9)
    throw new Stop(`Node ${process.versions.node} is running; Partproof needs Node 20.9 or a later 20.`);
  return `Node ${process.versions.node}`;
}

/** Debian packages by the file that proves them. */
const PACKAGES = {
  postgresql: { needs: ["postgresql", "postgresql-contrib"], has: () => postgresBin() !== null },
  chromium: { needs: ["chromium"], has: () => existsSync("/usr/bin/chromium") },
};

/** The folder of the highest installed PostgreSQL from 15 up, or null. */
export function postgresBin() {
  for (let version = 30; version >= 15; version -= 1) {
    const folder = `/usr/lib/postgresql/${version}/bin`;
    if (existsSync(join(folder, "postgres"))) return folder;
  }
  return null;
}

/** Installs what is missing as root; otherwise stops with the one command to run. */
export function needPackages(...names) {
  const missing = names.filter((name) => !PACKAGES[name].has());
  if (missing.length === 0) return "all there";
  const packages = missing.flatMap((name) => PACKAGES[name].needs);
  const command = `apt-get update && apt-get install -y --no-install-recommends -o DPkg::Lock::Timeout=300 ${packages.join(" ")}`;
  if (!isRoot)
    throw new Stop(
      `Debian packages are missing. Run this once, then the same again:\n  sudo sh -c '${command}'`,
    );
  process.stdout.write(`Installing ${packages.join(", ")} from Debian; this takes a minute or more\n`);
  const run = spawnSync("sh", ["-c", command], {
    encoding: "utf8",
    maxBuffer: 64e6,
    env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
  });
  // A package may be in place although something beside it was not: what counts is the file.
  if (run.status !== 0 || names.some((name) => !PACKAGES[name].has())) {
    const said = `${run.stdout ?? ""}${run.stderr ?? ""}`.trim().split("\n").slice(-15).join("\n");
    throw new Stop(
      `Debian's packages could not be installed:\n${said}\nRun this by hand to see more:\n  ${command}`,
    );
  }
  return `installed ${packages.join(", ")}`;
}

/** Installs the npm packages when the lock file is not the one they were installed from. */
export function needModules() {
  const hash = createHash("sha256")
    .update(readFileSync(join(root, "package-lock.json")))
    .digest("hex");
  const mark = join(root, "node_modules", ".partproof-lock");
  if (existsSync(mark) && readFileSync(mark, "utf8") === hash) return "unchanged";
  execFileSync("npm", ["ci", "--no-audit", "--no-fund", "--no-update-notifier", "--loglevel=error"], {
    cwd: root,
    stdio: ["ignore", "ignore", "inherit"],
  });
  writeFileSync(mark, hash);
  return "installed";
}
