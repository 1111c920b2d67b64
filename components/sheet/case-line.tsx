import { useTranslations } from "next-intl";
import type { SheetProps } from "./shared";

/** The case in one line, for somebody with eighty of them before them. */
export function CaseLineView({ sheet }: SheetProps) {
  const t = useTranslations("sheet.case");
  const line = sheet.caseLine;
  if (!line) return null;
  const term =
    line.daysLeft === null
      ? t("termUnknown")
      : line.daysLeft < 0
        ? t("termOver", { days: -line.daysLeft })
        : t("termLeft", { days: line.daysLeft });
  // What is out of the ordinary stands out; the rest is there to be read past.
  const fragments = [
    { text: line.monthsUsed === null ? t("monthsUnknown") : t("months", { months: line.monthsUsed }) },
    { text: term, isOdd: line.daysLeft === null || line.daysLeft < 0 },
    { text: t("evidence", { done: line.evidenceDone, all: line.evidenceAll }) },
    { text: t("sameBatch", { count: line.sameBatch }), isOdd: line.sameBatch > 0 },
    { text: t("sameWorkshop", { count: line.sameWorkshopThisMonth }) },
    { text: t("sameVehicle", { count: line.sameVehicle }), isOdd: line.sameVehicle > 0 },
  ];
  return (
    <ul
      aria-label={t("label")}
      className="flex flex-wrap gap-x-2 gap-y-1 border-y border-rule py-2 text-ink-2"
    >
      {fragments.map(({ text, isOdd = false }) => (
        <li key={text} className="group/item max-sm:basis-full">
          <span className={isOdd ? "font-semibold text-ink" : undefined}>{text}</span>
          <span aria-hidden="true" className="ml-2 group-last/item:hidden max-sm:hidden">
            ·
          </span>
        </li>
      ))}
    </ul>
  );
}
