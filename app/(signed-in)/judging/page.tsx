import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ClaimList } from "@/components/claims/claim-list";
import { PageHeader } from "@/components/ui/page-header";
import { listReceivedClaims } from "@/lib/claims/lists/queries";
import { JUDGING_VIEWS, listQuery } from "@/lib/claims/lists/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("lists");
  return { title: t("judgingTitle") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The assessor's list: what is urgent first, every view an address. */
export default async function JudgingPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([requireSession(), getTranslations("lists"), searchParams]);
  if (!may(session, "seeReceivedClaims")) notFound();
  const query = listQuery.parse(search);
  const view = JUDGING_VIEWS.find((one) => one === query.view) ?? "toJudge";
  const list = await listReceivedClaims(session.actor, { ...query, view });
  return (
    <>
      <PageHeader
        title={t("judgingTitle")}
        note={t("clearDesk", { waiting: list.counts.toJudge ?? 0, held: list.counts.held ?? 0 })}
      />
      <ClaimList
        path="/judging"
        views={JUDGING_VIEWS}
        query={{ ...query, view }}
        initial={list}
        side="distributor"
        locale={session.actor.locale}
        timeZone={session.actor.timeZone}
      />
    </>
  );
}
