import { useTranslations } from "next-intl";
import type { SheetProps } from "./shared";

/** The case in one line, for somebody with eighty of them before them. */
export function CaseLineView({ sheet }: SheetProps) {
  const t = useTranslations("sheet.case");
  const line = sheet.caseLine;
  if (!line) return null;
  const fragments = [
    line.monthsUsed === null ? t("monthsUnknown") : t("months", { months: line.monthsUsed }),
    line.daysLeft === null
      ? t("termUnknown")
      : line.daysLeft < 0
        ? t("termOver", { days: -line.daysLeft })
        : t("termLeft", { days: line.daysLeft }),
    t("evidence", { done: line.evidenceDone, all: line.evidenceAll }),
    t("sameBatch", { count: line.sameBatch }),
    t("sameWorkshop", { count: line.sameWorkshopThisMonth }),
    t("sameVehicle", { count: line.sameVehicle }),
  ];
  return (
    <ul
      aria-label={t("label")}
      className="flex flex-wrap gap-x-2 gap-y-1 border-y border-rule py-2 text-ink-2"
    >
      {fragments.map((fragment, place) => (
        <li key={fragment}>
          {place > 0 ? <span aria-hidden="true">· </span> : null}
          {fragment}
        </li>
      ))}
    </ul>
  );
}
