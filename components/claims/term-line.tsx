import { useTranslations } from "next-intl";
import { Mark } from "@/components/ui/status-mark";
import type { Coverage } from "@/lib/coverage/coverage";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

/** The term in one line: until when, how many days are left or over, or what is missing to say so. */
export function TermLine({ coverage, locale }: { coverage: Coverage; locale: Locale }) {
  const t = useTranslations("term");
  const { lastCoveredOn, daysLeft } = coverage;
  if (lastCoveredOn === null || daysLeft === null)
    return (
      <p className="my-2">
        <Mark shape="openDiamond" tone="wanting">
          {t("open")}
        </Mark>
      </p>
    );
  const isOver = daysLeft < 0;
  return (
    <p className="my-2">
      <Mark shape={isOver ? "barOctagon" : "tickSquare"} tone={isOver ? "refused" : "proven"}>
        {isOver
          ? t("over", { day: formatDay(lastCoveredOn, locale), days: -daysLeft })
          : t("until", { day: formatDay(lastCoveredOn, locale), days: daysLeft })}
      </Mark>
    </p>
  );
}
