import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Fact, Facts } from "@/components/ui/facts";
import { minutesAndSeconds } from "@/lib/evidence/duration";
import type { RunAnalysis, TemperatureSummary } from "@/lib/evidence/run-analysis";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type FoundProps = { analysis: RunAnalysis; locale: Locale };

/** What the log comes to, figure by figure; what is not said is said why. */
export function RunLogFound({ analysis, locale }: FoundProps) {
  const t = useTranslations("evidence.runLog");
  const { fault, hottest, temperatures } = analysis;
  const time = (seconds: number) => t("time", minutesAndSeconds(seconds));
  return (
    <section className="grid gap-2">
      <h5 className="text-16 font-semibold">{t("figures.title")}</h5>
      <Facts columns={2}>
        {fault ? (
          <Fact term={t("figures.fault")}>
            <strong className="tabular-nums">{time(fault.afterS)}</strong>
            <span className="block text-small text-ink-2">
              {t(`methods.${fault.method}`, { line: fault.line, text: fault.text ?? "" })}
              {fault.certain ? null : ` ${t("doubtful")}`}
            </span>
          </Fact>
        ) : (
          <Fact term={t("figures.ran")}>{t("figures.ranValue", { time: time(analysis.ranSeconds) })}</Fact>
        )}
        {hottest ? <Temperature hottest={hottest} analysis={analysis} locale={locale} /> : null}
        <TimesAbove analysis={analysis} locale={locale} />
        <FirstOrder analysis={analysis} locale={locale} />
        <Coil analysis={analysis} locale={locale} />
        {temperatures
          .filter(({ unknownS }) => unknownS > 0)
          .map(({ heading, unknownS }) => (
            <Fact key={heading} term={t("figures.unknown", { heading })}>
              {t("figures.unknownValue", { time: time(unknownS) })}
            </Fact>
          ))}
      </Facts>
    </section>
  );
}

function Temperature({ hottest, analysis, locale }: FoundProps & { hottest: TemperatureSummary }) {
  const t = useTranslations("evidence.runLog");
  const { ambient } = analysis;
  const { peakCelsius, peakAtS, riseKelvin, steepest, heading } = hottest;
  const one = (value: number) => formatNumber(value, locale, { least: 1, most: 1 });
  const time = (seconds: number) => t("time", minutesAndSeconds(seconds));
  return (
    <>
      <Fact term={t("figures.peak", { heading })}>
        {t("figures.peakValue", { celsius: one(peakCelsius), time: time(peakAtS) })}
      </Fact>
      {riseKelvin !== null && ambient ? (
        <Fact term={t("figures.rise")}>
          {t(ambient.method === "column" ? "figures.riseColumn" : "figures.riseFirst", {
            kelvin: one(riseKelvin),
            celsius: one(ambient.celsius),
          })}
        </Fact>
      ) : null}
      {steepest ? (
        <Fact term={t("figures.steepest")}>
          {t("figures.steepestValue", { kelvin: one(steepest.kelvinPerMinute), time: time(steepest.fromS) })}
        </Fact>
      ) : null}
    </>
  );
}

/** Each limit with every temperature that passed it: which column lies on the coil and which on the case, a person knows. */
function TimesAbove({ analysis: { temperatures }, locale }: FoundProps) {
  const t = useTranslations("evidence.runLog");
  const time = (seconds: number) => t("time", minutesAndSeconds(seconds));
  const limits = temperatures[0]?.above.map(({ limit }) => limit) ?? [];
  return limits.map((limit) => {
    const passed = temperatures.flatMap(({ heading, above }) =>
      above.flatMap(({ limit: { key }, seconds, firstAtS }) =>
        key === limit.key && firstAtS !== null ? [{ heading, seconds, firstAtS }] : [],
      ),
    );
    const celsius = formatNumber(limit.celsius, locale, { most: 1 });
    return (
      <Fact key={limit.key} term={t("figures.above", { name: limit.name, celsius })}>
        {passed.length === 0 ? t("figures.aboveNever") : null}
        {passed.map(({ heading, seconds, firstAtS }) => (
          <span key={heading} className="block">
            {t("figures.aboveValue", { heading, time: time(seconds), first: time(firstAtS) })}
          </span>
        ))}
      </Fact>
    );
  });
}

/** Final temperature and time constant, each with its standard error, or why the run does not give them. */
function FirstOrder({ analysis, locale }: FoundProps) {
  const t = useTranslations("evidence.runLog");
  const one = (value: number) => formatNumber(value, locale, { least: 1, most: 1 });
  const minutes = (seconds: number) => one(seconds / 60);
  const error = (value: number) => formatNumber(value, locale, { least: 1, most: 2 });
  const not = (why: ReactNode) => <Fact term={t("figures.noFit")}>{why}</Fact>;
  if (analysis.noFit) return not(t(`noFit.${analysis.noFit}`));
  if (!analysis.fit) return null;
  const { curve, standardErrors, longEnough, ranS } = analysis.fit.fit;
  if (!longEnough) return not(t("noFit.fitTooShort", { ran: minutes(ranS), tau: minutes(curve.tauS) }));
  return (
    <>
      <Fact term={t("figures.final")}>
        {t("figures.finalValue", {
          celsius: one(curve.finalCelsius),
          error: error(standardErrors.finalCelsius),
        })}
      </Fact>
      <Fact term={t("figures.tau")}>
        {t("figures.tauValue", { minutes: minutes(curve.tauS), error: error(standardErrors.tauS / 60) })}
      </Fact>
    </>
  );
}

function Coil({ analysis, locale }: FoundProps) {
  const t = useTranslations("evidence.runLog.figures");
  const peak = (analysis.coil?.values ?? []).reduce<number | null>(
    (best, value) => (value === null || (best !== null && best >= value) ? best : value),
    null,
  );
  return peak === null ? null : (
    <Fact term={t("coil")}>
      {t("coilValue", { celsius: formatNumber(peak, locale, { least: 1, most: 1 }) })}
    </Fact>
  );
}
