import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { ChangePasswordForm } from "@/components/people/change-password-form";
import { PreferencesCard } from "@/components/people/preferences-card";
import { SessionsCard } from "@/components/people/sessions-card";
import { WhoCard } from "@/components/people/who-card";
import { WorkplacesCard } from "@/components/people/workplaces-card";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { PageHeader } from "@/components/ui/page-header";
import { SubmitButton } from "@/components/ui/submit-button";
import { listOwnSessions, listWorkplaces } from "@/lib/people/account/queries";
import { PASSWORD_CHARACTERS } from "@/lib/people/schema";
import { requireSession } from "@/lib/web/session";
import {
  changePasswordAction,
  endOtherSessionsAction,
  endSessionAction,
  savePreferencesAction,
  signOutAction,
  switchWorkplaceAction,
} from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("account");
  return { title: t("title") };
}

const NOTES = [
  "saved",
  "ended",
  "othersEnded",
  "passwordChanged",
  "switched",
  "joined",
  "signInAnew",
  "notDone",
] as const;

/** A person's own page: who they are here, how they see it, and where they are signed in. */
export default async function AccountPage({ searchParams }: { searchParams: Promise<{ note?: string }> }) {
  const [session, t, links, search] = await Promise.all([
    requireSession(),
    getTranslations("account"),
    getTranslations("links"),
    searchParams,
  ]);
  const { actor, email, organisation } = session;
  const [sessions, places] = await Promise.all([listOwnSessions(actor), listWorkplaces(session.id)]);
  const note = NOTES.find((one) => one === search.note);
  const texts = {
    current: t("password.current"),
    password: t("password.new"),
    hint: links("passwordHint", PASSWORD_CHARACTERS),
    submit: t("password.submit"),
    show: links("show"),
    hide: links("hide"),
  };
  return (
    <>
      <PageHeader
        title={t("title")}
        actions={
          <form action={signOutAction}>
            <SubmitButton kind="secondary">{t("signOut")}</SubmitButton>
          </form>
        }
      />
      {note ? (
        <Banner kind={note === "notDone" || note === "signInAnew" ? "refused" : "proven"} isLive>
          {t(`notes.${note}`)}
        </Banner>
      ) : null}
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <div className="grid min-w-0 gap-6">
          <WhoCard name={actor.name} email={email} organisation={organisation.name} roles={actor.roles} />
          <WorkplacesCard places={places} currentId={organisation.id} change={switchWorkplaceAction} />
          <Card id="own-password" title={t("password.title")}>
            <ChangePasswordForm action={changePasswordAction} email={email} texts={texts} />
          </Card>
        </div>
        <PreferencesCard
          language={actor.locale}
          theme={session.theme}
          density={session.density}
          save={savePreferencesAction}
        />
      </div>
      <SessionsCard
        currentId={session.id}
        locale={actor.locale}
        timeZone={actor.timeZone}
        sessions={sessions}
        end={endSessionAction}
        endOthers={endOtherSessionsAction}
      />
    </>
  );
}
