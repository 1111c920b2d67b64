import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Checkbox } from "@/components/ui/check";
import { RadioGroup } from "@/components/ui/choice-group";
import { TextArea } from "@/components/ui/text-area";
import type { ClaimDraft } from "@/lib/claims/draft";
import type { PartFamily } from "@/lib/parts/family";

type ExclusionFieldsProps = { draft: ClaimDraft; family: PartFamily };

/** Proof by exclusion, and the condition the part was found in: apart from the failure itself. */
export function ExclusionFields({ draft, family }: ExclusionFieldsProps) {
  const t = useTranslations("draft.exclusion");
  const words = useTranslations("families");
  return (
    <>
      <Card title={t("ruledOutTitle")}>
        <p className="mb-3 max-w-measure text-ink-2">{t("ruledOutWhy")}</p>
        <input type="hidden" name="replaces[]" value="ruledOut" />
        <ul className="grid gap-1">
          {family.ruledOut.map((item) => (
            <li key={item}>
              <Checkbox
                name={`ruledOut.${item}`}
                value="checked"
                label={words(`${family.code}.ruledOut.${item}`)}
                defaultChecked={item in draft.ruledOut}
              />
            </li>
          ))}
        </ul>
      </Card>
      <Card title={t("conditionTitle")}>
        <p className="mb-3 max-w-measure text-ink-2">{t("conditionWhy")}</p>
        <div className="grid gap-4">
          {family.conditionAsFound.map((item) => (
            <RadioGroup
              isInline
              key={item}
              name={`condition.${item}`}
              label={words(`${family.code}.conditionAsFound.${item}`)}
              chosen={draft.condition[item]}
              choices={[
                { value: "no", label: t("notFound") },
                { value: "yes", label: t("found") },
              ]}
            />
          ))}
          <TextArea
            name="conditionNote"
            label={t("conditionNote")}
            isOptional
            limit={1000}
            defaultValue={draft.conditionNote}
          />
          <TextArea
            name="earlierWork"
            label={t("earlierWork")}
            hint={t("earlierWorkHint")}
            isOptional
            limit={1000}
            defaultValue={draft.earlierWork}
          />
        </div>
      </Card>
    </>
  );
}
