import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Timeline, TimelineEntry } from "@/components/ui/timeline";
import type { EntryView } from "@/lib/claims/sheet/view";
import { parseCalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { SheetProps } from "./shared";

const textIn = (detail: EntryView["detail"], name: string, locale: Locale): string | null => {
  const value = detail[name];
  if (typeof value === "number") return String(value);
  if (typeof value !== "string" || value === "") return null;
  const day = parseCalendarDay(value);
  return day ? formatDay(day, locale) : value;
};

/** The timeline nobody can change, newest last, and the revisions with their fingerprints. */
export function Record({ sheet, locale, timeZone }: SheetProps) {
  const t = useTranslations("sheet.record");
  const kinds = useTranslations("sheet.record.kinds");
  return (
    <Card id="record" title={t("title")} note={t("note")}>
      <Timeline label={t("title")}>
        {sheet.timeline.map((entry) => (
          <TimelineEntry
            key={entry.seq}
            what={
              kinds.has(entry.kind)
                ? kinds(entry.kind, {
                    revision: textIn(entry.detail, "revision", locale) ?? "",
                    note: textIn(entry.detail, "note", locale) ?? "",
                  })
                : entry.kind
            }
            who={
              entry.actorOrganisation
                ? t("who", { name: entry.actorName, organisation: entry.actorOrganisation })
                : entry.actorName
            }
            when={formatInstant(new Date(entry.at), locale, timeZone)}
            at={entry.at}
          >
            {["question", "reason"].map((name) => {
              const text = textIn(entry.detail, name, locale);
              return text ? (
                <p key={name} className="whitespace-pre-wrap">
                  {text}
                </p>
              ) : null;
            })}
            {entry.isOwnOnly ? <p className="text-small text-ink-2">{t("ownOnly")}</p> : null}
          </TimelineEntry>
        ))}
      </Timeline>
      <h3 className="mt-6 mb-2 text-18">{t("revisions")}</h3>
      <ul className="grid gap-1 text-small">
        {sheet.revisions.map((revision) => (
          <li key={revision.revision}>
            {t("revision", {
              revision: revision.revision,
              at: formatInstant(new Date(revision.sentAt), locale, timeZone),
            })}{" "}
            <span className="font-mono text-ink-2" title={revision.sha256}>
              {revision.sha256.slice(0, 12)}
            </span>
          </li>
        ))}
      </ul>
    </Card>
  );
}
