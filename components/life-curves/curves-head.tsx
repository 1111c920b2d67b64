import { useTranslations } from "next-intl";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { SignalMark } from "@/components/ui/status-mark";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { csvAddress } from "@/lib/reports/life-curves/address";
import type { LifeCurvesView } from "@/lib/reports/life-curves/view";
import { figure } from "./figures";

/** What the page comes to, in a sentence: the batch that stands out, or that none does. */
export function CurvesHead({ view, locale }: { view: LifeCurvesView; locale: Locale }) {
  const t = useTranslations("lifeCurves");
  const { part, batches, query } = view;
  const [worst] = batches;
  const isLoud = worst !== undefined && (worst.grade === "act" || worst.grade === "lookInto");
  const young = batches.filter(({ grade }) => grade === "notYetKnown").length;
  return (
    <PageHeader
      title={t("title")}
      eyebrow={
        <>
          <span className="font-mono">{part.partNumber}</span>, {part.name}
        </>
      }
      note={
        <>
          {isLoud && worst.ratio ? (
            <>
              <SignalMark state={worst.grade} />
              <p className="font-semibold text-ink">
                {t(worst.ratio.upper === null ? "headline.badOpen" : "headline.bad", {
                  batch: worst.key,
                  ratio: figure(worst.ratio.value, locale),
                  lower: figure(worst.ratio.lower, locale),
                  upper: figure(worst.ratio.upper ?? 0, locale),
                })}
              </p>
              <p>
                {t("headline.counts", { failed: worst.failed, units: formatNumber(worst.units, locale) })}
              </p>
            </>
          ) : (
            <p>{t("headline.calm")}</p>
          )}
          {young > 0 ? <p>{t("headline.known", { count: young })}</p> : null}
        </>
      }
      actions={
        <LinkButton href={csvAddress(query)} kind="secondary" prefetch={false}>
          {t("download")}
        </LinkButton>
      }
    />
  );
}
