import { useTranslations } from "next-intl";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import type { ResultView } from "@/lib/imports/view";
import { formatMoney, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

const COUNTS = ["invoiceLines", "units", "batches", "unchanged"] as const;

/** How much an import writes or wrote: counts, and a sum for each currency. */
export function ImportFigures({ result, locale }: { result: ResultView; locale: Locale }) {
  const t = useTranslations("imports.preview");
  return (
    <div className="grid max-w-measure">
      {COUNTS.map((name) => (
        <MoneyLine key={name} label={t(name)} amount={formatNumber(result[name], locale)} />
      ))}
      {result.sums.map((sum) => (
        <MoneyTotal
          key={sum.currency}
          label={t("sum", { currency: sum.currency })}
          amount={formatMoney(sum, locale)}
        />
      ))}
    </div>
  );
}
