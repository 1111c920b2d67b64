import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { PartTable } from "@/components/catalogue/part-table";
import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Pagination } from "@/components/ui/pagination";
import { TextField } from "@/components/ui/text-field";
import { listCatalogue } from "@/lib/parts/catalogue-queries";
import { catalogueQuery } from "@/lib/parts/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("catalogue");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const pageAt = (q: string, page: number) =>
  ({ pathname: "/catalogue", query: { ...(q ? { q } : {}), ...(page > 1 ? { page } : {}) } }) as const;

/** The distributor's parts: what can be sold, claimed on and superseded. */
export default async function CataloguePage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("catalogue"),
    searchParams,
  ]);
  if (!may(session, "keepCatalogue")) notFound();
  const query = catalogueQuery.parse(search);
  const list = await listCatalogue(session.actor, query);
  const { q } = query;
  return (
    <>
      <PageHeader
        title={t("title")}
        note={t("note", { count: list.total })}
        actions={
          <LinkButton href="/catalogue/new" kind="primary">
            {t("add")}
          </LinkButton>
        }
      />
      {query.note ? (
        <Banner kind="proven" isLive>
          {t(`notes.${query.note}`)}
        </Banner>
      ) : null}
      <form action="/catalogue" role="search" className="flex items-end gap-2 max-sm:[&>div]:grow">
        <TextField name="q" label={t("search")} type="search" defaultValue={q} maxLength={80} />
        <Button type="submit" kind="secondary">
          {t("find")}
        </Button>
      </form>
      {list.parts.length > 0 ? <PartTable parts={list.parts} /> : <Nothing q={q} />}
      {list.pages > 1 ? (
        <Pagination
          page={list.page}
          pages={list.pages}
          previous={list.page > 1 ? pageAt(q, list.page - 1) : undefined}
          next={list.page < list.pages ? pageAt(q, list.page + 1) : undefined}
        />
      ) : null}
    </>
  );
}

async function Nothing({ q }: { q: string }) {
  const t = await getTranslations("catalogue");
  if (q)
    return (
      <EmptyState
        kind="nothingFound"
        title={t("nothingFound", { q })}
        action={<LinkButton href="/catalogue">{t("clear")}</LinkButton>}
      />
    );
  return (
    <EmptyState
      kind="nothingYet"
      title={t("nothingYet")}
      action={<LinkButton href="/catalogue/new">{t("add")}</LinkButton>}
    >
      {t("nothingYetWhy")}
    </EmptyState>
  );
}
