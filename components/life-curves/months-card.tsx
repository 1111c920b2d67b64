import { useTranslations } from "next-intl";
import { ChartFrame } from "@/components/chart/chart-frame";
import { MonthRatesDrawing } from "@/components/chart/month-rates-drawing";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { claimsAddress } from "@/lib/reports/life-curves/address";
import { MONTH_DAYS } from "@/lib/reliability/months";
import type { LifeCurvesView, MonthLine } from "@/lib/reports/life-curves/view";
import { Counted } from "./counted";
import { figure, withLimits } from "./figures";

type Props = { view: LifeCurvesView; locale: Locale };

/** When in its life the first batch drawn fails, against the others at the same ages. */
export function MonthsCard({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.months");
  const say = useTranslations("lifeCurves.batches");
  const batch = view.series[0]?.key;
  if (!batch || view.months.length === 0) return null;
  const failing = view.months.filter(({ failed }) => failed > 0);
  const worst = failing.toSorted((a, b) => (b.rate?.value ?? 0) - (a.rate?.value ?? 0))[0];
  const opens = ({ fromDays, toDays }: MonthLine) =>
    claimsAddress(view.query, { batches: [batch], fromDays: Math.max(1, fromDays), toDays });
  return (
    <Card id="months" title={t("title")}>
      <ChartFrame
        headingLevel={3}
        headline={
          worst
            ? t("headline", {
                batch,
                from: formatNumber(worst.month, locale),
                to: formatNumber(worst.month + 1, locale),
                rate: worst.rate ? withLimits(worst.rate, locale, say) : "0",
              })
            : t("headlineNone", { batch })
        }
        counted={
          <>
            {t("counted")} <Counted view={view} locale={locale} />
          </>
        }
        table={<MonthTable view={view} batch={batch} opens={opens} locale={locale} />}
      >
        <MonthRatesDrawing
          months={view.months}
          title={t("title")}
          description={t("description")}
          opens={opens}
          locale={locale}
        />
        <p className="max-w-measure text-small text-ink-2">{t("description")}</p>
      </ChartFrame>
    </Card>
  );
}

type TableProps = Props & { batch: string; opens: (month: MonthLine) => `/life-curves/claims?${string}` };

function MonthTable({ view, batch, opens, locale }: TableProps) {
  const t = useTranslations("lifeCurves.months");
  const say = useTranslations("lifeCurves.batches");
  return (
    <Table caption={t("caption", { batch })} onPhone="scroll">
      <TableHead>
        <Th>{t("columns.month")}</Th>
        <Th isNumeric>{t("columns.atRisk")}</Th>
        <Th isNumeric>{t("columns.failed")}</Th>
        <Th isNumeric>{t("columns.months")}</Th>
        <Th isNumeric>{t("columns.rate")}</Th>
        <Th isNumeric>{t("columns.others")}</Th>
      </TableHead>
      <TableBody>
        {view.months.map((line) => (
          <Row key={line.month}>
            <RowHead>{t("span", { from: line.month, to: line.month + 1 })}</RowHead>
            <Td isNumeric>{formatNumber(line.atRisk, locale)}</Td>
            <Td isNumeric>
              {line.failed > 0 ? (
                <TextLink
                  href={opens(line)}
                  aria-label={t("open", { from: line.month, to: line.month + 1, failed: line.failed })}
                >
                  {formatNumber(line.failed, locale)}
                </TextLink>
              ) : (
                "0"
              )}
            </Td>
            <Td isNumeric>{formatNumber(line.unitDays / MONTH_DAYS, locale, { least: 1, most: 1 })}</Td>
            <Td isNumeric>{line.rate ? withLimits(line.rate, locale, say) : null}</Td>
            <Td isNumeric>{line.others === null ? null : figure(line.others, locale)}</Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
