import { useTranslations } from "next-intl";
import { DateField } from "@/components/ui/date-field";
import { Select } from "@/components/ui/select";
import { SubmitButton } from "@/components/ui/submit-button";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { COUNTINGS, START_CHOICES } from "@/lib/reports/life-curves/schema";
import type { LifeCurvesView } from "@/lib/reports/life-curves/view";

/** What is counted, from where, until when: a plain form whose answer is an address. */
export function Switches({
  view,
  isCutUnread,
  locale,
}: {
  view: LifeCurvesView;
  isCutUnread: boolean;
  locale: Locale;
}) {
  const t = useTranslations("lifeCurves.switches");
  const { query, largest } = view;
  const day = formatDay(query.cut, locale);
  return (
    <form action="/life-curves" className="grid gap-4 print:hidden" aria-label={t("title")}>
      {query.batch.map((one) => (
        <input key={one} type="hidden" name="batch" value={one} />
      ))}
      <div className="grid items-start gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
        <Select
          name="part"
          label={t("part")}
          defaultValue={view.part.partNumber}
          options={view.parts.map(({ partNumber, name, claims }) => ({
            value: partNumber,
            label: t("partOption", { number: partNumber, name, claims }),
          }))}
        />
        <Select
          name="count"
          label={t("count")}
          defaultValue={query.count}
          options={COUNTINGS.map((value) => ({ value, label: t(`counts.${value}`) }))}
        />
        <Select
          name="start"
          label={t("start")}
          defaultValue={query.start}
          options={START_CHOICES.map((value) => ({ value, label: t(`starts.${value}`) }))}
        />
        {largest ? (
          <Select
            name="shop"
            label={t("shop")}
            defaultValue={query.shop}
            options={[
              { value: "all", label: t("shops.all") },
              { value: "without", label: t("shops.without", largest) },
            ]}
          />
        ) : null}
        <DateField
          name="cut"
          label={t("cut")}
          hint={t("cutHint")}
          defaultValue={day}
          caution={isCutUnread ? t("cutUnread", { day }) : undefined}
        />
      </div>
      <div>
        <SubmitButton kind="secondary">{t("show")}</SubmitButton>
      </div>
    </form>
  );
}
