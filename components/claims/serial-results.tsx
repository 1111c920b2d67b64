import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { FamilyGlyph } from "@/components/ui/family-glyph";
import { TextLink } from "@/components/ui/link-button";
import { Serial } from "@/components/ui/serial";
import { claimPath } from "@/lib/claims/paths";
import type { Coverage } from "@/lib/coverage/coverage";
import type { FormAction } from "@/lib/kernel/action-result";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { isCurrency } from "@/lib/kernel/currency";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import { StartButton } from "./start-button";
import { TermLine } from "./term-line";

/** A unit as the start page shows it; the ids only travel in the form. */
export type UnitToShow = {
  unitId: string;
  serial: string;
  partNumber: string;
  partName: string;
  family: string;
  batchCode: string | null;
  sellerName: string;
  invoiceNumber: string;
  invoicedOn: CalendarDay;
  shippedOn: CalendarDay;
  unitPriceMinor: string;
  currency: string;
  fittedOn: CalendarDay | null;
  frameSerial: string | null;
  installerName: string | null;
  ownClaim: string | null;
};

type Found = { unit: UnitToShow; coverage: Coverage };
type ResultsProps = {
  kind: "found" | "similar" | "unknown";
  typed: string;
  found: readonly Found[];
  locale: Locale;
  start: FormAction;
};

/** What the serial answers: the part, its days, its price and its term. One press confirms. */
export function SerialResults({ kind, typed, found, locale, start }: ResultsProps) {
  const t = useTranslations("start");
  if (kind === "unknown")
    return (
      <Banner kind="wanting" title={t("unknownTitle", { serial: typed })}>
        {t("unknown")}
      </Banner>
    );
  return (
    <>
      {kind === "similar" ? (
        <Banner kind="wanting" title={t("similarTitle", { serial: typed })}>
          {t("similar")}
        </Banner>
      ) : null}
      {found.map(({ unit, coverage }) => (
        <UnitCard key={unit.unitId} unit={unit} coverage={coverage} locale={locale} start={start} />
      ))}
    </>
  );
}

function UnitCard({ unit, coverage, locale, start }: Found & { locale: Locale; start: FormAction }) {
  const t = useTranslations("start");
  const currency = unit.currency.trim();
  return (
    <Card
      title={
        <span className="inline-flex items-center gap-2">
          <FamilyGlyph family={unit.family} className="size-6" /> {unit.partName}
        </span>
      }
      note={unit.partNumber}
    >
      <p className="mb-3 text-24">
        <Serial value={unit.serial} />
      </p>
      <TermLine coverage={coverage} locale={locale} />
      <Facts columns={2}>
        <Fact term={t("batch")}>{unit.batchCode ?? t("notGiven")}</Fact>
        <Fact term={t("bought")}>
          {t("boughtFrom", { seller: unit.sellerName, day: formatDay(unit.invoicedOn, locale) })}
        </Fact>
        <Fact term={t("invoice")}>{unit.invoiceNumber}</Fact>
        <Fact term={t("price")}>
          {isCurrency(currency)
            ? formatMoney(money(BigInt(unit.unitPriceMinor), currency), locale)
            : unit.unitPriceMinor}
        </Fact>
        <Fact term={t("fitted")}>
          {unit.fittedOn
            ? t("fittedBy", {
                day: formatDay(unit.fittedOn, locale),
                by: unit.installerName ?? t("somebody"),
              })
            : t("notRecorded")}
        </Fact>
        <Fact term={t("vehicle")}>
          {unit.frameSerial ? <Serial value={unit.frameSerial} /> : t("notRecorded")}
        </Fact>
      </Facts>
      {unit.ownClaim ? (
        <p className="mt-3">
          {t("ownClaim")} <TextLink href={claimPath({ number: unit.ownClaim })}>{t("openOwnClaim")}</TextLink>
        </p>
      ) : null}
      <div className="mt-4">
        <StartButton start={start} fields={{ unitId: unit.unitId }} label={t("startWithThis")} />
      </div>
    </Card>
  );
}
