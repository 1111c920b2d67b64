import clsx from "clsx";
import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Mark } from "@/components/ui/status-mark";
import type { AlertView } from "@/lib/alerts/view";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type AlertListProps = { alerts: readonly AlertView[]; locale: Locale; timeZone: string };

/** What a person was told of, newest first. Unread by shape, words and weight; each leads to its claim. */
export function AlertList({ alerts, locale, timeZone }: AlertListProps) {
  const t = useTranslations("alerts");
  return (
    <ol aria-label={t("list")} className="grid">
      {alerts.map(({ id, kind, number, values, at, isUnread }) => (
        <li
          key={id}
          className="grid gap-x-4 gap-y-1 border-b border-rule py-3 last:border-b-0 sm:grid-cols-[8rem_1fr_auto] sm:items-baseline"
        >
          <p className="justify-self-start">
            <Mark
              shape={isUnread ? "openDiamond" : "dot"}
              tone={isUnread ? "wanting" : "quiet"}
              plain={!isUnread}
            >
              {isUnread ? t("unread") : t("read")}
            </Mark>
          </p>
          <p className={clsx("max-w-measure", isUnread && "font-semibold")}>
            {/* Opening it is what marks it as read, so nothing may open it ahead of the person. */}
            <TextLink href={`/alerts/${id}`} prefetch={false}>
              <span className="font-mono">{number}</span>
            </TextLink>{" "}
            {t(`kinds.${kind}`, values)}
          </p>
          <time dateTime={at} className="text-small text-ink-2">
            {formatInstant(new Date(at), locale, timeZone)}
          </time>
        </li>
      ))}
    </ol>
  );
}
