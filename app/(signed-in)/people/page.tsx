import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { PersonTable } from "@/components/people-list/person-table";
import { Banner } from "@/components/ui/banner";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { formatInstant } from "@/lib/kernel/format";
import { peopleQuery } from "@/lib/people/member-schema";
import { listPeople } from "@/lib/people/people-queries";
import { may, requireSession } from "@/lib/web/session";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("people");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** The people of the organisation: roles, last seen, state. */
export default async function PeoplePage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([requireSession(), getTranslations("people"), searchParams]);
  if (!may(session, "keepPeople")) notFound();
  const { actor } = session;
  const { note } = peopleQuery.parse(search);
  const people = (await listPeople(actor)).map(({ lastSeenAt, ...person }) => ({
    ...person,
    lastSeen: lastSeenAt && formatInstant(lastSeenAt, actor.locale, actor.timeZone),
    isReader: person.id === actor.userId,
  }));
  return (
    <>
      <PageHeader
        title={t("title")}
        note={t("note", { count: people.length })}
        actions={
          <LinkButton href="/people/invite" kind="primary">
            {t("invite")}
          </LinkButton>
        }
      />
      {note ? (
        <Banner kind="proven" isLive>
          {t(`notes.${note}`)}
        </Banner>
      ) : null}
      <PersonTable people={people} />
    </>
  );
}
