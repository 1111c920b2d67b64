import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { LinkButton, TextLink } from "@/components/ui/link-button";
import type { LinkPurpose } from "@/lib/people/account/view";

/** What a link says that was used, has run out or never was: the same for all three, and the way on. */
export async function SpentLink({ purpose }: { purpose: LinkPurpose }) {
  const t = await getTranslations(`links.${purpose}`);
  const links = await getTranslations("links");
  return (
    <Card isInCharge>
      <h1 className="mb-4 text-24">{t("spentTitle")}</h1>
      <p className="mb-6">{t("spent")}</p>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
        <LinkButton href="/forgotten" kind="primary">
          {links("askAgain")}
        </LinkButton>
        <TextLink href="/sign-in">{links("signIn")}</TextLink>
      </div>
    </Card>
  );
}
