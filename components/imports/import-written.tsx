import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Card } from "@/components/ui/card";
import type { ImportView } from "@/lib/imports/view";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { ImportFigures } from "./import-figures";

type ImportWrittenProps = { sent: ImportView; locale: Locale; timeZone: string };

/** A file that is on record, with what it wrote. */
export function ImportWritten({ sent, locale, timeZone }: ImportWrittenProps) {
  const t = useTranslations("imports.preview");
  return (
    <>
      {sent.importedAt ? (
        <Banner
          kind="proven"
          title={t("doneTitle", { when: formatInstant(sent.importedAt, locale, timeZone) })}
        >
          {t("done")}
        </Banner>
      ) : null}
      {sent.result ? (
        <Card title={t("written")}>
          <ImportFigures result={sent.result} locale={locale} />
        </Card>
      ) : null}
    </>
  );
}
