import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { ActionButton } from "@/components/record-form/action-button";
import { RecordForm } from "@/components/record-form/record-form";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { findPerson } from "@/lib/people/people-queries";
import { may, requireSession } from "@/lib/web/session";
import { changeRolesAction, inviteAgainAction, switchOffAction, switchOnAction } from "../actions";
import { roleChoices } from "../role-choices";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("people");
  return { title: t("title") };
}

type Person = NonNullable<Awaited<ReturnType<typeof findPerson>>>;

/** One member: what they may do, and whether they may at all. */
export default async function PersonPage({ params }: { params: Promise<{ id: string }> }) {
  const [session, t, { id }] = await Promise.all([requireSession(), getTranslations("people"), params]);
  if (!may(session, "keepPeople")) notFound();
  const person = await findPerson(session.actor, id);
  if (!person) notFound();
  const isReader = person.id === session.actor.userId;
  return (
    <div className="grid max-w-2xl gap-6">
      <PageHeader eyebrow={person.email} title={person.name} note={t(`states.${person.state}`)} />
      <Card isInCharge title={t("member.rolesTitle")}>
        <RecordForm
          action={changeRolesAction}
          hidden={{ personId: person.id }}
          sections={[
            {
              fields: [
                {
                  kind: "anyOf",
                  name: "roles",
                  label: t("columns.roles"),
                  hint: t(isReader ? "member.ownRolesHint" : "member.rolesHint"),
                  choices: await roleChoices(session.organisation),
                  values: person.roles,
                },
              ],
            },
          ]}
          submit={t("member.keep")}
        />
      </Card>
      <Access person={person} isReader={isReader} />
    </div>
  );
}

async function Access({ person, isReader }: { person: Person; isReader: boolean }) {
  const t = await getTranslations("people.member");
  const { id, state } = person;
  if (isReader) return <Card title={t("accessTitle")}>{t("ownNote")}</Card>;
  if (state === "disabled")
    return (
      <Card title={t("accessTitle")}>
        <p className="mb-4 max-w-measure">{t("onNote")}</p>
        <ActionButton
          action={switchOnAction}
          fields={{ personId: id }}
          label={t("switchOn")}
          kind="secondary"
        />
      </Card>
    );
  return (
    <Card title={t("accessTitle")}>
      <div className="grid gap-6">
        {state === "invited" ? (
          <div className="grid gap-3">
            <p className="max-w-measure">{t("invitedNote")}</p>
            <ActionButton
              action={inviteAgainAction}
              fields={{ personId: id }}
              label={t("inviteAgain")}
              kind="secondary"
            />
          </div>
        ) : null}
        <div className="grid gap-3">
          <p className="max-w-measure">{t("offNote")}</p>
          <ActionButton
            action={switchOffAction}
            fields={{ personId: id }}
            label={t("switchOff")}
            kind="danger"
          />
        </div>
      </div>
    </Card>
  );
}
