import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { ReadingField } from "@/components/ui/reading-field";
import type { ClaimDraft } from "@/lib/claims/draft";

/** The best proof there is: the same vehicle, a good part, the same run. */
export function SwapFields({ draft }: { draft: ClaimDraft }) {
  const t = useTranslations("draft.swap");
  const answers = [
    { value: "no", label: t("no") },
    { value: "yes", label: t("yes") },
  ];
  return (
    <Card title={t("title")}>
      <p className="mb-3 max-w-measure text-ink-2">{t("why")}</p>
      <div className="grid gap-5">
        <ReadingField
          name="swapMinutes"
          label={t("minutes")}
          unit={t("minutesUnit")}
          isOptional
          defaultValue={draft.swapMinutes}
        />
        <RadioGroup name="swapHeat" label={t("heat")} chosen={draft.swapHeat} choices={answers} />
        <RadioGroup name="testDrive" label={t("testDrive")} chosen={draft.testDrive} choices={answers} />
      </div>
    </Card>
  );
}
