import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatNumber, formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { claimsAddress } from "@/lib/reports/life-curves/address";
import type { CurveStep, LifeCurvesView, Series } from "@/lib/reports/life-curves/view";

type Props = { view: LifeCurvesView; locale: Locale };

/** Every fall of the curves in figures, each with its claims. */
export function StepTable({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.curve");
  const all = [...view.series, ...(view.rest ? [view.rest] : [])];
  return (
    <Table caption={t("stepsCaption")} isCaptionShown onPhone="scroll">
      <TableHead>
        <Th>{t("columns.curve")}</Th>
        <Th isNumeric>{t("columns.age")}</Th>
        <Th isNumeric>{t("columns.atRisk")}</Th>
        <Th isNumeric>{t("columns.failed")}</Th>
        <Th isNumeric>{t("columns.survival")}</Th>
        <Th isNumeric>{t("columns.limits")}</Th>
      </TableHead>
      <TableBody>
        {all.flatMap((series) =>
          series.curve
            .filter(({ failed }) => failed > 0)
            .map((step) => (
              <StepRow
                key={`${series.key ?? ""}${step.ageDays}`}
                series={series}
                step={step}
                view={view}
                locale={locale}
              />
            )),
        )}
      </TableBody>
    </Table>
  );
}

function StepRow({ series, step, view, locale }: Props & { series: Series; step: CurveStep }) {
  const t = useTranslations("lifeCurves");
  const share = (value: number) => formatPercent(value, locale, { least: 1 });
  const drawn = view.series.flatMap(({ key }) => (key === null ? [] : [key]));
  const range = { fromDays: step.ageDays, toDays: step.ageDays };
  const behind =
    series.key === null ? { batches: drawn, isOthers: true, ...range } : { batches: [series.key], ...range };
  return (
    <Row>
      <RowHead>{series.key ?? t("curve.others")}</RowHead>
      <Td isNumeric>{formatNumber(step.ageDays, locale)}</Td>
      <Td isNumeric>{formatNumber(step.atRisk, locale)}</Td>
      <Td isNumeric>
        <TextLink href={claimsAddress({ ...view.query, batch: drawn }, behind)}>
          {formatNumber(step.failed, locale)}
        </TextLink>
      </Td>
      <Td isNumeric>{share(step.survival)}</Td>
      <Td isNumeric>
        {step.lower === null || step.upper === null
          ? t("curve.noLimits")
          : `${share(step.lower)} – ${share(step.upper)}`}
      </Td>
    </Row>
  );
}
