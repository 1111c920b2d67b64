import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Card } from "@/components/ui/card";
import { Facts } from "@/components/ui/facts";
import { TextLink } from "@/components/ui/link-button";
import { draftStepPath, type DraftStep } from "@/lib/claims/paths";

/** What one page of a draft says, with the way back to that page. */
export function CheckCard({
  number,
  step,
  children,
}: {
  number: string;
  step: DraftStep;
  children: ReactNode;
}) {
  const t = useTranslations("draft");
  return (
    <Card
      title={t(`steps.${step}`)}
      actions={
        <TextLink href={draftStepPath({ number }, step)}>
          {t("check.change", { step: t(`steps.${step}`) })}
        </TextLink>
      }
    >
      <Facts>{children}</Facts>
    </Card>
  );
}

/** What was given, or that nothing was. */
export function Given({ children }: { children: ReactNode }) {
  const t = useTranslations("draft.check");
  return children || <span className="text-ink-3">{t("notGiven")}</span>;
}
