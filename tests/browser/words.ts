import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { createTranslator } from "use-intl/core";

const MESSAGES = join(import.meta.dirname, "../../messages");

export type Words = (key: string, values?: Record<string, string | number>) => string;

/** The sentences of the product in one language, by namespace and key, so that a walk can be walked in either. */
export function wordsIn(locale: "en" | "de"): Words {
  const folder = join(MESSAGES, locale);
  const messages = Object.fromEntries(
    readdirSync(folder).map((name) => [
      name.replace(".json", ""),
      JSON.parse(readFileSync(join(folder, name), "utf8")),
    ]),
  );
  const t = createTranslator({ locale, messages });
  return (key, values) => {
    const sentence = t(key, values);
    if (sentence === key) throw new Error(`${locale} has no sentence ${key}`);
    return sentence;
  };
}
