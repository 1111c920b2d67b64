import { useTranslations } from "next-intl";
import { ChartFrame } from "@/components/chart/chart-frame";
import { RunLogDrawing } from "@/components/chart/run-log-drawing";
import { RunLogFound } from "@/components/chart/run-log-found";
import { RunLogTable } from "@/components/chart/run-log-table";
import { Banner } from "@/components/ui/banner";
import { minutesAndSeconds } from "@/lib/evidence/duration";
import type { RunAnalysis } from "@/lib/evidence/run-analysis";
import { isRunLogSummary, withLimits, type RunLogSummary } from "@/lib/evidence/run-log-summary";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Limits } from "@/lib/rule-book/limits-shape";
import { runLimitsOf } from "@/lib/rule-book/run-limits";

type RunLogFigureProps = { fileId: string; summary: unknown; limits: Limits | null; locale: Locale };

/** A run log as it was read once: drawn, counted and explained; or that it is being read, or why it cannot be. */
export function RunLogFigure({ fileId, summary, limits, locale }: RunLogFigureProps) {
  const t = useTranslations("evidence.runLog");
  if (!isRunLogSummary(summary)) return <Banner kind="info">{t("beingRead")}</Banner>;
  if (summary.isRead) {
    const named = limits
      ? runLimitsOf(limits).map((one) => ({ ...one, name: t(`limits.${one.key}`, { of: one.name }) }))
      : [];
    const coil = limits?.coil ? { ohmAt20: limits.coil.ratedOhm } : undefined;
    const run = withLimits(summary, { limits: named, ...(coil ? { coil } : {}) });
    return <ReadLog fileId={fileId} run={run} locale={locale} />;
  }
  return (
    <Banner kind="wanting" title={t("notRead")} actions={<Download fileId={fileId} />}>
      {t(`refusals.${summary.code}`, summary.detail)} {t("keptAsSent")}
    </Banner>
  );
}

type ReadLogProps = { fileId: string; run: Extract<RunLogSummary, { isRead: true }>; locale: Locale };

function ReadLog({ fileId, run, locale }: ReadLogProps) {
  const { log, analysis, rowCount } = run;
  return (
    <div className="grid gap-4">
      <ChartFrame
        headingLevel={4}
        headline={<Headline analysis={analysis} locale={locale} />}
        counted={<Counted run={run} locale={locale} />}
        table={<RunLogTable log={log} rowCount={rowCount} locale={locale} />}
        download={<Download fileId={fileId} />}
      >
        <RunLogDrawing run={run} locale={locale} />
      </ChartFrame>
      <Findings run={run} />
      <RunLogFound analysis={analysis} locale={locale} />
    </div>
  );
}

function Headline({ analysis, locale }: { analysis: RunAnalysis; locale: Locale }) {
  const t = useTranslations("evidence.runLog");
  const { fault, hottest, ranSeconds } = analysis;
  const time = t("time", minutesAndSeconds(fault?.afterS ?? ranSeconds));
  if (!hottest) return t(fault ? "headline.fault" : "headline.noFault", { time });
  const peak = formatNumber(hottest.peakCelsius, locale, { least: 1, most: 1 });
  return t(fault ? "headline.peakAndFault" : "headline.peakNoFault", { peak, time });
}

function Counted({ run, locale }: Pick<ReadLogProps, "run" | "locale">) {
  const t = useTranslations("evidence.runLog");
  const { log, rowCount } = run;
  const columns = log.columns
    .filter(({ heading }) => heading !== "")
    .map(({ heading, takenAs }) => t("column", { heading, taken: t(`taken.${takenAs}`) }));
  return t("counted", {
    rows: formatNumber(rowCount, locale),
    time: t("time", minutesAndSeconds((log.timeS.at(-1) ?? 0) - (log.timeS[0] ?? 0))),
    columns: columns.join(", "),
  });
}

/** What a person should look at before believing the log, and what the reader of the file assumed. */
function Findings({ run }: Pick<ReadLogProps, "run">) {
  const t = useTranslations("evidence");
  const { findings } = run.analysis;
  const notes = run.log.notes.filter(({ code }) => !findings.some((finding) => finding.code === code));
  return (
    <>
      {findings.length > 0 ? (
        <Banner kind="wanting" title={t("runLog.findingsTitle")}>
          <ul className="list-disc pl-5">
            {findings.map(({ code, detail }, place) => (
              <li key={place}>{t(`findings.${code}`, detail)}</li>
            ))}
          </ul>
        </Banner>
      ) : null}
      {notes.length > 0 ? (
        <section className="grid gap-1 text-small text-ink-2">
          <h5 className="text-small font-semibold">{t("runLog.notesTitle")}</h5>
          <ul className="list-disc pl-5">
            {notes.map(({ code, detail }, place) => (
              <li key={place}>{t(`notes.${code}`, detail)}</li>
            ))}
          </ul>
        </section>
      ) : null}
    </>
  );
}

function Download({ fileId }: { fileId: string }) {
  const t = useTranslations("evidence.runLog");
  return (
    <a
      href={`/api/v1/evidence/${fileId}`}
      className="min-h-target content-center text-petrol underline underline-offset-4"
    >
      {t("download")}
    </a>
  );
}
