import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import ts from "typescript";
import { describe, expect, it } from "vitest";

const FOLDER = join(process.cwd(), "lib/credits");
const FLOATING = ["Math", "parseFloat", "parseInt", "approximate", "toFixed", "toPrecision"];
/** Counts and years, which are no money: the only places where a number may be made of something else. */
const NUMBERS = ["note-number.ts"];

const nodesOf = (node: ts.Node): ts.Node[] => {
  const inner: ts.Node[] = [];
  ts.forEachChild(node, (child) => void inner.push(...nodesOf(child)));
  return [node, ...inner];
};

/** Everything in a text that would make money a floating-point number. */
function floatsIn(name: string, text: string): string[] {
  const source = ts.createSourceFile(name, text, ts.ScriptTarget.Latest, true);
  return nodesOf(source).flatMap((node) => {
    if (ts.isIdentifier(node) && FLOATING.includes(node.text)) return [`${name}: ${node.text}`];
    const makesNumber = ts.isCallExpression(node) && node.expression.getText() === "Number";
    const isPlus = ts.isPrefixUnaryExpression(node) && node.operator === ts.SyntaxKind.PlusToken;
    if ((makesNumber || isPlus) && !NUMBERS.includes(name)) return [`${name}: ${node.getText()}`];
    if (ts.isNumericLiteral(node) && /[.e]/i.test(node.getText())) return [`${name}: ${node.getText()}`];
    const isDeclared = ts.isPropertySignature(node) || ts.isParameter(node) || ts.isVariableDeclaration(node);
    const isMoney = isDeclared && /Minor$/.test(node.name.getText());
    return isMoney && node.type?.getText().includes("number") ? [`${name}: ${node.getText()}`] : [];
  });
}

describe("money", () => {
  const files = readdirSync(FOLDER).filter((name) => name.endsWith(".ts"));

  it("is whole minor units in every file of credits, never a floating-point number", () => {
    expect(files.length).toBeGreaterThan(10);
    expect(files.flatMap((name) => floatsIn(name, readFileSync(join(FOLDER, name), "utf8")))).toEqual([]);
  });

  it("would be found as a number wherever it hides", () => {
    const bad = [
      "const x = Number(totalMinor);",
      "const x = +totalMinor;",
      "const x = 0.2;",
      "const x = 1e2;",
      "const x = Math.round(1);",
      "type A = { netMinor: number | null };",
      "const taxMinor: number = 1;",
      "const x = approximate(share);",
    ];
    expect(bad.filter((text) => floatsIn("x.ts", text).length === 0)).toEqual([]);
    expect(floatsIn("x.ts", "const netMinor: bigint = a * 100n; const n = 3;")).toEqual([]);
  });
});
