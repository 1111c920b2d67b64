import { useTranslations } from "next-intl";
import { ChartFrame } from "@/components/chart/chart-frame";
import { LifeCurveDrawing } from "@/components/chart/life-curve-drawing";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { formatPercent } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { claimsAddress, curvesAddress } from "@/lib/reports/life-curves/address";
import type { LifeCurvesView } from "@/lib/reports/life-curves/view";
import { Counted } from "./counted";
import { figure, inMonths, pValue } from "./figures";
import { RiskTable } from "./risk-table";
import { StepTable } from "./step-table";

type Props = { view: LifeCurvesView; locale: Locale };

/** The life curves of the batches drawn and of the others pooled. */
export function CurveCard({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.curve");
  const { query, series, rest } = view;
  const isZoomed = query.axis === "upper";
  const drawn = series.flatMap(({ key }) => (key === null ? [] : [key]));
  const description = [
    t("description"),
    query.count === "upheld" && t("descriptionUpheld"),
    isZoomed && t("broken"),
  ];
  return (
    <Card id="curves">
      <ChartFrame
        headline={<Headline view={view} locale={locale} />}
        counted={<Counted view={view} locale={locale} />}
        table={<StepTable view={view} locale={locale} />}
        download={
          <TextLink
            href={`${curvesAddress(query, { batch: drawn, axis: isZoomed ? "whole" : "upper" })}#curves`}
          >
            {t(isZoomed ? "whole" : "zoom")}
          </TextLink>
        }
      >
        <div className="grid gap-4">
          <LifeCurveDrawing
            figure={{ series, rest, isZoomed }}
            title={t("title")}
            description={description.filter((words) => typeof words === "string").join(" ")}
            opens={(key, fromDays, toDays) =>
              claimsAddress(
                { ...query, batch: drawn },
                key === null
                  ? { batches: drawn, isOthers: true, fromDays, toDays }
                  : { batches: [key], fromDays, toDays },
              )
            }
            locale={locale}
          />
          <RiskTable view={view} locale={locale} />
          <Notes view={view} locale={locale} isZoomed={isZoomed} />
        </div>
      </ChartFrame>
    </Card>
  );
}

function Headline({ view, locale }: Props) {
  const t = useTranslations("lifeCurves.curve");
  const { compared, series } = view;
  const share = (value: number) => formatPercent(value, locale, { least: 1 });
  if (compared)
    return t("headline", {
      months: compared.ages.months,
      batch: compared.key,
      one: share(compared.ages.one),
      others: share(compared.ages.others),
    });
  const [first] = series;
  const last = first?.curve.at(-1);
  return t("headlineAlone", {
    months: inMonths(first?.oldestDays ?? 0, locale),
    batch: first?.key ?? t("others"),
    one: share(last?.survival ?? 1),
  });
}

function Notes({ view, locale, isZoomed }: Props & { isZoomed: boolean }) {
  const t = useTranslations("lifeCurves.curve");
  const small = useTranslations("lifeCurves.batches");
  const { compared } = view;
  const thin = view.series.filter(({ thinFrom }) => thinFrom !== null);
  return (
    <div className="grid max-w-measure gap-1 text-small text-ink-2">
      {isZoomed ? <p className="font-semibold text-ink">{t("broken")}</p> : null}
      {compared ? (
        <p>
          {t("compared", {
            chi: figure(compared.chiSquare, locale),
            p: pValue(compared.p, locale, (least) => small("small", { least })),
          })}
        </p>
      ) : null}
      {thin.map(({ key, thinFrom }) => (
        <p key={key}>{t("thin", { months: inMonths(thinFrom ?? 0, locale), name: key ?? t("others") })}</p>
      ))}
      <p>{t("net")}</p>
    </div>
  );
}
