import "server-only";
import { getTranslations } from "next-intl/server";
import { readableCreditValues } from "@/lib/credits/amount-text";
import type { Locale } from "@/lib/kernel/locale";
import type { Refusal } from "@/lib/kernel/outcome";
import type sentences from "@/messages/en/refusals.json";

/** Every code a service may refuse with has a sentence; a new code without one does not compile where it is used. */
export type RefusalCode = keyof typeof sentences;

/** The sentence for a refusal, in the person's language. */
export async function wordingFor(refusal: Refusal<RefusalCode>, locale: Locale): Promise<string> {
  const t = await getTranslations({ locale, namespace: "refusals" });
  return t(refusal.code, readableCreditValues(refusal.detail, locale));
}
