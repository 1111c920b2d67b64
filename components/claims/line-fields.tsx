import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { DateField } from "@/components/ui/date-field";
import { Serial } from "@/components/ui/serial";
import { TextField } from "@/components/ui/text-field";
import type { DraftLine } from "@/lib/claims/draft";
import { addDays, type CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type Sentence = { fieldId: string; text: string };
type LineFieldsProps = {
  line: DraftLine;
  place: number;
  unit: { serial: string; batchCode: string | null; shippedOn: CalendarDay; sellerName: string } | null;
  part: { number: string; name: string } | null;
  installers: readonly string[];
  problems: readonly Sentence[];
  locale: Locale;
  today: CalendarDay;
  isAlone: boolean;
};

const POSITIONS = ["left", "right", "single"] as const;

/** Today and yesterday, the days most often meant, ready to be pressed. */
export const quickDays = (t: (key: "today" | "yesterday") => string, locale: Locale, today: CalendarDay) => [
  { label: t("today"), value: formatDay(today, locale) },
  { label: t("yesterday"), value: formatDay(addDays(today, -1), locale) },
];

/** One unit of the claim: what it is, where it sat, who fitted it and when, and the part that took its place. */
export function LineFields({
  line,
  place,
  unit,
  part,
  installers,
  problems,
  locale,
  today,
  isAlone,
}: LineFieldsProps) {
  const t = useTranslations("draft.line");
  const name = (field: keyof DraftLine) => `lines.${place}.${field}`;
  const errorOf = (field: keyof DraftLine) =>
    problems.find((problem) => problem.fieldId === name(field))?.text;
  const listId = `installers-${place}`;
  return (
    <Card isInCharge={place === 0} title={part?.name ?? t("unknownPart")} note={part?.number}>
      <div className="grid gap-5">
        <p className="text-ink-2">
          {line.serial ? <Serial value={line.serial} className="text-18 text-ink" /> : t("noSerial")}
          {unit ? (
            <>
              {" "}
              ·{" "}
              {t("shipped", {
                day: formatDay(unit.shippedOn, locale),
                seller: unit.sellerName,
                batch: unit.batchCode ?? "none",
              })}
            </>
          ) : null}
        </p>
        {unit || line.serial ? null : (
          <TextField
            name={name("quantity")}
            label={t("quantity")}
            inputMode="numeric"
            defaultValue={line.quantity}
            error={errorOf("quantity")}
          />
        )}
        <RadioGroup
          name={name("position")}
          label={t("position")}
          choices={POSITIONS.map((position) => ({ value: position, label: t(`positions.${position}`) }))}
          chosen={line.position || (isAlone ? "single" : undefined)}
        />
        <DateField
          name={name("fittedOn")}
          label={t("fittedOn")}
          hint={t("fittedOnHint")}
          defaultValue={line.fittedOn}
          error={errorOf("fittedOn")}
        />
        <TextField
          name={name("installer")}
          label={t("installer")}
          hint={t("installerHint")}
          list={listId}
          autoComplete="off"
          defaultValue={line.installer}
          maxLength={120}
        />
        <datalist id={listId}>
          {installers.map((installer) => (
            <option key={installer} value={installer} />
          ))}
        </datalist>
        <TextField
          name={name("replacementSerial")}
          label={t("replacementSerial")}
          hint={t("replacementHint")}
          isOptional
          isSerial
          defaultValue={line.replacementSerial}
          maxLength={80}
        />
        <DateField
          name={name("replacementFittedOn")}
          label={t("replacementFittedOn")}
          isOptional
          defaultValue={line.replacementFittedOn}
          error={errorOf("replacementFittedOn")}
          quickDays={quickDays(t, locale, today)}
        />
      </div>
    </Card>
  );
}
