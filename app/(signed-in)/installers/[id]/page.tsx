import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { findInstaller } from "@/lib/claims/installers/queries";
import { may, requireSession } from "@/lib/web/session";
import { changeInstallerAction } from "../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("installers");
  return { title: t("title") };
}

/** One installer: their name, and whether they still work here. The code never changes. */
export default async function InstallerPage({ params }: { params: Promise<{ id: string }> }) {
  const [session, t, { id }] = await Promise.all([requireSession(), getTranslations("installers"), params]);
  if (!may(session, "keepInstallers")) notFound();
  const installer = await findInstaller(session.actor, id);
  if (!installer) notFound();
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader
        eyebrow={t("codeOf", { code: installer.code })}
        title={installer.name}
        note={t("codeStays")}
      />
      <Card isInCharge>
        <RecordForm
          action={changeInstallerAction}
          hidden={{ installerId: installer.id }}
          sections={[
            {
              fields: [
                { kind: "line", name: "name", label: t("name"), maxLength: 120, value: installer.name },
                {
                  kind: "oneOf",
                  name: "works",
                  label: t("works"),
                  value: installer.leftOn ? "left" : "here",
                  choices: [
                    { value: "here", label: t("here") },
                    { value: "left", label: t("left") },
                  ],
                },
              ],
            },
          ]}
          submit={t("keep")}
        />
      </Card>
    </div>
  );
}
