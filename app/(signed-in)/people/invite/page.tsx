import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { INVITATION_DAYS } from "@/lib/people/invite-service";
import { INVITATION_LANGUAGES } from "@/lib/people/member-schema";
import { may, requireSession } from "@/lib/web/session";
import { inviteAction } from "../actions";
import { roleChoices } from "../role-choices";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("people.inviteForm");
  return { title: t("title") };
}

/** Name, address, roles: the rest the invited person does themselves. */
export default async function InvitePage() {
  const [session, t] = await Promise.all([requireSession(), getTranslations("people.inviteForm")]);
  if (!may(session, "keepPeople")) notFound();
  const { actor, organisation } = session;
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader eyebrow={organisation.name} title={t("title")} />
      <Card isInCharge>
        <RecordForm
          action={inviteAction}
          sections={[
            {
              fields: [
                { kind: "line", name: "name", label: t("name"), hint: t("nameHint"), maxLength: 120 },
                {
                  kind: "line",
                  name: "email",
                  type: "email",
                  label: t("email"),
                  hint: t("emailHint", { days: INVITATION_DAYS }),
                  maxLength: 254,
                },
                {
                  kind: "oneOf",
                  name: "language",
                  label: t("language"),
                  value: INVITATION_LANGUAGES.find((code) => code === actor.locale) ?? "en",
                  choices: INVITATION_LANGUAGES.map((code) => ({
                    value: code,
                    label: t(`languages.${code}`),
                  })),
                },
                {
                  kind: "anyOf",
                  name: "roles",
                  label: t("roles"),
                  hint: t("rolesHint"),
                  choices: await roleChoices(organisation),
                },
              ],
            },
          ]}
          submit={t("send")}
        />
      </Card>
    </div>
  );
}
