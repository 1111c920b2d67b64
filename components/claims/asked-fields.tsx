import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { ReadingField } from "@/components/ui/reading-field";
import type { ClaimDraft } from "@/lib/claims/draft";
import type { Currency } from "@/lib/kernel/currency";

type AskedFieldsProps = {
  draft: ClaimDraft;
  currency: Currency;
  problems: readonly { fieldId: string; text: string }[];
};

const AMOUNTS = ["diagnosisAsked", "consumablesAsked", "carriageAsked"] as const;

/** What the repair cost besides the part. Every field may stay empty; the rules say what is paid of it. */
export function AskedFields({ draft, currency, problems }: AskedFieldsProps) {
  const t = useTranslations("draft.asked");
  const errorOf = (field: string) => problems.find((problem) => problem.fieldId === field)?.text;
  return (
    <Card title={t("title")}>
      <p className="mb-3 max-w-measure text-ink-2">{t("why")}</p>
      <div className="grid gap-5">
        <ReadingField
          name="labourMinutes"
          label={t("labourMinutes")}
          unit={t("minutesUnit")}
          isOptional
          maxLength={20}
          defaultValue={draft.labourMinutes}
          error={errorOf("labourMinutes")}
        />
        {AMOUNTS.map((field) => (
          <ReadingField
            key={field}
            name={field}
            label={t(field)}
            unit={currency}
            isOptional
            maxLength={20}
            defaultValue={draft[field]}
            error={errorOf(field)}
          />
        ))}
      </div>
    </Card>
  );
}
