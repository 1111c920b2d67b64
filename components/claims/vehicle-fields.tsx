import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { DateField } from "@/components/ui/date-field";
import { TextField } from "@/components/ui/text-field";
import type { ClaimDraft } from "@/lib/claims/draft";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Locale } from "@/lib/kernel/locale";
import { quickDays } from "./line-fields";

type VehicleFieldsProps = {
  draft: ClaimDraft;
  problems: readonly { fieldId: string; text: string }[];
  locale: Locale;
  today: CalendarDay;
};

/** The vehicle by its frame serial, never by its rider, and when it was put right. */
export function VehicleFields({ draft, problems, locale, today }: VehicleFieldsProps) {
  const t = useTranslations("draft.vehicle");
  const line = useTranslations("draft.line");
  const errorOf = (field: string) => problems.find((problem) => problem.fieldId === field)?.text;
  return (
    <Card title={t("title")}>
      <div className="grid gap-5">
        <TextField
          name="frameSerial"
          label={t("frameSerial")}
          hint={t("frameSerialHint")}
          isSerial
          defaultValue={draft.frameSerial}
          error={errorOf("frameSerial")}
          maxLength={80}
        />
        <TextField
          name="vehicleModel"
          label={t("model")}
          isOptional
          defaultValue={draft.vehicleModel}
          maxLength={120}
        />
        <DateField
          name="repairedOn"
          label={t("repairedOn")}
          isOptional
          defaultValue={draft.repairedOn}
          error={errorOf("repairedOn")}
          quickDays={quickDays(line, locale, today)}
        />
      </div>
    </Card>
  );
}
