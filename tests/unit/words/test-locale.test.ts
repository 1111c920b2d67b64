import fc from "fast-check";
import { createTranslator } from "next-intl";
import { describe, expect, it } from "vitest";
import { sentencesIn } from "@/docker-free-scripts/check-house.mjs";
import { loadMessages } from "@/lib/web/messages";
import { stretchMessage } from "@/lib/web/stretch";
import { demandsOf, textsOf } from "./message-tree";

const hasWords = (text: string) => /\p{L}/u.test(text);

/** Each text that got too little, or was touched although it has no words. */
function shortfalls(message: string, stretched: string): string[] {
  const after = textsOf(stretched);
  return textsOf(message).filter((text, index) => {
    const longer = after[index] ?? "";
    return hasWords(text) ? longer.length < text.length * 1.4 || !longer.startsWith(text) : longer !== text;
  });
}

const name = fc.constantFrom("n", "name", "filedOn", "count");
const text = fc.stringMatching(/^[A-Za-zäöüß0-9 .,;:#'–-]{0,30}$/);
const { message } = fc.letrec<{ message: string; part: string }>((tie) => ({
  message: fc.array(tie("part"), { maxLength: 4 }).map((parts) => parts.join("")),
  part: fc.oneof(
    { depthSize: "small", withCrossShrink: true },
    text,
    fc.constantFrom("{name}", "{n, number}", "{filedOn, date, long}", "''", "'{'quoted'}'", "'<b>'"),
    fc
      .tuple(name, tie("message"), tie("message"))
      .map(([n, a, b]) => `{${n}, plural, one {${a}} =0 {} other {#${b}}}`),
    fc
      .tuple(name, tie("message"), tie("message"))
      .map(([n, a, b]) => `{${n}, select, left {${a}} other {${b}}}`),
    tie("message").map((inner) => `<b>${inner}</b>`),
  ),
}));

describe("the test locale", () => {
  it("has every English message, each text of it at least 40 % longer, with the same demands", () => {
    const english = sentencesIn(loadMessages("en"));
    const long = sentencesIn(loadMessages("long"));
    expect(english.length).toBeGreaterThan(0);
    expect(long.map(({ key }) => key)).toEqual(english.map(({ key }) => key));
    for (const [index, { text: message }] of english.entries()) {
      const stretched = long[index]?.text ?? "";
      expect(demandsOf(stretched)).toEqual(demandsOf(message));
      expect(shortfalls(message, stretched), stretched).toEqual([]);
    }
  });

  it("lengthens any message and keeps its arguments, branches and tags", () => {
    fc.assert(
      fc.property(message.filter(isWritten), (one) => {
        const stretched = stretchMessage(one);
        expect(demandsOf(stretched)).toEqual(demandsOf(one));
        expect(shortfalls(one, stretched)).toEqual([]);
      }),
      { numRuns: 1000 },
    );
  });

  it("leaves alone what has no words of its own", () => {
    for (const one of ["{name}", "{a} – {b}", "<b>{n, number}</b>", "", "12"])
      expect(stretchMessage(one)).toBe(one);
  });

  it("reads as English with words after it", () => {
    const messages = { lines: "{n, plural, one {One line} other {# lines}} in <b>{file}</b>." };
    const stretched = { lines: stretchMessage(messages.lines) };
    const t = createTranslator({ locale: "en-GB", messages: stretched });
    const file = "log-0312.csv";
    expect(t.markup("lines", { n: 3, file, b: (inner) => `[${inner}]` })).toBe(
      "3 lines with in [log-0312.csv]. with",
    );
  });
});

/** Whether it is a message at all. An apostrophe before # quotes only where something is counted: nobody writes that. */
function isWritten(one: string): boolean {
  try {
    return textsOf(one).length > 0 && !one.includes("'#");
  } catch {
    return false;
  }
}
