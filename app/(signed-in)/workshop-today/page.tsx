import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ClaimList } from "@/components/claims/claim-list";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { TodayCard } from "@/components/workshop-today/today-card";
import { listOwnClaims } from "@/lib/claims/lists/queries";
import { listQuery, WORKSHOP_VIEWS } from "@/lib/claims/lists/schema";
import { findWorkshopToday } from "@/lib/reports/workshop-today/queries";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("lists");
  return { title: t("workshopTitle") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** What waits on the workshop, and what it waits for. */
export default async function WorkshopTodayPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([requireSession(), getTranslations("lists"), searchParams]);
  if (!may(session, "seeOwnClaims")) notFound();
  const query = listQuery.parse(search);
  const view = WORKSHOP_VIEWS.find((one) => one === query.view) ?? "onUs";
  const [list, today] = await Promise.all([
    listOwnClaims(session.actor, { ...query, view }),
    findWorkshopToday(session.actor),
  ]);
  return (
    <>
      <PageHeader
        title={t("workshopTitle")}
        note={t("workshopNote", { onUs: list.counts.onUs ?? 0, onThem: list.counts.onThem ?? 0 })}
        actions={
          may(session, "startClaim") ? (
            <LinkButton href="/claims/new" kind="primary">
              {t("start")}
            </LinkButton>
          ) : undefined
        }
      />
      {today ? (
        <TodayCard
          today={today}
          onUs={list.counts.onUs ?? 0}
          onThem={list.counts.onThem ?? 0}
          notesPath={may(session, "seeCreditNotes") ? "/credit-notes" : null}
          locale={session.actor.locale}
        />
      ) : null}
      <ClaimList
        path="/workshop-today"
        views={WORKSHOP_VIEWS}
        query={{ ...query, view }}
        initial={list}
        side="workshop"
        locale={session.actor.locale}
        timeZone={session.actor.timeZone}
      />
    </>
  );
}
