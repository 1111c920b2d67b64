import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { InstallerTable } from "@/components/installers/installer-table";
import { RecordForm } from "@/components/record-form/record-form";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { listInstallerRecords } from "@/lib/claims/installers/queries";
import { EARLY_DAYS } from "@/lib/claims/installers/record";
import { installersQuery } from "@/lib/claims/installers/schema";
import { may, requireSession } from "@/lib/web/session";
import { addInstallerAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("installers");
  return { title: t("title") };
}

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

/** Who fits parts at the workshop: the names only it knows, the codes a distributor sees, and a fair record of each. */
export default async function InstallersPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("installers"),
    searchParams,
  ]);
  if (!may(session, "keepInstallers")) notFound();
  const { note } = installersQuery.parse(search);
  const installers = await listInstallerRecords(session.actor);
  return (
    <>
      <PageHeader title={t("title")} note={t("note", { count: installers.length })} />
      {note ? (
        <Banner kind="proven" isLive>
          {t(`notes.${note}`)}
        </Banner>
      ) : null}
      <p className="max-w-measure text-ink-2">{t("fair", { days: EARLY_DAYS })}</p>
      {installers.length > 0 ? (
        <InstallerTable installers={installers} locale={session.actor.locale} />
      ) : (
        <EmptyState kind="nothingYet" title={t("nothingYet")}>
          {t("nothingYetWhy")}
        </EmptyState>
      )}
      <div className="max-w-2xl">
        <Card title={t("addTitle")}>
          <RecordForm
            action={addInstallerAction}
            sections={[
              {
                fields: [
                  { kind: "line", name: "name", label: t("name"), hint: t("nameHint"), maxLength: 120 },
                ],
              },
            ]}
            submit={t("add")}
          />
        </Card>
      </div>
    </>
  );
}
