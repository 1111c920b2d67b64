import { Linter } from "eslint";
import tseslint from "typescript-eslint";
import { describe, expect, it } from "vitest";
import { MONEY } from "../../../docker-free-scripts/lint-money.mjs";

const faultsIn = (code: string): number =>
  new Linter().verify(
    code,
    [
      {
        files: ["**/*.ts"],
        languageOptions: { parser: tseslint.parser },
        rules: { "no-restricted-syntax": ["error", ...MONEY] },
      },
    ],
    "lib/credits/planted.ts",
  ).length;

describe("the lint of money", () => {
  it.each([
    "const x = Number(netMinor);",
    "const x = Number(line.netMinor) / 2;",
    "const x = parseFloat(amount.minor);",
    "const x = +totalMinor;",
    "const x = Math.round(totalMinor);",
    "const x = note.totalMinor.toFixed(2);",
    "const x = priceMinor * 0.7083;",
    "const x = 100 / line.netMinor;",
    "type Line = { readonly netMinor: number };",
  ])("refuses %s", (code) => {
    expect(faultsIn(code)).toBeGreaterThan(0);
  });

  it.each([
    "const x = netMinor * 60n;",
    "const x = (exposureMinor * BigInt(minutes)) / 60n;",
    "const x = Number(minutes) / 60;",
    "type Line = { readonly netMinor: bigint; readonly minutes: number };",
    "const x = String(line.netMinor);",
  ])("lets %s stand", (code) => {
    expect(faultsIn(code)).toBe(0);
  });
});
