import { useTranslations } from "next-intl";
import type { NotGiven } from "@/lib/credits/credit";
import type { NoteDocument } from "@/lib/credits/note-document";
import type { Currency } from "@/lib/kernel/currency";
import { formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import { CreditSteps } from "./steps";

type WhyProps = {
  explained: NoteDocument["explained"];
  steps: NoteDocument["steps"];
  locale: Locale;
};

/** "Why this amount?": line by line, then the document; it opens without script and is open on paper. */
export function Why({ explained, steps, locale }: WhyProps) {
  const t = useTranslations("credits.card");
  const words = useTranslations("creditSteps.kinds");
  return (
    <details className="print-open">
      <summary className="min-h-target cursor-pointer py-2 text-petrol underline underline-offset-4">
        {t("why")}
      </summary>
      <div className="grid gap-4 pt-2">
        {explained.map((line) => (
          <section key={`${line.lineNumber} ${line.kind}`} className="grid gap-1">
            <h4 className="font-text font-semibold">
              {t("line", { line: line.lineNumber, kind: words(line.kind) })}
            </h4>
            <CreditSteps steps={line.steps} locale={locale} />
          </section>
        ))}
        <section className="grid gap-1">
          <h4 className="font-text font-semibold">{t("document")}</h4>
          <CreditSteps steps={steps} locale={locale} />
        </section>
      </div>
    </details>
  );
}

type NotGivenProps = { notGiven: readonly NotGiven[]; currency: Currency; locale: Locale };

/** What was asked for and is not given, each with its reason. */
export function NotGivenList({ notGiven, currency, locale }: NotGivenProps) {
  const t = useTranslations("credits.card");
  const words = useTranslations("creditSteps");
  if (notGiven.length === 0) return null;
  return (
    <div>
      <h3 className="mb-1 font-text font-semibold">{t("notGiven")}</h3>
      <ul className="grid list-disc gap-1 pl-5 text-small">
        {notGiven.map((one) => {
          const values = {
            line: one.lineNumber,
            kind: words(`kinds.${one.kind}`),
            reason: words(`notGiven.${one.reason}`),
          };
          const less = one.askedMinor - one.givenMinor;
          return (
            <li key={`${one.lineNumber} ${one.kind} ${one.reason}`}>
              {less > 0n
                ? t("notGivenLine", { ...values, amount: formatMoney(money(less, currency), locale) })
                : t("notGivenWhole", values)}
            </li>
          );
        })}
      </ul>
    </div>
  );
}
