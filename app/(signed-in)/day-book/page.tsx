import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { BalancesCard } from "@/components/day-book/balances-card";
import { EntryTable } from "@/components/day-book/entry-table";
import { FilterForm } from "@/components/day-book/filter-form";
import { ProofCard } from "@/components/day-book/proof-card";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { readDayBook } from "@/lib/day-book/book/queries";
import { bookQuery, type BookQuery } from "@/lib/day-book/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("dayBook");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const addressOf = ({ workshop, month }: BookQuery, before?: string): `/day-book?${string}` => {
  const search = new URLSearchParams();
  if (workshop) search.set("workshop", workshop);
  if (month) search.set("month", month);
  if (before) search.set("before", before);
  return `/day-book?${search.toString()}`;
};

/** Every movement of a credit, never edited, only countered, with sums that prove themselves. */
export default async function DayBookPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("dayBook"),
    searchParams,
  ]);
  if (!may(session, "seeDayBook")) notFound();
  const { actor } = session;
  const query = bookQuery.parse(search);
  const book = await readDayBook(actor, query);
  const isFiltered = query.workshop !== "" || query.month !== "";
  return (
    <>
      <PageHeader title={t("title")} note={t("note")} />
      {book.workshops.length > 0 ? (
        <FilterForm workshops={book.workshops} workshop={query.workshop} month={query.month} />
      ) : null}
      {book.entries.length > 0 ? (
        <Card isInCharge>
          <EntryTable entries={book.entries} sellerId={actor.organisationId} locale={actor.locale} />
        </Card>
      ) : isFiltered ? (
        <EmptyState
          kind="nothingFound"
          title={t("nothingFound")}
          action={<LinkButton href="/day-book">{t("clear")}</LinkButton>}
        />
      ) : (
        <EmptyState kind="nothingYet" title={t("nothing")} />
      )}
      {query.before || book.nextBefore ? (
        <p className="flex flex-wrap gap-2 print:hidden">
          {query.before ? (
            <LinkButton href={addressOf(query)} kind="quiet" small>
              {t("newest")}
            </LinkButton>
          ) : null}
          {book.nextBefore ? (
            <LinkButton href={addressOf(query, book.nextBefore)} kind="quiet" small>
              {t("older")}
            </LinkButton>
          ) : null}
        </p>
      ) : null}
      <BalancesCard
        opening={book.opening}
        closing={book.closing}
        workshops={book.workshops}
        locale={actor.locale}
      />
      <ProofCard sums={book.sums} locale={actor.locale} />
    </>
  );
}
