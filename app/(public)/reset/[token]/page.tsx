import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { SetPasswordForm } from "@/components/people/set-password-form";
import { SpentLink } from "@/components/people/spent-link";
import { Card } from "@/components/ui/card";
import { findOpenLink } from "@/lib/people/account/queries";
import { PASSWORD_CHARACTERS } from "@/lib/people/schema";
import { setPasswordAction } from "../actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("links.reset");
  return { title: t("title"), robots: { index: false } };
}

export const dynamic = "force-dynamic";

/** A new password by the link of a mail. */
export default async function ResetPage({ params }: { params: Promise<{ token: string }> }) {
  const [t, links, { token }] = await Promise.all([
    getTranslations("links.reset"),
    getTranslations("links"),
    params,
  ]);
  const owner = await findOpenLink(token, "reset");
  if (!owner) return <SpentLink purpose="reset" />;
  const texts = {
    password: links("password"),
    hint: links("passwordHint", PASSWORD_CHARACTERS),
    show: links("show"),
    hide: links("hide"),
    submit: t("submit"),
  };
  return (
    <Card isInCharge>
      <h1 className="mb-4 text-24">{t("title")}</h1>
      <p className="mb-4 wrap-break-word text-ink-2">{t("intro", { email: owner.email })}</p>
      <SetPasswordForm
        action={setPasswordAction}
        token={token}
        purpose="reset"
        email={owner.email}
        texts={texts}
      />
    </Card>
  );
}
