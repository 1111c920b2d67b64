import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { root } from "./machine.mjs";
import { Stop } from "./report.mjs";

const SOURCES = [
  "app",
  "components",
  "lib",
  "messages",
  "models",
  "proxy.ts",
  "instrumentation.ts",
  "next.config.mjs",
  "tailwind.config.ts",
  "postcss.config.mjs",
  "tsconfig.json",
  "package-lock.json",
];

function* filesIn(path) {
  if (!existsSync(path)) return;
  if (!statSync(path).isDirectory()) yield path;
  else for (const name of readdirSync(path).sort()) yield* filesIn(join(path, name));
}

const hashOfSources = () => {
  const hash = createHash("sha256");
  for (const source of SOURCES)
    for (const file of filesIn(join(root, source))) hash.update(file).update(readFileSync(file));
  return hash.digest("hex");
};

/** Builds the web when its sources are not those of the last build. */
export function needBuild(env) {
  const mark = join(root, ".next", "partproof-sources");
  const hash = hashOfSources();
  if (existsSync(mark) && readFileSync(mark, "utf8") === hash) return "unchanged";
  const built = spawnSync(process.execPath, [join(root, "node_modules/next/dist/bin/next"), "build"], {
    cwd: root,
    env,
    encoding: "utf8",
  });
  if (built.status !== 0) throw new Stop(`The build failed:\n${built.stdout}\n${built.stderr}`);
  writeFileSync(mark, hash);
  return "built";
}
