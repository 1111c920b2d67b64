import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { ForgottenForm } from "@/components/people/forgotten-form";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { RESET_MINUTES } from "@/lib/people/service";
import { askForResetAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("links.forgotten");
  return { title: t("title") };
}

export const dynamic = "force-dynamic";

/** The way back in. After asking it says the same for every address. */
export default async function ForgottenPage({ searchParams }: { searchParams: Promise<{ sent?: string }> }) {
  const [t, links, { sent }] = await Promise.all([
    getTranslations("links.forgotten"),
    getTranslations("links"),
    searchParams,
  ]);
  return (
    <Card isInCharge>
      <h1 className="mb-4 text-24">{sent ? t("sentTitle") : t("title")}</h1>
      {sent ? (
        <div role="status" className="grid gap-3">
          <p>{t("sent", { minutes: RESET_MINUTES })}</p>
          <p className="text-ink-2">{t("nothingCame")}</p>
        </div>
      ) : (
        <>
          <p className="mb-4 text-ink-2">{t("intro")}</p>
          <ForgottenForm action={askForResetAction} texts={{ email: t("email"), submit: t("submit") }} />
        </>
      )}
      <p className="mt-6 flex flex-wrap gap-x-6 gap-y-2 border-t border-rule pt-4">
        <TextLink href="/sign-in">{links("signIn")}</TextLink>
        {sent ? <TextLink href="/forgotten">{links("askAgain")}</TextLink> : null}
      </p>
    </Card>
  );
}
