import { useTranslations } from "next-intl";
import { RunLogFigure } from "@/components/evidence/run-log-figure";
import { Fact, Facts } from "@/components/ui/facts";
import { formatInstant, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { FindingReading, FindingView as Finding } from "@/lib/returns/view";
import type { Limits } from "@/lib/rule-book/limits-shape";

type FindingProps = {
  finding: Finding;
  limits: Limits | null;
  locale: Locale;
  timeZone: string;
};

/** What the bench found: the kind, the words, the readings, and its run drawn. Both sides read the same. */
export function FindingView({ finding, limits, locale, timeZone }: FindingProps) {
  const t = useTranslations("returns.finding");
  const words = useTranslations("returns");
  const at = formatInstant(new Date(finding.foundAt), locale, timeZone);
  return (
    <div className="grid gap-3">
      <p className="flex flex-wrap items-baseline gap-x-3">
        <strong className="text-18">{words(`findings.${finding.kind}`)}</strong>
        <span className="text-small text-ink-2">{t("on", { name: finding.foundBy, at })}</span>
      </p>
      <p className="max-w-measure whitespace-pre-wrap">{finding.note}</p>
      <Facts>
        {finding.runMinutes === null || finding.log ? null : (
          <Fact term={t("run")}>
            {t("runMinutes", { minutes: formatNumber(finding.runMinutes, locale, { most: 1 }) })}
          </Fact>
        )}
        {finding.looks.length > 0 ? (
          <Fact term={t("looks")}>
            <ul className="grid gap-1">
              {finding.looks.map(({ step, text }) => (
                <li key={step}>
                  <span className="text-small text-ink-2">
                    {words.has(`steps.${step}`) ? words(`steps.${step}`) : step}
                  </span>
                  <span className="block whitespace-pre-wrap">{text}</span>
                </li>
              ))}
            </ul>
          </Fact>
        ) : null}
        {finding.readings.length > 0 ? (
          <Fact term={t("readings")}>
            <ReadingList readings={finding.readings} locale={locale} />
          </Fact>
        ) : null}
      </Facts>
      {finding.log ? (
        <RunLogFigure fileId={finding.log.id} summary={finding.log.summary} limits={limits} locale={locale} />
      ) : null}
    </div>
  );
}

function ReadingList({ readings, locale }: { readings: readonly FindingReading[]; locale: Locale }) {
  const names = useTranslations("ruleBook.readings");
  const t = useTranslations("returns.finding");
  return (
    <ul className="grid gap-1">
      {readings.map((reading) => (
        <li key={reading.kind}>
          <span className="block text-small text-ink-2">{names(reading.kind)}</span>
          <span className="tabular-nums">
            <ReadingValue reading={reading} locale={locale} />
          </span>
          {reading.instrument ? (
            <span className="text-small text-ink-2">
              {" "}
              {t("instrument", { instrument: reading.instrument })}
            </span>
          ) : null}
        </li>
      ))}
    </ul>
  );
}

/** One reading in its unit, with its temperature where one was taken. */
export function ReadingValue({ reading, locale }: { reading: FindingReading; locale: Locale }) {
  const t = useTranslations("returns.finding");
  if (reading.value === null) return <>{t("openCircuit")}</>;
  const value = formatNumber(reading.value, locale, { most: 2 });
  return (
    <>
      {reading.temperatureCelsius === null
        ? t("reading", { value, unit: reading.unit })
        : t("readingAt", {
            value,
            unit: reading.unit,
            celsius: formatNumber(reading.temperatureCelsius, locale, { most: 1 }),
          })}
    </>
  );
}
