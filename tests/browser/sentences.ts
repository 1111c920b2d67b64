import { readdirSync, readFileSync } from "node:fs";

type Tree = { readonly [name: string]: string | Tree };

const folder = (language: "en" | "de") => new URL(`../../messages/${language}/`, import.meta.url);

const treeOf = (language: "en" | "de", namespace: string): Tree =>
  JSON.parse(readFileSync(new URL(`${namespace}.json`, folder(language)), "utf8"));

const textsIn = (tree: Tree): string[] =>
  Object.values(tree).flatMap((value) => (typeof value === "string" ? [value] : textsIn(value)));

const allTexts = (language: "en" | "de"): string[] =>
  readdirSync(folder(language)).flatMap((file) => textsIn(treeOf(language, file.replace(".json", ""))));

/** One sentence of ours in German: the namespace, then the way to it. */
export function german(namespace: string, ...way: readonly string[]): string {
  let at: string | Tree = treeOf("de", namespace);
  for (const name of way) {
    const next: string | Tree | undefined = typeof at === "string" ? undefined : at[name];
    if (next === undefined) throw new Error(`${namespace} has no ${way.join(".")}`);
    at = next;
  }
  if (typeof at !== "string") throw new Error(`${namespace}.${way.join(".")} is no sentence`);
  return at;
}

/** The pieces of a message that stand as they are, whatever is put into it. */
const fixedPieces = (message: string): string[] =>
  /\{\w+, (plural|select)/.test(message)
    ? []
    : message.split(/\{[^{}]*\}|<[^<>]*>/).map((piece) => piece.trim());

/** Whatever of ours is English and cannot be German: three words or more that no German sentence holds. */
export function englishPieces(): string[] {
  const everythingGerman = allTexts("de").join("\n");
  const pieces = allTexts("en").flatMap(fixedPieces);
  return [...new Set(pieces)].filter(
    (piece) => (piece.match(/\p{L}{2,}/gu) ?? []).length >= 3 && !everythingGerman.includes(piece),
  );
}
