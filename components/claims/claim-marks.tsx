import { useTranslations } from "next-intl";
import { ClaimMark, LateMark, Mark } from "@/components/ui/status-mark";
import type { ClaimItem } from "@/lib/claims/lists/view";
import { dayInZone, daysBetween } from "@/lib/kernel/calendar-day";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

export type Side = "workshop" | "distributor";
export type Reader = { locale: Locale; timeZone: string };

/** Where the claim stands. At the desk nearly all stand alike: there the state is plain and what is urgent is stamped. */
export function StateMarks({ item, side }: { item: ClaimItem; side: Side }) {
  const t = useTranslations("live.lists");
  const isDesk = side === "distributor";
  return (
    <span className="flex flex-wrap items-center gap-x-3 gap-y-1">
      {item.safetyReported ? (
        <Mark shape="triangle" tone="refused">
          {t("safety")}
        </Mark>
      ) : null}
      <ClaimMark state={item.mark} plain={isDesk && item.mark !== "contested"} />
      {item.flagCount > 0 ? (
        <Mark shape="openTriangle" tone="wanting">
          {t("flags", { count: item.flagCount })}
        </Mark>
      ) : null}
      {isDesk && item.holderName ? <span className="text-small text-ink-2">{item.holderName}</span> : null}
    </span>
  );
}

/** Until when the distributor owes an answer, or by how much it is late. */
export function DueMark({ item, side, locale, timeZone }: Reader & { item: ClaimItem; side: Side }) {
  const t = useTranslations("live.lists");
  if (item.isClockStopped) return <span className="text-ink-3">{t("stopped")}</span>;
  if (!item.answerDueAt || (item.mark !== "filed" && item.mark !== "beingJudged"))
    return <span className="text-ink-3">{t("none")}</span>;
  const due = new Date(item.answerDueAt);
  const daysOver = daysBetween(dayInZone(due, timeZone), dayInZone(new Date(), timeZone));
  return daysOver > 0 ? (
    <LateMark daysOver={daysOver} plain={side === "workshop"} />
  ) : (
    <span className="tabular-nums">{formatInstant(due, locale, timeZone)}</span>
  );
}
