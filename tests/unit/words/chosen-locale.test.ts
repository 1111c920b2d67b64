import { describe, expect, it } from "vitest";
import { chosenLocale, type LanguageHints } from "@/lib/web/chosen-locale";

const chosen = (hints: Partial<LanguageHints>) =>
  chosenLocale({ chosen: [], acceptLanguage: null, hasTestLocales: false, ...hints });

describe("the language of an answer", () => {
  it("is the one the code names, whatever the reader chose", () => {
    expect(chosen({ named: "de", chosen: ["en"], acceptLanguage: "en" })).toBe("de");
    expect(chosen({ named: "de-DE", chosen: ["en"] })).toBe("de");
    expect(chosen({ named: "en-GB", chosen: ["de"] })).toBe("en");
  });

  it("is the reader's choice on this browser, then their choice for good, then the browser's wish", () => {
    expect(chosen({ chosen: ["de", "en"], acceptLanguage: "en" })).toBe("de");
    expect(chosen({ chosen: [undefined, "de"], acceptLanguage: "en" })).toBe("de");
    expect(chosen({ chosen: [undefined, undefined], acceptLanguage: "de" })).toBe("de");
    expect(chosen({ chosen: ["fr", "../../etc"], acceptLanguage: "de" })).toBe("de");
  });

  it.each([
    [null, "en"],
    ["", "en"],
    ["fr-FR, fr;q=0.9", "en"],
    ["de-AT,de;q=0.9,en;q=0.8", "de"],
    ["fr, en;q=0.4, de;q=0.6", "de"],
    ["de;q=0, en;q=0.1", "en"],
    ["de;q=0", "en"],
    ["DE", "de"],
    ["*", "en"],
    ["den, eng", "en"],
    [";q=,;;q=x,de;q=abc", "en"],
    ["x,".repeat(100_000) + "de", "en"],
  ])("follows the header %s", (acceptLanguage, language) => {
    expect(chosen({ acceptLanguage })).toBe(language);
  });

  it("is the test locale only where that is let in", () => {
    expect(chosen({ chosen: ["long", "de"] })).toBe("de");
    expect(chosen({ named: "long", chosen: ["de"] })).toBe("de");
    expect(chosen({ chosen: ["long", "de"], hasTestLocales: true })).toBe("long");
    expect(chosen({ named: "long", hasTestLocales: true })).toBe("long");
  });
});
