import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import type { Locale } from "@/lib/kernel/locale";
import { stretchMessage } from "./stretch";

/** Sentences by name, in namespaces: `messages/en/refusals.json` is the namespace `refusals`. */
export type Messages = { readonly [name: string]: string | Messages };

const loaded = new Map<Locale, Messages>();

/**
 * Every sentence of a language, for pages, mails and documents alike. `long` is English, stretched. Read from the
 * project's folder once in production, and anew each time elsewhere, so that an edit shows on reload. Throws Error
 * for a file that holds anything but sentences.
 */
export function loadMessages(locale: Locale): Messages {
  const kept = loaded.get(locale);
  if (kept !== undefined) return kept;
  const messages = locale === "long" ? stretched(read("en")) : read(locale);
  if (process.env.NODE_ENV === "production") loaded.set(locale, messages);
  return messages;
}

function read(language: Exclude<Locale, "long">): Messages {
  const folder = join(process.cwd(), "messages", language);
  const files = readdirSync(folder).filter((name) => name.endsWith(".json"));
  return Object.fromEntries(
    files.toSorted().map((name) => {
      const tree: unknown = JSON.parse(readFileSync(join(folder, name), "utf8"));
      if (!isMessages(tree))
        throw new Error(`messages/${language}/${name} holds something that is no sentence`);
      return [name.slice(0, -".json".length), tree];
    }),
  );
}

const isMessages = (tree: unknown): tree is Messages =>
  typeof tree === "object" &&
  tree !== null &&
  !Array.isArray(tree) &&
  Object.values(tree).every((value) => typeof value === "string" || isMessages(value));

const stretched = (messages: Messages): Messages =>
  Object.fromEntries(
    Object.entries(messages).map(([name, value]) => [
      name,
      typeof value === "string" ? stretchMessage(value) : stretched(value),
    ]),
  );
