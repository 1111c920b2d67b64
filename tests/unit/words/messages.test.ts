import { describe, expect, it } from "vitest";
import { forbiddenWord } from "@/docker-free-scripts/check-house.mjs";
import { demandsOf, filesOf, longestReading, messagesIn, wordsIn } from "./message-tree";

const LANGUAGES = ["en", "de"] as const;
const FILES = filesOf("en");
const MOST_WORDS = 20;
// Our two text faces have no drawing for these: write the word ("ohm", "at most"), or draw the mark.
const UNDRAWN = /[ΩΩµμ≤≥→←↑↓✓✔№]/;

const faults = (language: string, file: string, isFault: (text: string) => unknown) =>
  messagesIn(language, file).flatMap(({ key, text }) => (isFault(text) ? [`${key}: ${text}`] : []));

it("has the same message files in each language, and some", () => {
  expect(FILES.length).toBeGreaterThan(0);
  expect(filesOf("de")).toEqual(FILES);
});

describe.each(FILES)("%s", (file) => {
  it("says the same things in English and German", () => {
    const keys = (language: string) =>
      messagesIn(language, file)
        .map(({ key }) => key)
        .toSorted();
    expect(keys("de")).toEqual(keys("en"));
  });

  it("asks for the same arguments, tags and cases in English and German", () => {
    const demands = (language: string) =>
      Object.fromEntries(messagesIn(language, file).map(({ key, text }) => [key, demandsOf(text)]));
    expect(demands("de")).toEqual(demands("en"));
  });

  it.each(LANGUAGES)("has, in %s, no message that is empty or begins or ends with a space", (language) => {
    expect(faults(language, file, (text) => text === "" || text !== text.trim())).toEqual([]);
  });

  it.each(LANGUAGES)("says, in %s, what happened and what to do, without blame or alarm", (language) => {
    expect(faults(language, file, (text) => forbiddenWord(longestReading(text), language))).toEqual([]);
  });

  it.each(LANGUAGES)(`keeps, in %s, to sentences of at most ${MOST_WORDS} words`, (language) => {
    const isLong = (text: string) =>
      longestReading(text)
        .split(/(?<=[.?:])\s+/)
        .some((sentence) => wordsIn(sentence) > MOST_WORDS);
    expect(faults(language, file, isLong)).toEqual([]);
  });

  it.each(LANGUAGES)("uses, in %s, only signs that our faces draw", (language) => {
    expect(faults(language, file, (text) => UNDRAWN.test(text))).toEqual([]);
  });
});

describe("the checks of words", () => {
  it("see a forbidden word in each language, whatever its case, and no word that only contains one", () => {
    expect(forbiddenWord("Oops, that went wrong.", "en")).toBe("Oops");
    expect(forbiddenWord("An error occurred.", "en")).toBe("error occurred");
    expect(forbiddenWord("Ein Fehler ist aufgetreten.", "de")).toBe("Fehler ist aufgetreten");
    expect(forbiddenWord("Gesendet!", "de")).toBe("!");
    expect(forbiddenWord("It was pleasing; the invalidated label stays.", "en")).toBeNull();
    expect(forbiddenWord("Das ist erbittert.", "de")).toBeNull();
  });

  it("see what a message demands, whatever its plural needs", () => {
    const english = "{n, plural, one {# line for <b>{name}</b>} other {# lines for <b>{name}</b>}}";
    expect(demandsOf(english)).toEqual(demandsOf("{n} Zeilen für <b>{name}</b>"));
    expect(demandsOf(english)).not.toEqual(demandsOf("{n} Zeilen für {name}"));
    expect(demandsOf("{side, select, left {L} other {R}}")).not.toEqual(
      demandsOf("{side, select, links {L} other {R}}"),
    );
  });

  it("count the words of the longest case", () => {
    expect(longestReading("{n, plural, one {One line} other {{n} lines in {file}}} – sent.")).toBe(
      "7 lines in 7 – sent.",
    );
    expect(wordsIn("7 lines in 7 – sent.")).toBe(5);
  });
});
