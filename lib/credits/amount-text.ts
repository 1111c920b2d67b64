import { isCurrency, type Currency } from "@/lib/kernel/currency";
import { formatDecimal, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money, parseMoney, toDecimalString, type Money } from "@/lib/kernel/money";
import { readableValues } from "@/lib/kernel/readable";

/** An amount as the steps of a credit hold it, the same in every language: "145.55 GBP". */
export const amountText = (minor: bigint, currency: Currency): string =>
  `${toDecimalString(money(minor, currency))} ${currency}`;

/** The amount a text of this form stands for, or null. */
export function readAmountText(text: string): Money | null {
  const [figures = "", code = "", ...more] = text.split(" ");
  if (more.length > 0 || !isCurrency(code) || figures.includes(",")) return null;
  const read = parseMoney(figures, code);
  return read.ok ? read.value : null;
}

/** The values of a step as people of a language write them: amounts with their currency, days as days, rates without zeros. */
export const readableCreditValues = (
  values: Readonly<Record<string, string | number>>,
  locale: Locale,
): Record<string, string | number> =>
  Object.fromEntries(
    Object.entries(readableValues(values, locale)).map(([name, value]) => {
      if (name === "taxRate") return [name, formatDecimal(String(value), locale)];
      const amount = typeof value === "string" ? readAmountText(value) : null;
      return [name, amount ? formatMoney(amount, locale) : value];
    }),
  );
