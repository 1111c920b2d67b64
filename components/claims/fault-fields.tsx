import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { DateField } from "@/components/ui/date-field";
import { RadioTiles } from "@/components/ui/radio-tiles";
import { TextArea } from "@/components/ui/text-area";
import type { ClaimDraft } from "@/lib/claims/draft";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Locale } from "@/lib/kernel/locale";
import type { PartFamily } from "@/lib/parts/family";
import { quickDays } from "./line-fields";

type FaultFieldsProps = {
  draft: ClaimDraft;
  family: PartFamily;
  problems: readonly { fieldId: string; text: string }[];
  locale: Locale;
  today: CalendarDay;
};

/** What the part did, in plain words on large tiles, when, and whether somebody might have been hurt. */
export function FaultFields({ draft, family, problems, locale, today }: FaultFieldsProps) {
  const t = useTranslations("draft.fault");
  const line = useTranslations("draft.line");
  const words = useTranslations("families");
  const errorOf = (field: string) => problems.find((problem) => problem.fieldId === field)?.text;
  return (
    <Card isInCharge title={t("title")}>
      <div className="grid gap-6">
        <RadioTiles
          name="symptom"
          label={t("symptom")}
          chosen={draft.symptom}
          error={errorOf("symptom")}
          tiles={family.symptoms.map(({ code }) => ({
            value: code,
            label: words(`${family.code}.symptoms.${code}`),
          }))}
        />
        <DateField
          name="failedOn"
          label={t("failedOn")}
          hint={t("failedOnHint")}
          defaultValue={draft.failedOn}
          error={errorOf("failedOn")}
          quickDays={quickDays(line, locale, today)}
        />
        <TextArea
          name="note"
          label={t("note")}
          hint={t("noteHint")}
          isOptional
          limit={4000}
          defaultValue={draft.note}
        />
        <RadioGroup
          isInline
          name="incident"
          label={t("incident")}
          hint={t("incidentHint")}
          chosen={draft.incident}
          choices={[
            { value: "no", label: t("no") },
            { value: "yes", label: t("yes") },
          ]}
        />
        <TextArea
          name="incidentNote"
          label={t("incidentNote")}
          hint={t("incidentNoteHint")}
          isOptional
          limit={1000}
          defaultValue={draft.incidentNote}
        />
      </div>
    </Card>
  );
}
