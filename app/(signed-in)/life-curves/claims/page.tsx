import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { BehindTable } from "@/components/life-curves/behind-table";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Pagination } from "@/components/ui/pagination";
import { formatNumber } from "@/lib/kernel/format";
import { readClaimsBehind } from "@/lib/reports";
import { claimsAddress, curvesAddress } from "@/lib/reports/life-curves/address";
import { behindQuery, OLDEST_DAYS } from "@/lib/reports/life-curves/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("lifeCurves.claims");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The claims behind a point of the life curves: a list like any other, with its own address. */
export default async function ClaimsBehindPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("lifeCurves.claims"),
    searchParams,
  ]);
  if (!may(session, "seeLifeCurves")) notFound();
  const { locale } = session.actor;
  const asked = behindQuery.parse(search);
  const behind = await readClaimsBehind(session.actor, asked);
  if (!behind) notFound();
  const { claims, total, page, pages, partNumber, query } = behind;
  const turn = (to: number) =>
    claimsAddress(query, {
      batches: asked.of,
      isOthers: asked.others === "yes",
      fromDays: asked.from,
      toDays: asked.to,
      page: to,
    });
  const batchWords = () => {
    if (asked.of.length === 0) return t("allBatches");
    const batches = asked.of.join(", ");
    return asked.others === "yes" ? t("allBut", { batches }) : batches;
  };
  const words = {
    count: total,
    part: partNumber,
    batches: batchWords(),
    from: formatNumber(asked.from, locale),
    to: formatNumber(asked.to, locale),
  };
  return (
    <>
      <PageHeader
        title={t("title")}
        note={asked.to >= OLDEST_DAYS ? t("noteAll", words) : t("note", words)}
        actions={
          <LinkButton href={curvesAddress(query)} kind="secondary">
            {t("back")}
          </LinkButton>
        }
      />
      {claims.length === 0 ? (
        <EmptyState kind="nothingFound" title={t("none")}>
          {t("noneWhy")}
        </EmptyState>
      ) : (
        <BehindTable claims={claims} locale={locale} />
      )}
      {pages > 1 ? (
        <Pagination
          page={page}
          pages={pages}
          previous={page > 1 ? turn(page - 1) : undefined}
          next={page < pages ? turn(page + 1) : undefined}
        />
      ) : null}
    </>
  );
}
