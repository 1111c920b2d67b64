import { useTranslations } from "next-intl";
import { formatMoney } from "@/lib/kernel/format";
import { keysOf } from "@/lib/kernel/keys";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import type { CreditRules } from "@/lib/rule-book/credit-shape";
import { AnswerTable } from "./answer-table";

/** How a distributor credits: rounding, numbers, what each kind of line is settled by, what is taken off. */
export function CreditTable({ rules, locale }: { rules: CreditRules; locale: Locale }) {
  const t = useTranslations("ruleBook.credit");
  const { handling, currency } = rules;
  return (
    <AnswerTable
      caption={t("caption")}
      heads={[t("question"), t("answer")]}
      answers={[
        { question: t("rounding"), answer: t(`roundingOf.${rules.rounding}`) },
        { question: t("prefix"), answer: rules.notePrefix },
        ...keysOf(rules.settledBy).map((kind) => ({
          question: t(`kinds.${kind}`),
          answer: t(`settledBy.${rules.settledBy[kind]}`),
        })),
        {
          question: t("handling"),
          answer: handling
            ? t("handlingOf", {
                amount: formatMoney(money(handling.amountMinor, currency), locale),
                reason: handling.reason,
              })
            : t("noHandling"),
        },
        { question: t("currency"), answer: currency },
      ]}
    />
  );
}
