import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { Serial } from "@/components/ui/serial";
import { ClaimMark, CreditMark, PartMark } from "@/components/ui/status-mark";
import type { LineView } from "@/lib/claims/sheet/view";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import { CoverageSteps } from "./coverage-steps";
import type { SheetProps } from "./shared";

type LineCardProps = SheetProps & { line: LineView; isInCharge: boolean };

/** One line of the claim: the unit, its days and its price, and whether it is covered, step by step. */
export function LineCard({ line, sheet, locale, isInCharge }: LineCardProps) {
  const t = useTranslations("sheet.line");
  // The card of the part called in is what the workshop has to do now.
  const isToSend =
    sheet.side === "workshop" && sheet.lines.some(({ returnState }) => returnState === "awaited");
  const day = (text: string | null) => (text ? formatDay(calendarDay(text), locale) : t("notGiven"));
  return (
    <Card
      isInCharge={isInCharge && !isToSend}
      title={line.partName}
      note={line.partNumber}
      actions={line.verdict ? <ClaimMark state={line.verdict} /> : undefined}
    >
      <p className="mb-3 flex flex-wrap items-baseline gap-3">
        {line.serial ? (
          <Serial value={line.serial} className="text-20" />
        ) : (
          t("quantity", { quantity: line.quantity })
        )}
        {line.serial && !line.isKnownUnit ? <span className="text-wanting">{t("unknownUnit")}</span> : null}
      </p>
      <Facts columns={2}>
        <Fact term={t("batch")}>{line.batch ?? t("notGiven")}</Fact>
        <Fact term={t("position")}>{t(`positions.${line.position}`)}</Fact>
        <Fact term={t("invoice")}>
          {line.invoice
            ? t("invoiceLine", { number: line.invoice.number, line: line.invoice.line })
            : t("notGiven")}
        </Fact>
        <Fact term={t("shippedOn")}>{day(line.invoice?.shippedOn ?? null)}</Fact>
        <Fact term={t("fittedOn")}>{day(line.fittedOn)}</Fact>
        <Fact term={t("installer")}>{line.installer ?? t("notGiven")}</Fact>
        <Fact term={t("failedOn")}>{day(sheet.facts?.failedOn ?? null)}</Fact>
        <Fact term={t("vehicle")}>
          {sheet.facts ? <Serial value={sheet.facts.vehicle.frameSerial} /> : t("notGiven")}
        </Fact>
        <Fact term={t("replacement")}>
          {line.replacement
            ? t.rich("replacedBy", {
                serial: () => <Serial value={line.replacement?.serial ?? ""} />,
                day: day(line.replacement.fittedOn),
              })
            : t("notGiven")}
        </Fact>
        <Fact term={t("asked")}>{formatMoney(line.asked, locale)}</Fact>
        <Fact term={t("part")}>
          <PartMark state={line.returnState === "notSentInTime" ? "notSent" : line.returnState} />
        </Fact>
        <Fact term={t("credit")}>
          <CreditMark state={line.creditState} />
        </Fact>
      </Facts>
      {line.coverage ? (
        <div className="mt-5">
          <h3 className="mb-2 text-18">{t("cover")}</h3>
          <CoverageSteps coverage={line.coverage} locale={locale} />
        </div>
      ) : null}
    </Card>
  );
}
