import { useTranslations } from "next-intl";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/select";
import { TextField } from "@/components/ui/text-field";

type FilterFormProps = {
  workshops: readonly { readonly id: string; readonly name: string }[];
  workshop: string;
  month: string;
};

/** Which entries are shown; the choice is an address. */
export function FilterForm({ workshops, workshop, month }: FilterFormProps) {
  const t = useTranslations("dayBook");
  return (
    <form action="/day-book" aria-label={t("filter")} className="flex flex-wrap items-end gap-4 print:hidden">
      <Select
        name="workshop"
        label={t("workshop")}
        blank={t("everyWorkshop")}
        options={workshops.map(({ id, name }) => ({ value: id, label: name }))}
        defaultValue={workshop}
      />
      <TextField name="month" label={t("month")} hint={t("monthHint")} defaultValue={month} maxLength={7} />
      <Button type="submit" kind="secondary">
        {t("show")}
      </Button>
    </form>
  );
}
