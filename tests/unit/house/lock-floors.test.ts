import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { z } from "zod";
import {
  copiesBelow,
  copiesIn,
  copiesWithoutHash,
  foreignAddresses,
  isExactVersion,
  lockShape,
  packagesWithInstallScript,
  type Lock,
} from "./lock";
import rules from "./security-floors.json";

const read = (path: string) => readFileSync(join(process.cwd(), path), "utf8");
const lock = lockShape.parse(JSON.parse(read("package-lock.json")));
const manifest = z
  .object({
    dependencies: z.record(z.string(), z.string()),
    devDependencies: z.record(z.string(), z.string()),
    scripts: z.record(z.string(), z.string()),
  })
  .parse(JSON.parse(read("package.json")));
const pins = Object.entries({ ...manifest.dependencies, ...manifest.devDependencies });

const filesUnder = (folder: string): string[] =>
  existsSync(folder)
    ? readdirSync(folder, { recursive: true, withFileTypes: true })
        .filter((entry) => entry.isFile())
        .map((entry) => join(entry.parentPath, entry.name))
    : [];

/** The lock with one copy more, or one changed. */
const lockWith = (path: string, entry: Lock["packages"][string]): Lock => ({
  ...lock,
  packages: { ...lock.packages, [path]: { ...lock.packages[path], ...entry } },
});

describe("what is installed", () => {
  it("was read: the lock names hundreds of copies, and every package with a floor among them", () => {
    expect(copiesIn(lock).length).toBeGreaterThan(300);
    expect(
      Object.keys(rules.floors).filter((name) => !copiesIn(lock).some((copy) => copy.package === name)),
    ).toEqual([]);
  });

  it("has no copy of a package below its security floor", () => {
    expect(copiesBelow(lock, rules.floors)).toEqual([]);
  });

  it.each([
    ["node_modules/next", "16.4.2", true],
    ["node_modules/next", "16.4.3", false],
    ["node_modules/next", "16.10.0", false],
    ["node_modules/next", "15.9.9", true],
    ["node_modules/next", "16.4.3-canary.1", true],
    ["node_modules/mailparser/node_modules/nodemailer", "9.0.0", true],
    ["node_modules/a/node_modules/b/node_modules/zod", "4.6.5", true],
  ])("would be caught with %s at %s: %s", (path, version, isCaught) => {
    expect(copiesBelow(lockWith(path, { version }), rules.floors)).toEqual(
      isCaught ? [`${path} ${version}`] : [],
    );
  });

  it("would be caught under another name: an alias is the package it stands for", () => {
    const aliased = lockWith("node_modules/pictures", { name: "sharp", version: "0.35.3" });
    expect(copiesBelow(aliased, rules.floors)).toEqual(["node_modules/pictures 0.35.3"]);
  });

  it("is vouched for by a hash, copy by copy", () => {
    expect(copiesWithoutHash(lock)).toEqual([]);
    expect(copiesWithoutHash(lockWith("node_modules/next", { integrity: "sha1-abc=" }))).toEqual([
      "node_modules/next",
    ]);
  });

  it("comes from the public registry and nowhere else", () => {
    expect(foreignAddresses(lock)).toEqual([]);
    const elsewhere = "git+ssh://git@example.test/next.git";
    expect(foreignAddresses(lockWith("node_modules/next", { resolved: elsewhere }))).toEqual([elsewhere]);
  });

  it("runs no script when it is installed that nobody looked at", () => {
    expect(packagesWithInstallScript(lock).toSorted()).toEqual(Object.keys(rules.installScripts).toSorted());
  });
});

describe("what is asked for", () => {
  it("is one exact version each, the one in the lock", () => {
    expect(pins.filter(([, version]) => !isExactVersion(version))).toEqual([]);
    expect(
      pins.filter(([name, version]) => lock.packages[`node_modules/${name}`]?.version !== version),
    ).toEqual([]);
  });

  it("never asks npm to overlook a conflict of peers", () => {
    const files = [".npmrc", "package.json", ...filesUnder("docker-free-scripts"), ...filesUnder(".ci")];
    expect(files.length).toBeGreaterThan(2);
    expect(
      files.filter((path) =>
        /legacy-peer-deps|strict-peer-deps\s*=\s*false|--force\b.*\bnpm|npm\b.*--force\b/.test(read(path)),
      ),
    ).toEqual([]);
  });
});

describe("a floor", () => {
  it.each(Object.entries(rules.floors))(
    "of %s is a version, with its source and its reason",
    (_name, rule) => {
      expect(isExactVersion(rule.floor)).toBe(true);
      expect(rule.advisories.length).toBeGreaterThan(0);
      expect(rule.why).toMatch(/\.$/);
    },
  );
});
