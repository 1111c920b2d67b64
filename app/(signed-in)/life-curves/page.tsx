import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { BatchTable } from "@/components/life-curves/batch-table";
import { LeftOutCard } from "@/components/life-curves/counted";
import { CurveCard } from "@/components/life-curves/curve-card";
import { CurvesHead } from "@/components/life-curves/curves-head";
import { MonthsCard } from "@/components/life-curves/months-card";
import { Switches } from "@/components/life-curves/switches";
import { WeibullCard } from "@/components/life-curves/weibull-card";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { formatDay } from "@/lib/kernel/format";
import { readLifeCurves } from "@/lib/reports";
import { lifeCurvesQuery } from "@/lib/reports/life-curves/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("lifeCurves");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** How the parts of this distributor fail in service, batch against batch. */
export default async function LifeCurvesPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("lifeCurves"),
    searchParams,
  ]);
  if (!may(session, "seeLifeCurves")) notFound();
  const { locale } = session.actor;
  const found = await readLifeCurves(session.actor, lifeCurvesQuery.parse(search));
  if (!found)
    return (
      <>
        <PageHeader title={t("title")} />
        <EmptyState kind="nothingYet" title={t("noParts")}>
          {t("noPartsWhy")}
        </EmptyState>
      </>
    );
  const { view, isCutUnread } = found;
  const figures = { view, locale };
  return (
    <>
      <CurvesHead {...figures} />
      <div className="print:hidden">
        <Card>
          <Switches {...figures} isCutUnread={isCutUnread} />
        </Card>
      </div>
      {view.counts.units === 0 ? (
        <EmptyState
          kind="nothingFound"
          title={t("noUnits", { part: view.part.partNumber, day: formatDay(view.query.cut, locale) })}
        >
          {t("noUnitsWhy")}
        </EmptyState>
      ) : (
        <>
          <BatchTable {...figures} />
          <CurveCard {...figures} />
          <div className="grid items-start gap-6 xl:grid-cols-2">
            <WeibullCard {...figures} />
            <MonthsCard {...figures} />
          </div>
        </>
      )}
      <LeftOutCard {...figures} />
    </>
  );
}
