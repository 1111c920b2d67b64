import { execFile } from "node:child_process";
import { mkdtemp, mkdir, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";

const SCRIPT = join(process.cwd(), "docker-free-scripts/check-house.mjs");
const trees: string[] = [];

type Run = { readonly exitCode: number; readonly lines: readonly string[] };

async function check(files: Readonly<Record<string, string>>, ...options: string[]): Promise<Run> {
  const root = await mkdtemp(join(tmpdir(), "house-"));
  trees.push(root);
  for (const [path, text] of Object.entries(files)) {
    await mkdir(dirname(join(root, path)), { recursive: true });
    await writeFile(join(root, path), text);
  }
  return new Promise((resolve) => {
    execFile(process.execPath, [SCRIPT, root, ...options], (fault, stdout, stderr) =>
      resolve({ exitCode: fault ? Number(fault.code) : 0, lines: `${stdout}${stderr}`.trim().split("\n") }),
    );
  });
}

const imports = (...names: string[]) => names.map((name) => `import "${name}";\n`).join("");

/** One of each kind of file, each importing all it may. */
const CLEAN = {
  "lib/kernel/format.ts": imports("./money", "@internationalized/date"),
  "lib/kernel/money.ts": "/** Nothing. */\nexport const noMoney = () => 0;\n",
  "lib/reliability/kaplan-meier.ts": imports("../kernel/money"),
  "lib/parts/families/brake.ts": 'export const brake = { code: "brake" };\n',
  "lib/claims/lifecycle.ts": imports("@/lib/kernel/money", "@/lib/parts/families/brake", "./schema"),
  "lib/claims/schema.ts": imports("zod"),
  "lib/claims/queries.ts": imports(
    "sequelize",
    "./lifecycle",
    "@/lib/db/sequelize",
    "@/models/claim",
    "./present",
  ),
  "lib/claims/service.ts": imports(
    "./queries",
    "@/lib/evidence/queries",
    "@/lib/mail/outbox",
    "@/lib/web/log",
  ),
  "lib/evidence/run-log.ts": imports("csv-parse/sync"),
  "lib/rule-book/terms-shape.ts": imports("zod"),
  "lib/reports/index.ts": imports("./by-batch/report"),
  "lib/web/session.ts": imports("next/headers", "@/lib/people/service", "@/messages/en/refusals.json"),
  "lib/jobs/lapse.ts": imports("graphile-worker", "@/lib/claims/service"),
  "lib/db/sequelize.ts": imports("sequelize"),
  "models/claim.ts": imports("sequelize", "@/lib/claims/lifecycle", "@/lib/db/sequelize"),
  "components/ui/button.tsx": imports("react", "./tone"),
  "components/claims/claim-sheet.tsx": imports(
    "@/components/ui/button",
    "@/lib/claims/lifecycle",
    "next/link",
  ),
  "app/claims/page.tsx": imports(
    "@/components/claims/claim-sheet",
    "@/lib/claims/queries",
    "@/lib/web/session",
  ),
  "app/reports/page.tsx": imports("@/lib/reports", "./actions"),
  "proxy.ts": imports("next/server"),
  "migrations/001-claims.ts": imports("./row-security"),
  "seeders/story.ts": imports("@/lib/kernel/money", "@/lib/storage/client"),
  "tests/unit/claims.test.ts": `${imports("@/lib/claims/service", "@/models/claim")}const family = "brake";\n`,
  "messages/en/claims.json":
    '{ "sent": { "title": "Sent." }, "count": "{n, plural, one {# line} other {# lines}}" }',
  "messages/de/claims.json": '{ "sent": { "title": "Gesendet." }, "count": "{n} Zeilen" }',
};

/** File, text, and the one line the check must say about it. */
const PLANTED: readonly (readonly [path: string, text: string, line: string])[] = [
  [
    "lib/kernel/step.ts",
    imports("@/lib/claims/lifecycle"),
    "imports lib/claims/lifecycle: that area stands above",
  ],
  ["lib/reliability/risk.ts", imports("../parts/family"), "imports lib/parts/family: that area stands above"],
  [
    "lib/claims/model.ts",
    imports("@/models/claim"),
    "imports models/claim: a pure file imports pure files only",
  ],
  [
    "lib/claims/ask.ts",
    imports("./queries"),
    "imports lib/claims/queries: a pure file imports pure files only",
  ],
  ["lib/claims/a.ts", 'import type { C } from "@/models/claim";\n', "imports models/claim: a pure file"],
  ["lib/claims/b.ts", 'export type { C } from "@/models/claim";\n', "imports models/claim: a pure file"],
  ["lib/claims/c.ts", 'export * from "../../models/claim";\n', "imports models/claim: a pure file"],
  ["lib/claims/d.ts", 'const c = await import("@/models/claim");\n', "imports models/claim: a pure file"],
  ["lib/claims/e.ts", 'type C = import("@/models/claim").C;\n', "imports models/claim: a pure file"],
  ["lib/claims/f.ts", imports("next/headers"), "imports next/headers: a pure file stands on nothing"],
  ["lib/claims/g.ts", imports("zod"), "imports zod: a pure file stands on nothing"],
  ["lib/claims/h.ts", imports("node:fs"), "imports node:fs: a pure file stands on nothing"],
  [
    "lib/evidence/service.ts",
    imports("@/lib/claims/service"),
    "imports lib/claims/service: that area stands above",
  ],
  [
    "lib/claims/present.ts",
    imports("@/components/ui/button"),
    "imports components/ui/button: lib serves the screens",
  ],
  ["lib/credits/service.ts", imports("react"), "imports react: lib/web is the only folder of lib"],
  ["lib/mail/send.ts", imports("@/lib/claims/service"), "imports lib/claims/service: an adapter knows no"],
  ["lib/db/unit.ts", imports("@/models/claim"), "imports models/claim: lib/db stands below the models"],
  ["lib/web/page.ts", imports("@/app/claims/page"), "imports app/claims/page: lib serves the screens"],
  ["lib/stock/level.ts", imports("@/lib/kernel/money"), "imports lib/kernel/money: its area has no place"],
  ["models/part.ts", imports("@/lib/claims/queries"), "imports lib/claims/queries: a model knows pure lists"],
  ["models/unit.ts", imports("next/cache"), "imports next/cache: a model knows no framework"],
  [
    "components/ui/field.tsx",
    imports("@/lib/kernel/money"),
    "imports lib/kernel/money: components/ui fits any product",
  ],
  [
    "components/ui/menu.tsx",
    imports("../claims/claim-sheet"),
    "imports components/claims/claim-sheet: components/ui",
  ],
  [
    "components/claims/a.tsx",
    imports("@/lib/claims/service"),
    "imports lib/claims/service: a component takes props",
  ],
  [
    "components/claims/b.tsx",
    imports("@/lib/web/session"),
    "imports lib/web/session: a component takes props",
  ],
  [
    "components/claims/c.tsx",
    imports("@/app/claims/actions"),
    "imports app/claims/actions: a component takes props",
  ],
  ["components/claims/d.tsx", imports("sequelize"), "imports sequelize: a component runs in the browser"],
  ["app/a.tsx", imports("sequelize"), "imports sequelize: a route goes through queries and service"],
  ["app/b.tsx", imports("@/models"), "imports models: a route goes through queries, service"],
  ["app/c.tsx", imports("@/lib/storage/client"), "imports lib/storage/client: a route goes through"],
  ["app/d.tsx", imports("@/tests/support/build"), "imports tests/support/build: a route goes through"],
  ["instrumentation.ts", imports("./models/claim"), "imports models/claim: a route goes through"],
  [
    "migrations/002-more.ts",
    imports("@/lib/claims/lifecycle"),
    "imports lib/claims/lifecycle: a migration must",
  ],
  ["seeders/claims.ts", imports("@/lib/claims/service"), "imports lib/claims/service: a seeder writes rows"],
  [
    "docker-free-scripts/start.mjs",
    imports("../lib/db/migrate.ts"),
    "imports lib/db/migrate.ts: a script runs in plain Node",
  ],
  [
    "lib/coverage/term.ts",
    'const isBrake = (code: string) => code === "brake";\n',
    'says "brake": the code of a family',
  ],
  [
    "components/parts/glyph.tsx",
    'const g = <Glyph family="brake" />;\n',
    'says "brake": the code of a family',
  ],
  ["lib/claims/utils.ts", "", "lies in a drawer (utils.ts)"],
  ["components/common/box.tsx", "", "lies in a drawer (common)"],
  ["tests/helpers/build.ts", "", "lies in a drawer (helpers)"],
  ["lib/claims/types.ts", "", "lies in a drawer (types.ts)"],
  ["lib/claims/long.ts", "\n".repeat(301), "has 301 lines: 300 at most"],
  ["lib/claims/open.ts", `// TO${"DO"}: later\n`, `says TO${"DO"}: finish it`],
  ["messages/en/a.json", '{ "deep": { "one": "Invalid serial." } }', 'says "Invalid" in deep.one'],
  ["messages/en/b.json", '{ "one": "An error occurred." }', 'says "error occurred" in one'],
  ["messages/en/c.json", '{ "one": "Try again, please." }', 'says "please" in one'],
  ["messages/en/d.json", '{ "one": "Sent!" }', 'says "!" in one'],
  ["messages/de/e.json", '{ "one": "Bitte neu laden." }', 'says "Bitte" in one'],
  ["messages/de/f.json", '{ "one": "Die Angabe ist ungültig." }', 'says "ungültig" in one'],
];

afterAll(() => Promise.all(trees.map((root) => rm(root, { recursive: true }))));

describe("the house check", () => {
  let clean: Run;
  let broken: Run;
  beforeAll(async () => {
    clean = await check(CLEAN);
    broken = await check({ ...CLEAN, ...Object.fromEntries(PLANTED.map(([path, text]) => [path, text])) });
  }, 60_000);

  it("is silent about a tree in order", () => {
    expect(clean).toEqual({ exitCode: 0, lines: ["The house is in order: 23 files read."] });
  });

  it.each(PLANTED)("names the fault planted in %s", (path, _text, line) => {
    expect(broken.lines.filter((said) => said.startsWith(`${path} `))).toEqual([
      expect.stringContaining(`${path} ${line}`),
    ]);
  });

  it("fails, and says nothing beyond the planted faults", () => {
    expect(broken.exitCode).toBe(1);
    expect(broken.lines).toHaveLength(PLANTED.length + 1);
  });

  it("fails where it has read no file", async () => {
    const run = await check({ "README.md": "" });
    expect(run.exitCode).toBe(1);
    expect(run.lines.join("\n")).toContain("No file to check");
  }, 60_000);

  it("warns of an exported function that says nothing about itself, and fails for it when strict", async () => {
    const bare =
      "export const half = (n: number) => n / 2;\nexport function whole() {}\nexport const TWO = 2;\n";
    const files = { "lib/kernel/half.ts": bare };
    const lenient = await check(files);
    const strict = await check(files, "--strict");
    expect(lenient.exitCode).toBe(0);
    expect(strict.exitCode).toBe(1);
    expect(strict.lines.slice(0, -1).map((line) => line.split(" without ")[0])).toEqual([
      "lib/kernel/half.ts exports half",
      "lib/kernel/half.ts exports whole",
    ]);
  }, 60_000);
});
