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
  const command = `apt-get update && apt-get install -y --no-install-recommends ${packages.join(" ")}`;
  if (!isRoot)
    throw new Stop(
      `Debian packages are missing. Run this once, then start again:\n  sudo sh -c '${command}'`,
    );
  const run = spawnSync("sh", ["-c", command], {
    stdio: ["ignore", "ignore", "inherit"],
    env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
  });
  if (run.status !== 0)
    throw new Stop(`Debian's packages could not be installed. Run this by hand to see why:\n  ${command}`);
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
