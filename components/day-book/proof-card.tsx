import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import { disproofs, type Sums } from "@/lib/day-book/book/proof";
import { formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";

/** The sums that prove themselves: credited = the sum of the notes = allocated + open, each from its own place. */
export function ProofCard({ sums, locale }: { sums: readonly Sums[]; locale: Locale }) {
  const t = useTranslations("dayBook.proof");
  if (sums.length === 0) return null;
  return (
    <Card id="proof" title={t("title")} note={t("note")}>
      <div className="grid gap-6 lg:grid-cols-2">
        {sums.map((one) => (
          <CurrencyProof key={one.currency} sums={one} locale={locale} />
        ))}
      </div>
    </Card>
  );
}

function CurrencyProof({ sums, locale }: { sums: Sums; locale: Locale }) {
  const t = useTranslations("dayBook.proof");
  const amount = (minor: bigint) => formatMoney(money(minor, sums.currency), locale);
  const failed = disproofs(sums);
  return (
    <div className="grid content-start gap-3">
      <h3 className="text-18">{sums.currency}</h3>
      <div>
        <MoneyLine label={t("credited")} amount={amount(sums.creditedMinor)} />
        <MoneyLine label={t("allocated")} amount={amount(sums.allocatedMinor)} />
        <MoneyLine label={t("open")} amount={amount(sums.openMinor)} />
        <MoneyLine label={t("owed")} amount={amount(sums.owedMinor)} />
        <MoneyTotal label={t("notes")} amount={amount(sums.notesMinor)} />
      </div>
      {failed.length === 0 ? (
        <Banner kind="proven">{t("agrees")}</Banner>
      ) : (
        <Banner kind="refused" title={t("failed")}>
          {failed.map((one) => t(`fails.${one}`)).join(" ")}
        </Banner>
      )}
    </div>
  );
}
