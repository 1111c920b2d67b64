import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { AlertList } from "@/components/alerts/alert-list";
import { FreshList } from "@/components/alerts/fresh-list";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { Pagination } from "@/components/ui/pagination";
import { SubmitButton } from "@/components/ui/submit-button";
import { countUnread, listAlerts } from "@/lib/alerts/queries";
import { alertsQuery } from "@/lib/alerts/schema";
import { requireSession } from "@/lib/web/session";
import { readAllAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("alerts");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const pageAt = (page: number) => ({ pathname: "/alerts", query: page > 1 ? { page } : {} }) as const;

/** What the person was told of where they work now. */
export default async function AlertsPage({ searchParams }: Props) {
  const [{ actor }, t, search] = await Promise.all([
    requireSession(),
    getTranslations("alerts"),
    searchParams,
  ]);
  const { page, note } = alertsQuery.parse(search);
  const drawnAt = new Date();
  const [unread, list] = await Promise.all([countUnread(actor), listAlerts(actor, { page })]);
  const { alerts, pages } = list;
  return (
    <>
      <FreshList drawn={unread} />
      <PageHeader
        title={t("title")}
        note={t("note", { count: unread })}
        actions={unread > 0 ? <ReadAll until={drawnAt} label={t("readAll")} /> : undefined}
      />
      {note ? (
        <Banner kind="proven" isLive>
          {t(note)}
        </Banner>
      ) : null}
      {alerts.length > 0 ? (
        <Card isInCharge>
          <AlertList alerts={alerts} locale={actor.locale} timeZone={actor.timeZone} />
        </Card>
      ) : (
        <EmptyState kind="nothingYet" title={t("nothingYet")}>
          {t("nothingYetWhy")}
        </EmptyState>
      )}
      {pages > 1 ? (
        <Pagination
          page={page}
          pages={pages}
          previous={page > 1 ? pageAt(page - 1) : undefined}
          next={page < pages ? pageAt(page + 1) : undefined}
        />
      ) : null}
    </>
  );
}

/** What came after the page was drawn stays unread: nobody has seen it. */
const ReadAll = ({ until, label }: { until: Date; label: string }) => (
  <form action={readAllAction}>
    <input type="hidden" name="until" value={until.toISOString()} />
    <SubmitButton kind="secondary">{label}</SubmitButton>
  </form>
);
