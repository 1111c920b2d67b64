import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { AccountTable } from "@/components/accounts/account-table";
import { Banner } from "@/components/ui/banner";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton, TextLink } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { listAccounts } from "@/lib/accounts/queries";
import { accountsQuery } from "@/lib/accounts/schema";
import { formatDay } from "@/lib/kernel/format";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("accounts");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The workshops a distributor sells to on account. */
export default async function AccountsPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("accounts"),
    searchParams,
  ]);
  if (!may(session, "keepCatalogue")) notFound();
  const { actor } = session;
  const { note } = accountsQuery.parse(search);
  const accounts = (await listAccounts(actor)).map(({ openedOn, closedOn, ...account }) => ({
    ...account,
    opened: formatDay(openedOn, actor.locale),
    closed: closedOn && formatDay(closedOn, actor.locale),
  }));
  const add = (
    <LinkButton href="/accounts/new" kind="primary">
      {t("add")}
    </LinkButton>
  );
  return (
    <>
      <PageHeader title={t("title")} note={t("note", { count: accounts.length })} actions={add} />
      {note ? (
        <Banner kind="proven" isLive>
          {t(`notes.${note}`)}
        </Banner>
      ) : null}
      <p className="max-w-measure text-ink-2">
        {t.rich("terms", { rules: (words) => <TextLink href="/rule-book">{words}</TextLink> })}
      </p>
      {accounts.length > 0 ? (
        <AccountTable accounts={accounts} />
      ) : (
        <EmptyState kind="nothingYet" title={t("nothingYet")} action={add}>
          {t("nothingYetWhy")}
        </EmptyState>
      )}
    </>
  );
}
