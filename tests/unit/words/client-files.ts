import { dirname, join } from "node:path";
import ts from "typescript";

type Source = { readonly path: string; readonly text: string };

/** Paths, without ending, of our own files that a file imports for more than their types. */
function importsOf({ path, text }: Source): string[] {
  const source = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, false);
  return source.statements.flatMap((statement) => {
    if (
      !ts.isImportDeclaration(statement) ||
      statement.importClause?.phaseModifier === ts.SyntaxKind.TypeKeyword
    )
      return [];
    const name = ts.isStringLiteral(statement.moduleSpecifier) ? statement.moduleSpecifier.text : "";
    if (name.startsWith("@/")) return [name.slice(2)];
    return name.startsWith(".") ? [join(dirname(path), name)] : [];
  });
}

const isClient = ({ text }: Source) => text.startsWith('"use client"');
const isServerOnly = ({ text }: Source) => text.startsWith('"use server"');

/** Every file that runs in the browser: those that say so, and all they draw in. Server actions stay behind. */
export function clientFiles(sources: readonly Source[]): Source[] {
  const byName = new Map(sources.map((one) => [one.path.replace(/\.tsx?$/u, ""), one]));
  const found = new Set<Source>();
  const take = (one: Source | undefined): void => {
    if (!one || found.has(one) || isServerOnly(one)) return;
    found.add(one);
    for (const name of importsOf(one)) take(byName.get(name));
  };
  sources.filter(isClient).forEach(take);
  return [...found];
}
