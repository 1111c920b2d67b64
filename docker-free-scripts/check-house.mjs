// The rules of the house that no other tool knows: who may import whom, what a file may be called, hold and say.
// node docker-free-scripts/check-house.mjs [--strict] [folder]      --strict: a missing doc comment fails too
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { basename, dirname, extname, join, posix, relative, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import ts from "typescript";
import { reasonAgainstFile, reasonAgainstPackage } from "./house-doors.mjs";

const FOLDERS = [
  "app",
  "components",
  "lib",
  "models",
  "migrations",
  "seeders",
  "tests",
  "docker-free-scripts",
];
const ROOT_FILES = ["proxy.ts", "instrumentation.ts"];
const MOST_LINES = 300;
const DRAWERS = /^(utils?|helpers?|common|types)(\.|$)/;
const UNFINISHED = /\b(TO[D]O|FIX[M]E)\b/;
const MAY_NAME_FAMILIES = /^(lib\/parts\/families|seeders|tests|docker-free-scripts)\//;

const FORBIDDEN_WORDS = {
  en: /\b(invalid|error occurred|please|oops)\b|!/i,
  de: /\b(ungültig\w*|fehler (ist )?aufgetreten|bitte|hoppla|ups)\b|!/i,
};

/**
 * The word, or exclamation mark, that a sentence of ours must not have; null where there is none.
 * @param {string} sentence
 * @param {string} language
 * @returns {string | null}
 */
export const forbiddenWord = (sentence, language) => FORBIDDEN_WORDS[language]?.exec(sentence)?.[0] ?? null;

/**
 * Every sentence of a message file, with the path of its key.
 * @param {unknown} tree
 * @param {readonly string[]} keys
 * @returns {{ key: string, text: string }[]}
 */
export function sentencesIn(tree, keys = []) {
  if (typeof tree === "string") return [{ key: keys.join("."), text: tree }];
  return Object.entries(tree).flatMap(([key, value]) => sentencesIn(value, [...keys, key]));
}

function* nodesOf(node) {
  yield node;
  const children = [];
  ts.forEachChild(node, (child) => void children.push(child));
  for (const child of children) yield* nodesOf(child);
}

/** The text in which a node names another module: import, export from, import(), import type. */
function moduleNamed(node) {
  const isDynamic = ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword;
  const name = isDynamic
    ? node.arguments[0]
    : ts.isImportTypeNode(node)
      ? node.argument.literal
      : node.moduleSpecifier;
  return name && ts.isStringLiteralLike(name) ? [name.text] : [];
}

const withoutEnding = (path) => path.replace(/(\/index)?\.[cm]?[jt]sx?$/, "");

function checkImports({ path, nodes }) {
  return nodes.flatMap(moduleNamed).flatMap((name) => {
    const isOurs = name.startsWith("@/") || name.startsWith(".");
    const target = name.startsWith("@/") ? name.slice(2) : isOurs ? posix.join(dirname(path), name) : name;
    const judge = isOurs ? reasonAgainstFile : reasonAgainstPackage;
    const reason = judge(withoutEnding(path), withoutEnding(target));
    return reason ? [`${path} imports ${target}: ${reason}`] : [];
  });
}

/** A family is data. A branch on its code anywhere else is a rule that a new family would silently miss. */
function checkFamilyCodes({ path, nodes }, families) {
  if (MAY_NAME_FAMILIES.test(path)) return [];
  return nodes
    .filter((node) => ts.isStringLiteralLike(node) && families.includes(node.text))
    .map((node) => `${path} says "${node.text}": the code of a family stands in lib/parts/families alone`);
}

function checkText({ path, text }) {
  const faults = [];
  const drawer = path.split("/").find((part) => DRAWERS.test(part));
  if (drawer) faults.push(`${path} lies in a drawer (${drawer}): name it after its concept`);
  const lines = text.split("\n").length - 1;
  if (lines > MOST_LINES)
    faults.push(`${path} has ${lines} lines: ${MOST_LINES} at most, so split it by concept`);
  const unfinished = UNFINISHED.exec(text);
  if (unfinished) faults.push(`${path} says ${unfinished[0]}: finish it`);
  return faults;
}

/** Exported functions of lib that do not say what they give back. */
function undocumented({ path, source }) {
  if (!path.startsWith("lib/")) return [];
  const isExported = (node) => node.modifiers?.some((word) => word.kind === ts.SyntaxKind.ExportKeyword);
  const isFunction = (node) =>
    node !== undefined && (ts.isArrowFunction(node) || ts.isFunctionExpression(node));
  return source.statements
    .filter((node) => isExported(node) && !node.jsDoc?.length)
    .flatMap((node) => {
      if (ts.isFunctionDeclaration(node)) return [node.name?.text ?? "default"];
      if (!ts.isVariableStatement(node)) return [];
      return node.declarationList.declarations
        .filter((one) => isFunction(one.initializer))
        .map((one) => one.name.text);
    })
    .map(
      (name) => `${path} exports ${name} without a doc comment: say what it gives back, and when it refuses`,
    );
}

function checkMessages({ path, text }) {
  const language = path.split("/")[1];
  return sentencesIn(JSON.parse(text)).flatMap(({ key, text: sentence }) => {
    const word = forbiddenWord(sentence, language);
    return word ? [`${path} says "${word}" in ${key}: say what happened, then what to do`] : [];
  });
}

function filesUnder(root, folder, endings) {
  if (!existsSync(join(root, folder))) return [];
  return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && endings.includes(extname(entry.name)))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)))
    .sort();
}

function parse(root, path) {
  const text = readFileSync(join(root, path), "utf8");
  const source = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, false);
  return { path, text, source, nodes: [...nodesOf(source)] };
}

/** The faults of a tree, what only the strict run minds, and how many files it read. Throws where it read none. */
export function checkHouse(root) {
  const code = FOLDERS.flatMap((folder) => filesUnder(root, folder, [".ts", ".tsx", ".mts", ".mjs"]));
  const files = [...code, ...ROOT_FILES.filter((path) => existsSync(join(root, path)))].map((path) =>
    parse(root, path),
  );
  if (files.length === 0) throw new Error(`No file to check under ${root}`);

  const families = filesUnder(root, "lib/parts/families", [".ts"])
    .map((path) => basename(path, ".ts"))
    .filter((name) => name !== "index");
  const messages = filesUnder(root, "messages", [".json"]).map((path) => ({
    path,
    text: readFileSync(join(root, path), "utf8"),
  }));
  return {
    read: files.length,
    faults: [
      ...files.flatMap((file) => [
        ...checkImports(file),
        ...checkFamilyCodes(file, families),
        ...checkText(file),
      ]),
      ...messages.flatMap(checkMessages),
    ],
    warnings: files.flatMap(undocumented),
  };
}

function main(args) {
  const isStrict = args.includes("--strict");
  const root = resolve(args.find((arg) => !arg.startsWith("--")) ?? join(import.meta.dirname, ".."));
  const { read, faults, warnings } = checkHouse(root);
  for (const line of warnings) console.log(isStrict ? line : `warning: ${line}`);
  for (const line of faults) console.log(line);
  const count = faults.length + (isStrict ? warnings.length : 0);
  console.log(
    count === 0 ? `The house is in order: ${read} files read.` : `${count} faults, ${read} files read.`,
  );
  process.exitCode = count === 0 ? 0 : 1;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) main(process.argv.slice(2));
