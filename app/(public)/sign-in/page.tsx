import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { getTranslations } from "next-intl/server";
import { SignInForm } from "@/components/people/sign-in-form";
import { TextLink } from "@/components/ui/link-button";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import { currentSession } from "@/lib/web/session";
import { signInAction } from "./actions";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("signIn");
  return { title: t("title") };
}

export const dynamic = "force-dynamic";

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ note?: string }> }) {
  const [session, t, { note }] = await Promise.all([
    currentSession(),
    getTranslations("signIn"),
    searchParams,
  ]);
  if (session) redirect("/");
  const texts = { email: t("email"), password: t("password"), submit: t("submit") };
  return (
    <>
      {note === "passwordSet" ? <Banner kind="proven">{t("passwordSet")}</Banner> : null}
      {note === "signedOut" ? <Banner kind="info">{t("signedOut")}</Banner> : null}
      <Card isInCharge>
        <h1 className="mb-4 text-24">{t("title")}</h1>
        <SignInForm action={signInAction} texts={texts} />
        <p className="mt-6 border-t border-rule pt-4">
          <TextLink href="/forgotten">{t("forgotten")}</TextLink>
        </p>
      </Card>
    </>
  );
}
