import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { pathBack } from "@/lib/accounts/path-back";
import { listKnownBuyers } from "@/lib/accounts/queries";
import { may, requireSession } from "@/lib/web/session";
import { openAccountAction } from "../actions";
import { accountFields, workshopFields } from "./account-fields";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("accounts.form");
  return { title: t("title") };
}

type Props = { searchParams: Promise<{ number?: string | string[]; back?: string | string[] }> };

const one = (value: string | string[] | undefined): string => [value ?? ""].flat()[0] ?? "";

/** Opens an account; opened from an import, it brings the number along and goes back there. */
export default async function NewAccountPage({ searchParams }: Props) {
  const [session, t, search] = await Promise.all([
    requireSession(),
    getTranslations("accounts.form"),
    searchParams,
  ]);
  if (!may(session, "keepCatalogue")) notFound();
  const buyers = await listKnownBuyers(session.actor);
  const number = one(search.number).slice(0, 40);
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader title={t("title")} />
      <Card isInCharge>
        <RecordForm
          action={openAccountAction}
          hidden={{ back: pathBack(one(search.back)) ?? "" }}
          sections={[
            { fields: await accountFields({ number, buyers, currency: session.organisation.currency }) },
            {
              title: t("workshopTitle"),
              note: t("workshopNote"),
              fields: await workshopFields(session.actor),
            },
          ]}
          submit={t("open")}
        />
      </Card>
    </div>
  );
}
