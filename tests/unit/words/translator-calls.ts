import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import ts from "typescript";

/**
 * One use of a translator: the keys it may ask for, each with `*` for a part only known when it runs, and the names of
 * the values it is given (null where a spread or a variable hides them).
 */
export type TranslatorCall = {
  readonly at: string;
  readonly keys: readonly string[];
  readonly given: readonly string[] | null;
};

const MAKERS = new Set(["useTranslations", "getTranslations", "createTranslator"]);
const VARIANTS = new Set(["rich", "markup", "raw"]);
/** A namespace of a name in sight; null where the name means something else there. */
type Scope = Map<string, string | null>;

/** Strips what does not change a value: brackets, `await`, `as`, `satisfies`. */
function bare(node: ts.Expression): ts.Expression {
  const isWrapped =
    ts.isParenthesizedExpression(node) ||
    ts.isAwaitExpression(node) ||
    ts.isAsExpression(node) ||
    ts.isSatisfiesExpression(node);
  return isWrapped ? bare(node.expression) : node;
}

/** Every text an expression can be, with `*` for what is only known when it runs. */
function textsOf(wrapped: ts.Expression): string[] {
  const node = bare(wrapped);
  if (ts.isStringLiteralLike(node)) return [node.text];
  if (ts.isConditionalExpression(node)) return [...textsOf(node.whenTrue), ...textsOf(node.whenFalse)];
  if (!ts.isTemplateExpression(node)) return ["*"];
  return node.templateSpans.reduce(
    (heads, { expression, literal }) =>
      heads.flatMap((head) => textsOf(expression).map((middle) => `${head}${middle}${literal.text}`)),
    [node.head.text],
  );
}

const propertyOf = (node: ts.ObjectLiteralExpression, name: string): ts.Expression | null => {
  const found = node.properties.find((one) => one.name?.getText() === name);
  return found && ts.isPropertyAssignment(found) ? found.initializer : null;
};

/** The namespace of the translator an expression makes or calls up; "" for the root, undefined where it makes none. */
function namespaceOf(wrapped: ts.Expression | undefined, scopes: readonly Scope[]): string | undefined {
  if (!wrapped) return undefined;
  const node = bare(wrapped);
  if (!ts.isCallExpression(node) || !ts.isIdentifier(node.expression)) return undefined;
  if (!MAKERS.has(node.expression.text)) return lookUp(`${node.expression.text}()`, scopes);
  const [argument] = node.arguments;
  if (!argument) return "";
  const options = bare(argument);
  const named = ts.isObjectLiteralExpression(options) ? propertyOf(options, "namespace") : options;
  return named ? textsOf(named)[0] : "";
}

const lookUp = (name: string, scopes: readonly Scope[]): string | undefined =>
  scopes.findLast((scope) => scope.has(name))?.get(name) ?? undefined;

/** Notes what a declaration binds: a translator, a function that makes one, each place of a `Promise.all`. */
function declare({ name, initializer }: ts.VariableDeclaration, scopes: readonly Scope[]): void {
  const scope = scopes.at(-1);
  if (!scope || !initializer) return;
  const value = bare(initializer);
  if (ts.isIdentifier(name)) {
    scope.set(name.text, namespaceOf(value, scopes) ?? null);
    const makes = ts.isArrowFunction(value) && !ts.isBlock(value.body) ? value.body : undefined;
    scope.set(`${name.text}()`, namespaceOf(makes, scopes) ?? null);
  }
  const [list] = ts.isCallExpression(value) ? value.arguments : [];
  if (!ts.isArrayBindingPattern(name) || !list || !ts.isArrayLiteralExpression(list)) return;
  name.elements.forEach((element, place) => {
    if (ts.isBindingElement(element) && ts.isIdentifier(element.name))
      scope.set(element.name.text, namespaceOf(list.elements[place], scopes) ?? null);
  });
}

/** The namespace a call asks in, or undefined where it asks no translator we can follow. */
function askedIn(callee: ts.Expression, scopes: readonly Scope[]): string | undefined {
  const node = bare(callee);
  if (ts.isPropertyAccessExpression(node))
    return VARIANTS.has(node.name.text) ? askedIn(node.expression, scopes) : undefined;
  return ts.isIdentifier(node) ? lookUp(node.text, scopes) : namespaceOf(node, scopes);
}

function givenTo(values: ts.Expression | undefined): readonly string[] | null {
  if (!values) return [];
  const node = bare(values);
  if (!ts.isObjectLiteralExpression(node)) return null;
  const names = node.properties.map((one) => one.name?.getText());
  return names.every((name) => name !== undefined) ? names : null;
}

/** The uses of translators in one file whose namespace stands in the same file. */
export function callsIn(path: string, text: string): TranslatorCall[] {
  const source = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true);
  const calls: TranslatorCall[] = [];
  const note = (node: ts.CallExpression, scopes: readonly Scope[]): void => {
    const namespace = askedIn(node.expression, scopes);
    const [key, values] = node.arguments;
    if (namespace === undefined || !key) return;
    const line = source.getLineAndCharacterOfPosition(node.getStart()).line + 1;
    const full = (one: string) => (namespace === "" ? one : `${namespace}.${one}`);
    calls.push({ at: `${path}:${line}`, keys: textsOf(key).map(full), given: givenTo(values) });
  };
  const visit = (node: ts.Node, outer: readonly Scope[]): void => {
    const scopes = ts.isBlock(node) || ts.isFunctionLike(node) ? [...outer, new Map()] : outer;
    if (ts.isParameter(node) && ts.isIdentifier(node.name)) scopes.at(-1)?.set(node.name.text, null);
    if (ts.isVariableDeclaration(node)) declare(node, scopes);
    if (ts.isCallExpression(node)) note(node, scopes);
    ts.forEachChild(node, (child) => visit(child, scopes));
  };
  visit(source, [new Map()]);
  return calls;
}

/** Text of the sources under some folders, by path. */
export function sourcesUnder(...folders: readonly string[]): { path: string; text: string }[] {
  return folders.flatMap((folder) =>
    readdirSync(join(process.cwd(), folder), { recursive: true, encoding: "utf8" })
      .filter((name) => /\.tsx?$/u.test(name))
      .map((name) => join(folder, name))
      .toSorted()
      .map((path) => ({ path, text: readFileSync(join(process.cwd(), path), "utf8") })),
  );
}
