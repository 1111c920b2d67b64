import { useTranslations } from "next-intl";
import { ChartFrame } from "@/components/chart/chart-frame";
import { WeibullDrawing } from "@/components/chart/weibull-drawing";
import { Card } from "@/components/ui/card";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { MONTH_DAYS } from "@/lib/reliability/months";
import { claimsAddress } from "@/lib/reports/life-curves/address";
import type { Estimate, LifeCurvesView, Series } from "@/lib/reports/life-curves/view";
import { Counted } from "./counted";
import { withLimits } from "./figures";

type Props = { view: LifeCurvesView; locale: Locale };

const months = ({ value, lower, upper }: Estimate): Estimate => ({
  value: value / MONTH_DAYS,
  lower: lower / MONTH_DAYS,
  upper: upper === null ? null : upper / MONTH_DAYS,
});

/** Probability plot and fits of what the life curves draw, or why a fit does not exist. */
export function WeibullCard({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.weibull");
  const names = useTranslations("lifeCurves.curve");
  const say = useTranslations("lifeCurves.batches");
  const all = [...view.series, ...(view.rest ? [view.rest] : [])];
  const [first] = all;
  if (!first) return null;
  const drawn = view.series.flatMap(({ key }) => (key === null ? [] : [key]));
  const fitted = all.find(({ weibull }) => weibull.kind === "fit")?.weibull;
  const name = first.key ?? names("others");
  const headline =
    first.weibull.kind === "fit"
      ? t("headline", {
          name,
          shape: withLimits(first.weibull.shape, locale, say),
          says: t(`says.${first.weibull.says}`),
        })
      : t("headlineNone", { name });
  return (
    <Card id="weibull" title={t("title")}>
      <ChartFrame
        headline={headline}
        headingLevel={3}
        counted={<Counted view={view} locale={locale} />}
        table={<FitTable all={all} locale={locale} />}
      >
        <div className="grid gap-4">
          <WeibullDrawing
            series={view.series}
            rest={view.rest}
            title={t("title")}
            description={t("description")}
            opens={(key, fromDays, toDays) =>
              claimsAddress(
                { ...view.query, batch: drawn },
                key === null
                  ? { batches: drawn, isOthers: true, fromDays, toDays }
                  : { batches: [key], fromDays, toDays },
              )
            }
            locale={locale}
          />
          <FitNotes all={all} />
          {fitted?.kind === "fit" ? (
            <p className="max-w-measure text-small text-ink-2">
              {t("method", { method: fitted.b10Method })} {t("bTen")}
            </p>
          ) : null}
        </div>
      </ChartFrame>
    </Card>
  );
}

type ListProps = { all: readonly Series[]; locale: Locale };

function FitTable({ all, locale }: ListProps) {
  const t = useTranslations("lifeCurves.weibull");
  const names = useTranslations("lifeCurves.curve");
  const say = useTranslations("lifeCurves.batches");
  const limits = (estimate: Estimate) => withLimits(estimate, locale, say);
  return (
    <Table caption={t("caption")} onPhone="scroll">
      <TableHead>
        <Th>{t("columns.curve")}</Th>
        <Th isNumeric>{t("columns.failed")}</Th>
        <Th isNumeric>{t("columns.shape")}</Th>
        <Th isNumeric>{t("columns.scale")}</Th>
        <Th isNumeric>{t("columns.b10")}</Th>
        <Th>{t("columns.says")}</Th>
      </TableHead>
      <TableBody>
        {all.map(({ key, weibull, oldestDays }) => (
          <Row key={key ?? ""}>
            <RowHead>{key ?? names("others")}</RowHead>
            <Td label={t("columns.failed")} isNumeric>
              {formatNumber(weibull.failed, locale)}
            </Td>
            <Td label={t("columns.shape")} isNumeric>
              {weibull.kind === "fit" ? limits(weibull.shape) : null}
            </Td>
            <Td label={t("columns.scale")} isNumeric>
              {weibull.kind === "fit" ? limits(months(weibull.scaleDays)) : null}
            </Td>
            <Td label={t("columns.b10")} isNumeric>
              {weibull.kind === "fit" ? (
                <span className="inline-grid">
                  {limits(months(weibull.b10Days))}
                  {weibull.b10Days.value > oldestDays ? (
                    <span className="text-small text-ink-2">{t("beyond")}</span>
                  ) : null}
                </span>
              ) : null}
            </Td>
            <Td label={t("columns.says")}>
              {weibull.kind === "fit" ? t(`says.${weibull.says}`) : t(`none.${weibull.reason}`)}
            </Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}

/** In sight even where the table is folded: fits on few failures, and curves without a fit. */
function FitNotes({ all }: Pick<ListProps, "all">) {
  const t = useTranslations("lifeCurves.weibull");
  const names = useTranslations("lifeCurves.curve");
  const notes = all.flatMap(({ key, weibull }) => {
    const name = key ?? names("others");
    if (weibull.kind === "none") return [{ name, words: t(`none.${weibull.reason}`) }];
    return weibull.isThin ? [{ name, words: t("thin") }] : [];
  });
  return (
    <ul className="grid max-w-measure gap-1 text-wanting">
      {notes.map(({ name, words }) => (
        <li key={name}>
          <span className="font-semibold">{name}</span>: {words}
        </li>
      ))}
    </ul>
  );
}
