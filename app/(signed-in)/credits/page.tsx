import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { DueTable } from "@/components/credits/due-table";
import { IssueForm } from "@/components/credits/issue-form";
import { NoteList } from "@/components/credits/note-list";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { printClaimNumber } from "@/lib/claims/number";
import { listDueCredits } from "@/lib/day-book/due/queries";
import { listNotes } from "@/lib/day-book/notes/queries";
import { issuedQuery, notesQuery } from "@/lib/day-book/schema";
import { currencyFrom } from "@/lib/kernel/currency";
import { money } from "@/lib/kernel/money";
import { refuse } from "@/lib/kernel/outcome";
import { may, requireSession } from "@/lib/web/session";
import { wordingFor } from "@/lib/web/wording";
import { issueAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("credits");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The desk of who makes out credit notes: what is promised and not issued, then what is issued and open. */
export default async function CreditsPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("credits"),
    searchParams,
  ]);
  if (!may(session, "issueCredits")) notFound();
  const { actor } = session;
  const { done, refused } = issuedQuery.parse(search);
  const { view = "open", before } = notesQuery.parse(search);
  const [{ due, count, sums, contested }, { notes, nextBefore }] = await Promise.all([
    listDueCredits(actor),
    listNotes(actor, { view, before, isOwnOnly: true }),
  ]);
  const refusals = await Promise.all(
    refused.map(async ({ number, code }) => ({
      number: printClaimNumber(number),
      why: await wordingFor(refuse(code), actor.locale),
    })),
  );
  return (
    <>
      <PageHeader title={t("title")} note={t("note", { count })} />
      {done.length > 0 ? (
        <Banner kind="proven" isLive>
          {t("due.done", { count: done.length, numbers: done.join(", ") })}
        </Banner>
      ) : null}
      {refusals.map((one) => (
        <Banner key={one.number} kind="refused" isLive>
          {t("due.refused", one)}
        </Banner>
      ))}
      {contested > 0 ? <Banner kind="wanting">{t("contested", { count: contested })}</Banner> : null}
      <Card isInCharge id="due" title={t("due.title")}>
        {due.length > 0 ? (
          <IssueForm action={issueAction} submit={t("due.submit")}>
            <DueTable
              due={due}
              sums={sums.map((sum) => money(BigInt(sum.totalMinor), currencyFrom(sum.currency)))}
              locale={actor.locale}
            />
            {count > due.length ? <p className="text-ink-2">{t("due.more", { count: due.length })}</p> : null}
          </IssueForm>
        ) : (
          <EmptyState kind="allDone" title={t("due.nothing")} />
        )}
      </Card>
      <Card id="issued" title={t("issued.title")}>
        <NoteList
          path="/credits"
          view={view}
          before={before}
          nextBefore={nextBefore}
          notes={notes}
          locale={actor.locale}
        />
      </Card>
    </>
  );
}
