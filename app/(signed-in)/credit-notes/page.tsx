import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { NoteList } from "@/components/credits/note-list";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { listNotes } from "@/lib/day-book/notes/queries";
import { notesQuery } from "@/lib/day-book/schema";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("credits");
  return { title: t("notesTitle") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The credit notes an organisation was given, or gave. */
export default async function CreditNotesPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("credits"),
    searchParams,
  ]);
  if (!may(session, "seeCreditNotes")) notFound();
  const { actor } = session;
  const { view = "all", before } = notesQuery.parse(search);
  const { notes, nextBefore } = await listNotes(actor, { view, before });
  return (
    <>
      <PageHeader title={t("notesTitle")} note={t("notesNote")} />
      <Card isInCharge>
        <NoteList
          path="/credit-notes"
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
