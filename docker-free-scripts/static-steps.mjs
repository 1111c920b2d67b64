import { join } from "node:path";
import { root } from "./machine.mjs";

const bin = (path) => join(root, "node_modules", path);
const node = (name, ...args) => ({ name, command: process.execPath, args });

/** Checks that read the project and start nothing. */
export const staticSteps = ({ withUnit = false } = {}) => [
  node("types", bin("typescript/bin/tsc"), "--noEmit", "-p", root),
  node("lint", bin("eslint/bin/eslint.js"), "--cache", "--cache-location", join(root, ".local/eslint/"), "."),
  node(
    "format",
    bin("prettier/bin/prettier.cjs"),
    "--check",
    "--cache",
    "--cache-location",
    join(root, ".local/prettier"),
    "--log-level",
    "warn",
    ".",
  ),
  node("house", join(root, "docker-free-scripts/check-house.mjs")),
  node("dead code", bin("knip/bin/knip.js"), "--no-progress"),
  ...(withUnit
    ? [node("unit tests", bin("vitest/vitest.mjs"), "run", "--project", "unit", "--reporter", "dot")]
    : []),
];
