import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import type { ImportView } from "@/lib/imports/view";

/** What is worth knowing about how a file was read, before its contents. */
export function ImportNotes({ sent, wasSentBefore }: { sent: ImportView; wasSentBefore: boolean }) {
  const t = useTranslations("imports.preview");
  return (
    <>
      {wasSentBefore ? (
        <Banner kind="info" title={t("againTitle")} isLive>
          {t("again")}
        </Banner>
      ) : null}
      {sent.encoding === "windows-1252" && !sent.isImported ? (
        <Banner kind="wanting">{t("windows1252")}</Banner>
      ) : null}
      {sent.unread.length > 0 && !sent.isImported ? (
        <Banner kind="info" title={t("unreadTitle")}>
          {t("unread", { columns: sent.unread.join(", ") })}
        </Banner>
      ) : null}
    </>
  );
}
