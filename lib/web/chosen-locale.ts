import { isLocale, type Locale } from "@/lib/kernel/locale";

/** The cookie with the language chosen on this browser; sign-in and the language switch set it. */
export const LOCALE_COOKIE = "locale";

const LANGUAGES = ["en", "de"] as const satisfies readonly Locale[];

/** What is known about the language of a reader, the strongest first. */
export type LanguageHints = {
  /** What the code that asks for a sentence names: a locale, or a tag such as `de-DE`. */
  readonly named?: string | undefined;
  /** What the person chose on this browser, and what they chose for good. */
  readonly chosen: readonly (string | undefined)[];
  readonly acceptLanguage: string | null;
  readonly hasTestLocales: boolean;
};

/** The language to answer in; English where nothing is known. The test locale only where it is let in. */
export function chosenLocale({ named, chosen, acceptLanguage, hasTestLocales }: LanguageHints): Locale {
  const isOffered = (text: string | undefined): text is Locale =>
    text !== undefined && isLocale(text) && (text !== "long" || hasTestLocales);
  if (isOffered(named)) return named;
  return languageOf(named ?? "") ?? chosen.find(isOffered) ?? firstLanguage(acceptLanguage ?? "") ?? "en";
}

const languageOf = (tag: string) =>
  LANGUAGES.find((language) => tag.toLowerCase().split("-")[0] === language);

/** The product's language that an Accept-Language header ranks first (RFC 9110, 12.5.4). */
function firstLanguage(header: string): Locale | undefined {
  const ranges = header.slice(0, 1000).split(",");
  return ranges
    .map((range) => {
      const [tag = "", weight] = range.trim().split(/\s*;\s*q=/i);
      return { language: languageOf(tag), weight: weight === undefined ? 1 : Number(weight) };
    })
    .filter(({ weight }) => weight > 0)
    .toSorted((a, b) => b.weight - a.weight)
    .find(({ language }) => language !== undefined)?.language;
}
