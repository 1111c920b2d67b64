import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { LinkButton } from "@/components/ui/link-button";

/** There is nothing here: the same words whether it does not exist, is somebody else's, or is not in one's roles. */
export async function NotHere({ kind = "page" }: { kind?: "page" | "claim" }) {
  const t = await getTranslations("boundaries.notHere");
  return (
    <div className="max-w-2xl">
      <Card isInCharge>
        <h1 className="mb-3 text-24">{t(`${kind}.title`)}</h1>
        <p className="mb-6 max-w-measure">{t(`${kind}.body`)}</p>
        <LinkButton href="/" kind="primary">
          {t("home")}
        </LinkButton>
      </Card>
    </div>
  );
}
