import { readFileSync } from "node:fs";
import { createTranslator } from "next-intl";
import { describe, expect, it } from "vitest";
import { CAUSES } from "@/lib/claims/verdict";
import { CREDIT_KINDS, SETTLEMENTS, SHARE_CAUSES } from "@/lib/credits/credit-input";
import { CREDIT_STEPS, NOT_GIVEN_REASONS } from "@/lib/credits/steps";
import type { AllocationRefusal } from "@/lib/credits/ledger";

type Words = Readonly<Record<string, string | Readonly<Record<string, string>>>>;
const file = (language: string, name: string) =>
  JSON.parse(readFileSync(new URL(`../../../messages/${language}/${name}.json`, import.meta.url), "utf8"));

/** Names of the placeholders of an ICU sentence, each once. */
const placeholders = (sentence: string) =>
  [...new Set(Array.from(sentence.matchAll(/\{(\w+)[,}]/g), (match) => match[1]))].toSorted();

const steps = Object.entries(CREDIT_STEPS).map(([rule, input]) => [rule, [...input]] as const);
const refusals = Object.keys({
  noteCountered: true,
  allocationOfNothing: true,
  allocationOtherCurrency: true,
  allocationMoreThanOpen: true,
} satisfies Record<AllocationRefusal, true>);

describe.each(["en", "de"])("in %s", (language) => {
  const words: Words = file(language, "creditSteps");
  const sentence = (rule: string) => String(words[rule] ?? "no sentence {none}");
  const group = (name: string) => Object.keys(words[name] ?? {}).toSorted();

  it.each(steps)("the step %s has a sentence that speaks of %j", (rule, input) => {
    expect(placeholders(sentence(rule))).toEqual(input.toSorted());
  });

  it("every reason, kind and way to settle has its words, and there are none for others", () => {
    expect(group("notGiven")).toEqual(NOT_GIVEN_REASONS.toSorted());
    expect(group("kinds")).toEqual(CREDIT_KINDS.toSorted());
    expect(group("settledBy")).toEqual(SETTLEMENTS.toSorted());
    const sentences = Object.keys(words).filter((key) => typeof words[key] === "string");
    expect(sentences.toSorted()).toEqual([...Object.keys(CREDIT_STEPS), "taxAdvice"].toSorted());
  });

  it("every step can be printed with its values", () => {
    const sentences: Readonly<Record<string, string>> = Object.fromEntries(
      steps.map(([rule]) => [rule, sentence(rule)]),
    );
    const messages = { steps: sentences };
    const print = createTranslator({
      locale: language,
      messages,
      onError: (error) => {
        throw error;
      },
    });
    const values = (names: readonly string[]) =>
      Object.fromEntries(names.map((name) => [name, /Amount$|^amount$/.test(name) ? "£2.00" : 2]));
    for (const [rule, input] of steps) expect(print(`steps.${rule}`, values(input))).not.toMatch(/[{}!]/);
  });

  it("what an allocation is refused for has a sentence", () => {
    const sentences: Words = file(language, "refusals");
    const codes = [...refusals, "noteAllocated", "noteDayBeforeLast"];
    expect(codes.filter((code) => typeof sentences[code] !== "string")).toEqual([]);
  });
});

it("speaks of the same causes as a verdict", () => {
  expect(SHARE_CAUSES).toEqual(CAUSES);
});
