import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { AcceptForm } from "@/components/people/accept-form";
import { SetPasswordForm } from "@/components/people/set-password-form";
import { SpentLink } from "@/components/people/spent-link";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { TextLink } from "@/components/ui/link-button";
import { findOpenLink } from "@/lib/people/account/queries";
import { PASSWORD_CHARACTERS } from "@/lib/people/schema";
import { setPasswordAction } from "../../reset/actions";
import { acceptInvitationAction } from "../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("links.invitation");
  return { title: t("title"), robots: { index: false } };
}

export const dynamic = "force-dynamic";

/** What an invitation is for; who is new chooses a password, who has an account signs in with the one they have. */
export default async function InvitationPage({ params }: { params: Promise<{ token: string }> }) {
  const [t, { token }] = await Promise.all([getTranslations("links.invitation"), params]);
  const owner = await findOpenLink(token, "invitation");
  if (!owner) return <SpentLink purpose="invitation" />;
  return (
    <Card isInCharge>
      <h1 className="mb-2 text-24 wrap-break-word">{t("welcome", { name: owner.name })}</h1>
      <p className="mb-4 text-ink-2">{owner.hasAccount ? t("accept.intro") : t("intro")}</p>
      <div className="mb-6 border-t border-rule">
        <Facts>
          <Fact term={t("organisation")}>{owner.organisation}</Fact>
          <Fact term={t("email")}>{owner.email}</Fact>
        </Facts>
      </div>
      {owner.hasAccount ? (
        <Accept token={token} email={owner.email} />
      ) : (
        <ChoosePassword token={token} email={owner.email} />
      )}
    </Card>
  );
}

type Invited = { token: string; email: string };

async function ChoosePassword({ token, email }: Invited) {
  const [t, links] = await Promise.all([getTranslations("links.invitation"), getTranslations("links")]);
  const texts = {
    password: links("password"),
    hint: links("passwordHint", PASSWORD_CHARACTERS),
    show: links("show"),
    hide: links("hide"),
    submit: t("submit"),
  };
  return (
    <SetPasswordForm
      action={setPasswordAction}
      token={token}
      purpose="invitation"
      email={email}
      texts={texts}
    />
  );
}

async function Accept({ token, email }: Invited) {
  const [t, links] = await Promise.all([
    getTranslations("links.invitation.accept"),
    getTranslations("links"),
  ]);
  const texts = {
    password: t("password"),
    show: links("show"),
    hide: links("hide"),
    submit: t("submit"),
  };
  return (
    <>
      <AcceptForm action={acceptInvitationAction} token={token} email={email} texts={texts} />
      <p className="mt-6 border-t border-rule pt-4">
        <TextLink href="/forgotten">{t("forgotten")}</TextLink>
      </p>
    </>
  );
}
