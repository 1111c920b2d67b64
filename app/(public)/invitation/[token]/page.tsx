import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { SetPasswordForm } from "@/components/people/set-password-form";
import { SpentLink } from "@/components/people/spent-link";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { findOpenLink } from "@/lib/people/account/queries";
import { PASSWORD_CHARACTERS } from "@/lib/people/schema";
import { setPasswordAction } from "../../reset/actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("links.invitation");
  return { title: t("title"), robots: { index: false } };
}

export const dynamic = "force-dynamic";

/** The first password of somebody who was invited, with what the account is for. */
export default async function InvitationPage({ params }: { params: Promise<{ token: string }> }) {
  const [t, links, { token }] = await Promise.all([
    getTranslations("links.invitation"),
    getTranslations("links"),
    params,
  ]);
  const owner = await findOpenLink(token, "invitation");
  if (!owner) return <SpentLink purpose="invitation" />;
  const texts = {
    password: links("password"),
    hint: links("passwordHint", PASSWORD_CHARACTERS),
    show: links("show"),
    hide: links("hide"),
    submit: t("submit"),
  };
  return (
    <Card isInCharge>
      <h1 className="mb-2 text-24">{t("welcome", { name: owner.name })}</h1>
      <p className="mb-4 text-ink-2">{t("intro")}</p>
      <div className="mb-6 border-t border-rule">
        <Facts>
          <Fact term={t("organisation")}>{owner.organisation}</Fact>
          <Fact term={t("email")}>{owner.email}</Fact>
        </Facts>
      </div>
      <SetPasswordForm
        action={setPasswordAction}
        token={token}
        purpose="invitation"
        email={owner.email}
        texts={texts}
      />
    </Card>
  );
}
