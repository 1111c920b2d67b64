import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { root } from "./machine.mjs";
import { Stop } from "./report.mjs";

export const tsxArgs = (file, ...args) => [
  "--conditions=react-server",
  "--import",
  "tsx",
  join(root, file),
  ...args,
];

/** Runs a TypeScript program of the project to its end. Throws Stop with what it said. */
export function runTsx(file, args, env) {
  const done = spawnSync(process.execPath, tsxArgs(file, ...args), {
    cwd: root,
    env: { ...process.env, ...env },
    encoding: "utf8",
    maxBuffer: 64e6,
  });
  if (done.status !== 0) throw new Stop(`${file} failed:\n${done.stdout}\n${done.stderr}`);
  return done.stdout.trim();
}
