import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { BookNav } from "@/components/rule-book/book-nav";
import { ReasonTable } from "@/components/rule-book/reason-table";
import { RuleCard } from "@/components/rule-book/rule-card";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { formatDay } from "@/lib/kernel/format";
import { readBook } from "@/lib/rule-book/book-queries";
import { bookQuery } from "@/lib/rule-book/book-schema";
import { sheetOf } from "@/lib/rule-book/rule-view";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("ruleBook");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The rules in force today, as claims are judged by them. */
export default async function RuleBookPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("ruleBook"),
    searchParams,
  ]);
  if (!may(session, "seeRuleBook")) notFound();
  const { locale } = session.actor;
  const { of, sheet, family } = bookQuery.parse(search);
  const book = await readBook(session.actor, of);
  if (!book.owner)
    return (
      <>
        <PageHeader title={t("title")} />
        <EmptyState kind="nothingYet" title={t("noBook")}>
          {t("noBookWhy")}
        </EmptyState>
      </>
    );
  const shown = sheetOf(book.rules, { sheet, family });
  return (
    <>
      <PageHeader
        eyebrow={book.owner.name}
        title={t("title")}
        note={t("note", { day: formatDay(book.day, locale) })}
      />
      <BookNav
        owners={book.owners}
        at={{ of: book.owner.id, sheet, family: shown.family }}
        families={shown.families}
      />
      {sheet === "reasons" ? <ReasonTable /> : null}
      {shown.rules.map((rule, place) => (
        <RuleCard key={rule.id} rule={rule} locale={locale} isInCharge={place === 0} />
      ))}
      {sheet !== "reasons" && shown.rules.length === 0 ? (
        <EmptyState kind="nothingYet" title={t("noRule", { sheet: t(`sheets.${sheet}`) })} />
      ) : null}
    </>
  );
}
