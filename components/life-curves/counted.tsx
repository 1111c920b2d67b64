import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { formatDay, formatNumber, formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { LifeCurvesView } from "@/lib/reports/life-curves/view";

type Props = { view: LifeCurvesView; locale: Locale };

/** How the switches stood: what counts as a failure, where service starts and ends, until when. Under every figure. */
export function Counted({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.counted");
  const { query, starts, counts, largest, part } = view;
  const lag = starts.lagDays ?? 0;
  const usesLag = starts.assumed > 0;
  const sentences = [
    t(query.count, { undecided: formatNumber(counts.undecided, locale) }),
    t(`start.${starts.rule}`, { lag }),
    starts.lagDays === null
      ? usesLag && t("noLag")
      : usesLag && t("lag", { count: starts.lagFittings, day: formatDay(query.cut, locale) }),
    t("recorded", {
      recorded: formatNumber(starts.recorded, locale),
      due: formatNumber(starts.due, locale),
    }),
    t("assumed", {
      share: formatPercent(starts.units === 0 ? 0 : starts.assumed / starts.units, locale),
      assumed: formatNumber(starts.assumed, locale),
      units: formatNumber(starts.units, locale),
    }),
    t("end"),
    query.shop === "without" && largest && t("shop", { name: largest.name }),
    part.partNumbers.length > 1 && t("numbers", { numbers: part.partNumbers.join(", ") }),
    t("cut", { day: formatDay(query.cut, locale) }),
  ];
  return sentences.filter((sentence) => typeof sentence === "string").join(" ");
}

const LEFT_OUT = [
  "deadOnArrival",
  "shelf",
  "beforeStart",
  "afterCover",
  "noShipment",
  "today",
  "withoutUnit",
] as const;
const ENDS = ["running", "coverEnded", "removed", "declined"] as const;

/** What is not in the curves, and how observation ended for what is: told in words. */
export function LeftOutCard({ view, locale }: Props) {
  const t = useTranslations("lifeCurves");
  const { counts, leftOut } = view;
  const kinds = LEFT_OUT.filter((kind) => leftOut[kind] > 0);
  return (
    <Card title={t("leftOut.title")}>
      <div className="grid gap-x-12 gap-y-6 lg:grid-cols-2">
        <ul className="grid content-start gap-1.5">
          {kinds.length === 0 ? <li>{t("leftOut.nothing")}</li> : null}
          {kinds.map((kind) => (
            <li key={kind}>{t(`leftOut.${kind}`, { count: leftOut[kind] })}</li>
          ))}
        </ul>
        <section className="grid content-start gap-1.5">
          <h3 className="text-16 font-semibold">{t("ends.title")}</h3>
          <dl className="grid max-w-md gap-1 tabular-nums">
            {[...ENDS.map((end) => [end, counts[end]] as const), ["failed", counts.failed] as const].map(
              ([end, count]) => (
                <div key={end} className="flex justify-between gap-6 border-b border-rule py-1">
                  <dt className="text-ink-2">{t(`ends.${end}`)}</dt>
                  <dd>{formatNumber(count, locale)}</dd>
                </div>
              ),
            )}
          </dl>
        </section>
      </div>
    </Card>
  );
}
