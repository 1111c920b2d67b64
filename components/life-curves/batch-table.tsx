import { useTranslations } from "next-intl";
import { RateDot } from "@/components/chart/rate-dots";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { SignalMark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatMonth, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { claimsAddress, curvesAddress } from "@/lib/reports/life-curves/address";
import { GRADE_LIMITS, type Grade } from "@/lib/reliability/batch-grade";
import { MOST_DRAWN } from "@/lib/reports/life-curves/schema";
import { rateScale } from "@/lib/reports/life-curves/rate-scale";
import type { BatchLine, LifeCurvesView } from "@/lib/reports/life-curves/view";
import { figure, inMonths, pValue, withLimits } from "./figures";

type Props = { view: LifeCurvesView; locale: Locale };

/** Colour and weight of a batch's dot: what does not shout is drawn in the ink of context. */
const INK: Readonly<Record<Grade, string>> = {
  act: "var(--refused)",
  lookInto: "var(--wanting)",
  quiet: "var(--ink-2)",
  notYetKnown: "var(--ink-3)",
};

/** Every batch of the part, the one furthest above the others first. */
export function BatchTable({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.batches");
  const most = rateScale(view.batches);
  return (
    <Card
      id="batches"
      isInCharge
      title={t("title", { part: view.part.partNumber })}
      note={t("note", { count: view.comparisons })}
    >
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("columns.batch")}</Th>
          <Th>{t("columns.grade")}</Th>
          <Th isNumeric>{t("columns.units")}</Th>
          <Th isNumeric>{t("columns.failed")}</Th>
          <Th>
            {t("columns.rate")}
            <span className="block font-normal">
              {t("columns.dots", { most: formatNumber(most, locale) })}
            </span>
          </Th>
          <Th>{t("columns.ratio")}</Th>
          <Th isNumeric>{t("columns.p")}</Th>
          <Th>
            <span className="print:hidden">{t("columns.figure")}</span>
          </Th>
        </TableHead>
        <TableBody>
          {view.batches.map((batch) => (
            <BatchRow key={batch.key} batch={batch} view={view} most={most} locale={locale} />
          ))}
        </TableBody>
      </Table>
      <div className="mt-4 grid max-w-measure gap-1 text-small text-ink-2">
        <p>{t("test", { count: view.comparisons })}</p>
        <p>
          {t("rules", {
            lookInto: formatNumber(GRADE_LIMITS.lookP, locale, { least: 2 }),
            act: formatNumber(GRADE_LIMITS.actP, locale, { least: 2 }),
            ratio: formatNumber(GRADE_LIMITS.actRatio, locale, { least: 1 }),
            failures: GRADE_LIMITS.actFailures,
          })}
        </p>
        <p>{t("limits")}</p>
      </div>
    </Card>
  );
}

type RowProps = Props & { batch: BatchLine; most: number };

function BatchRow({ batch, view, most, locale }: RowProps) {
  const t = useTranslations("lifeCurves.batches");
  const why = useTranslations("lifeCurves.reasons");
  return (
    <Row isAlarming={batch.grade === "act"}>
      <RowHead>
        <span className="font-mono font-semibold">{batch.key}</span>
        {batch.madeOn ? (
          <span className="block text-small whitespace-nowrap text-ink-2">
            {t("made", { month: formatMonth(batch.madeOn, locale) })}
          </span>
        ) : null}
      </RowHead>
      <Td label={t("columns.grade")}>
        <span className="inline-grid gap-0.5 py-1">
          <span>
            <SignalMark state={batch.grade} />
          </span>
          <span className="text-small text-ink-2">{why(batch.reason)}</span>
        </span>
      </Td>
      <Td label={t("columns.units")} isNumeric>
        {formatNumber(batch.units, locale)}
        <span className="block text-small text-ink-2">
          {t("service", { months: formatNumber(batch.unitMonths, locale, { most: 0 }) })}
        </span>
        <span className="block text-small text-ink-2">
          {t("oldest", { months: inMonths(batch.oldestDays, locale) })}
        </span>
      </Td>
      <Td label={t("columns.failed")} isNumeric>
        {batch.failed > 0 ? (
          <TextLink href={claimsAddress(view.query, { batches: [batch.key], fromDays: 1 })}>
            {formatNumber(batch.failed, locale)}
          </TextLink>
        ) : (
          "0"
        )}
        {batch.deadOnArrival > 0 ? (
          <span className="block text-small text-ink-2">{t("doa", { count: batch.deadOnArrival })}</span>
        ) : null}
      </Td>
      <Td label={t("columns.rate")}>
        <RateCell batch={batch} view={view} most={most} locale={locale} />
      </Td>
      <Td label={t("columns.ratio")}>
        <RatioCell batch={batch} view={view} locale={locale} />
      </Td>
      <Td label={t("columns.p")} isNumeric>
        {batch.adjustedP === null
          ? t("noP")
          : pValue(batch.adjustedP, locale, (least) => t("small", { least }))}
      </Td>
      <Td label={t("columns.figure")}>
        <span className="print:hidden">
          <DrawLink batch={batch} view={view} />
        </span>
      </Td>
    </Row>
  );
}

function RateCell({ batch, view, most, locale }: RowProps) {
  const t = useTranslations("lifeCurves.batches");
  if (!batch.rate) return t("noRate");
  const words = withLimits(batch.rate, locale, t);
  return (
    <span className="inline-grid">
      <RateDot
        rate={batch.rate}
        expected={
          batch.expected !== null && batch.unitMonths > 0 ? (1000 * batch.expected) / batch.unitMonths : null
        }
        most={most}
        ink={INK[batch.grade]}
        isFilled={batch.grade === "act" || batch.grade === "lookInto"}
        href={claimsAddress(view.query, { batches: [batch.key], fromDays: 1 })}
        label={t("openOne", { batch: batch.key, rate: words })}
      />
      <span className="text-small tabular-nums">{words}</span>
    </span>
  );
}

function RatioCell({ batch, view, locale }: Props & { batch: BatchLine }) {
  const t = useTranslations("lifeCurves.batches");
  if (!batch.ratio) return t("noRatio");
  return (
    <span className="inline-grid min-w-32 tabular-nums">
      <span className={batch.grade === "act" ? "font-semibold" : undefined}>
        {withLimits(batch.ratio, locale, t)}
      </span>
      <span className="text-small text-ink-2">
        {t("observed", {
          failed: formatNumber(batch.failed, locale),
          expected: figure(batch.expected ?? 0, locale),
        })}
      </span>
      {batch.ratioWithout && view.largest && (batch.grade === "act" || batch.grade === "lookInto") ? (
        <span className="text-small text-ink-2">
          {t("without", { name: view.largest.name, ratio: withLimits(batch.ratioWithout, locale, t) })}
        </span>
      ) : null}
    </span>
  );
}

/** Five are drawn at most; each row says whether it is, and changes that by a link. */
function DrawLink({ batch, view: { query, series } }: { batch: BatchLine; view: LifeCurvesView }) {
  const t = useTranslations("lifeCurves.batches");
  const drawn = series.flatMap(({ key }) => (key === null ? [] : [key]));
  if (batch.units === 0) return "–";
  if (batch.style !== null)
    return drawn.length > 1 ? (
      <TextLink
        href={`${curvesAddress(query, { batch: drawn.filter((key) => key !== batch.key) })}#curves`}
        aria-label={t("removeOne", { batch: batch.key })}
      >
        {t("remove")}
      </TextLink>
    ) : (
      <span className="text-small text-ink-2">{t("drawn")}</span>
    );
  if (drawn.length >= MOST_DRAWN) return <span className="text-small text-ink-2">{t("full")}</span>;
  return (
    <TextLink
      href={`${curvesAddress(query, { batch: [...drawn, batch.key] })}#curves`}
      aria-label={t("drawOne", { batch: batch.key })}
    >
      {t("draw")}
    </TextLink>
  );
}
