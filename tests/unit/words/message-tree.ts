import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { parse, TYPE, type MessageFormatElement } from "@formatjs/icu-messageformat-parser";
import { sentencesIn } from "@/docker-free-scripts/check-house.mjs";

const folderOf = (language: string) => join(process.cwd(), "messages", language);

/** Names of the message files of a language. */
export const filesOf = (language: string): string[] =>
  readdirSync(folderOf(language))
    .filter((name) => name.endsWith(".json"))
    .toSorted();

export type Sentence = { readonly key: string; readonly text: string };

/** The messages of one file with the paths of their keys. */
export const messagesIn = (language: string, file: string): Sentence[] =>
  sentencesIn(JSON.parse(readFileSync(join(folderOf(language), file), "utf8")));

type Branch = { readonly choice: string; readonly elements: readonly MessageFormatElement[] };

const branchesOf = (element: MessageFormatElement): Branch[] =>
  element.type === TYPE.plural || element.type === TYPE.select
    ? Object.entries(element.options).map(([choice, { value }]) => ({ choice, elements: value }))
    : [];

/**
 * What a message asks of the code that fills it: arguments by name, tags, and the cases of a choice between words.
 * How a language counts is its own affair, so the cases of a plural are left out.
 */
export function demandsOf(message: string): string[] {
  const demands = new Set<string>();
  const visit = (element: MessageFormatElement): void => {
    if (element.type === TYPE.tag) {
      demands.add(`<${element.value}>`);
      element.children.forEach(visit);
    } else if (element.type !== TYPE.literal && element.type !== TYPE.pound) {
      demands.add(`{${element.value}}`);
    }
    for (const { choice, elements } of branchesOf(element)) {
      if (element.type === TYPE.select) demands.add(`{${element.value}} ${choice}`);
      elements.forEach(visit);
    }
  };
  parse(message).forEach(visit);
  return [...demands].toSorted();
}

/** The words of a message itself, then those of each of its branches, in order; what is filled in is left out. */
export function textsOf(message: string): string[] {
  const visit = (elements: readonly MessageFormatElement[]): string[] => {
    const own = (list: readonly MessageFormatElement[]): string =>
      list
        .map((one) =>
          one.type === TYPE.literal ? one.value : one.type === TYPE.tag ? own(one.children) : "",
        )
        .join("");
    const inner = (list: readonly MessageFormatElement[]): string[] =>
      list.flatMap((one) =>
        one.type === TYPE.tag
          ? inner(one.children)
          : branchesOf(one).flatMap(({ elements: branch }) => visit(branch)),
      );
    return [own(elements), ...inner(elements)];
  };
  return visit(parse(message));
}

/** A message as it reads at its longest: every argument one word, of each choice the wordiest case. */
export function longestReading(message: string): string {
  const read = (elements: readonly MessageFormatElement[]): string =>
    elements
      .map((element) => {
        if (element.type === TYPE.literal) return element.value;
        if (element.type === TYPE.tag) return read(element.children);
        const cases = branchesOf(element).map(({ elements: branch }) => read(branch));
        return cases.length === 0 ? "7" : (cases.toSorted((a, b) => wordsIn(b) - wordsIn(a))[0] ?? "");
      })
      .join("");
  return read(parse(message));
}

export const wordsIn = (sentence: string): number =>
  sentence.split(/\s+/).filter((word) => /[\p{L}\d]/u.test(word)).length;
