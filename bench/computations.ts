import { createHash } from "node:crypto";
import { coverageOn } from "@/lib/coverage/coverage";
import { hashPassword, passwordFits } from "@/lib/web/password";
import { day, factsWith } from "@/tests/unit/coverage/facts";
import { against, type Measured } from "./measure";
import type { Line } from "./table";

/** As many bytes as one check of a password goes through: 64 MiB, three times. */
const PASSED = Buffer.alloc(64 * 1024 * 1024);
const hashPassed = () => {
  const hash = createHash("sha256");
  for (let pass = 0; pass < 3; pass += 1) hash.update(PASSED);
  hash.digest();
};

const verdictOn = (ms: number) => (ms >= 100 && ms <= 400 ? "within" : "outside");

/** One password checked, and four at once. */
export async function passwordLines(): Promise<Line[]> {
  const kept = await hashPassword("amber-anvil-basalt-birch");
  const check = () => passwordFits(kept, "amber-anvil-basalt-birch");
  const one = await against(hashPassed, check, { rounds: 7, warmUp: 1 });
  const four = await against(check, () => Promise.all([check(), check(), check(), check()]), {
    rounds: 7,
    warmUp: 1,
  });
  const wanted = `${verdictOn(one.medianMs)} the 100 to 400 ms wanted`;
  return [
    { name: "password checked", measured: one, yardstick: "sha256 of 3 x 64 MiB", note: wanted },
    {
      name: "four passwords at once",
      measured: four,
      yardstick: "one password",
      note: "4 where they wait for one core",
    },
  ];
}

const CALLS = 2000;
const perCall = (measured: Measured): Measured => ({
  ...measured,
  medianMs: measured.medianMs / CALLS,
  fromMs: measured.fromMs / CALLS,
  toMs: measured.toMs / CALLS,
  yardstickMs: measured.yardstickMs / CALLS,
});
const often = (work: () => unknown) => () => {
  for (let call = 0; call < CALLS; call += 1) work();
};

/** The cover of a bought unit and of one that stands in for another, against writing its facts down. */
export async function coverageLines(): Promise<Line[]> {
  const bought = factsWith();
  const replaced = factsWith({
    chain: [{ shippedOn: day("2025-06-01"), fittedOn: day("2025-07-01") }],
    rootTerms: bought.terms,
  });
  const lines: Line[] = [];
  for (const [name, facts] of [
    ["coverage of a bought unit", bought],
    ["coverage of a replacement", replaced],
  ] as const) {
    const measured = await against(
      often(() => JSON.stringify(facts)),
      often(() => coverageOn(facts)),
      { rounds: 15 },
    );
    const note = `${coverageOn(facts).steps.length} steps, per call`;
    lines.push({ name, measured: perCall(measured), yardstick: "JSON.stringify", note });
  }
  return lines;
}
