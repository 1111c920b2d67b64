/** The languages of the product. `long` is the test locale: English words stretched by 40 %, English formats. */
export const LOCALES = ["en", "de", "long"] as const;
export type Locale = (typeof LOCALES)[number];

/** True for a language tag the product has messages for. */
export const isLocale = (text: string): text is Locale => LOCALES.some((locale) => locale === text);

/** The BCP 47 tag that number and date formats follow; English is British English. */
export const formatTag = (locale: Locale): string => (locale === "de" ? "de-DE" : "en-GB");
