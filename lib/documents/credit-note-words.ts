import "server-only";
import { createTranslator, type Messages as AnyMessages } from "use-intl/core";
import { readableCreditValues } from "@/lib/credits/amount-text";
import type { Currency } from "@/lib/kernel/currency";
import type { Step } from "@/lib/kernel/explanation";
import { formatMoney } from "@/lib/kernel/format";
import { formatTag, type Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import { loadMessages } from "@/lib/web/messages";

export type Words = (key: string, values?: Record<string, string | number>) => string;

/** The sentences of a document, outside of any request. A missing one throws. */
export function wordsOf(locale: Locale): Words {
  const messages: AnyMessages = loadMessages(locale);
  return createTranslator({
    locale: formatTag(locale),
    messages,
    onError: (error) => {
      throw error;
    },
  });
}

/** How amounts of one document are written. */
export const amountsOf =
  (currency: Currency, locale: Locale) =>
  (minor: bigint): string =>
    formatMoney(money(minor, currency), locale);

/** A step as a sentence with its figure: "7 of 24 months ...: 145.55 (rule G 1 (2024-01-01))". */
export function stepInWords({ rule, input, result, source }: Step, t: Words, locale: Locale): string {
  const { figure = "" } = readableCreditValues({ figure: result }, locale);
  const sentence = `${t(`creditSteps.${rule}`, readableCreditValues(input, locale))}: ${figure}`;
  return source ? `${sentence} ${t("credits.card.source", { source })}` : sentence;
}
