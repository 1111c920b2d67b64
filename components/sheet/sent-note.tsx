import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { formatInstant } from "@/lib/kernel/format";
import type { SheetProps } from "./shared";

/** After sending: the number large enough to be copied onto the part, and what happens next, with its day. */
export function SentNote({ sheet, locale, timeZone }: SheetProps) {
  const t = useTranslations("sheet.sent");
  return (
    <Card isInCharge title={t("title")}>
      {/* Set like the plate it is copied onto. */}
      <p
        className="mb-4 w-fit rounded-sheet border-2 border-ink bg-well px-4 py-2 font-mono text-40 font-semibold"
        translate="no"
      >
        {sheet.number}
      </p>
      <p className="text-18 font-semibold">{t("write")}</p>
      <p className="mt-2 text-ink-2">
        {sheet.answerDueAt
          ? t("answerBy", {
              seller: sheet.sellerName,
              at: formatInstant(new Date(sheet.answerDueAt), locale, timeZone),
            })
          : t("answer", { seller: sheet.sellerName })}
      </p>
    </Card>
  );
}
