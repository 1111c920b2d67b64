import { readFileSync } from "node:fs";
import { createTranslator } from "next-intl";
import { describe, expect, it } from "vitest";
import { REASONS } from "@/lib/coverage/reasons";
import { COVERAGE_STEPS } from "@/lib/coverage/steps";

type Sentences = Readonly<Record<string, string>>;
const file = (language: string, name: string) =>
  JSON.parse(readFileSync(new URL(`../../../messages/${language}/${name}.json`, import.meta.url), "utf8"));

/** Names of the placeholders of an ICU sentence, each once. */
const placeholders = (sentence: string) =>
  [...new Set(Array.from(sentence.matchAll(/\{(\w+)[,}]/g), (match) => match[1]))].toSorted();

const reasons = Object.entries(REASONS).map(([code, { detail }]) => [code, [...detail]] as const);
const steps = Object.entries(COVERAGE_STEPS).map(([rule, input]) => [rule, [...input]] as const);

describe.each(["en", "de"])("in %s", (language) => {
  const sentences: Sentences = file(language, "coverage").reasons;
  const rules: Sentences = file(language, "steps");

  it.each(reasons)("the reason %s has a sentence that speaks of %j", (code, detail) => {
    expect(placeholders(sentences[code] ?? "no sentence {none}")).toEqual(detail.toSorted());
  });

  it.each(steps)("the step %s has a sentence that speaks of %j", (rule, input) => {
    expect(placeholders(rules[rule] ?? "no sentence {none}")).toEqual(input.toSorted());
  });

  it("there is no sentence for a reason nobody gives", () => {
    expect(Object.keys(sentences).toSorted()).toEqual(Object.keys(REASONS).toSorted());
  });

  it("every sentence can be printed with its values, and is no longer than it should be", () => {
    const messages = { reasons: sentences, steps: rules };
    const t = createTranslator({
      locale: language,
      messages,
      onError: (error) => {
        throw error;
      },
    });
    const values = (names: readonly string[]) =>
      Object.fromEntries(names.map((name) => [name, name.endsWith("On") ? "3 May 2027" : 2]));
    const printed = [
      ...reasons.map(([code, detail]) => t(`reasons.${code}`, values(detail))),
      ...steps.map(([rule, input]) => t(`steps.${rule}`, values(input))),
    ];
    for (const text of printed) {
      expect(text).not.toMatch(/[{}!]|please|bitte|oops|invalid/i);
      for (const sentence of text.split(/[.?:] /))
        expect(sentence.split(" ").length, sentence).toBeLessThanOrEqual(24);
    }
  });
});
