import { useTranslations } from "next-intl";
import { Serial } from "@/components/ui/serial";
import type { DraftLine } from "@/lib/claims/draft";

/** One part of a claim as it goes out: its serial or how many, its fitting, and what took its place. */
export function CheckLine({ line }: { line: DraftLine }) {
  const t = useTranslations("draft.check");
  return (
    <>
      {line.serial ? <Serial value={line.serial} /> : t("quantity", { quantity: line.quantity })}
      <span className="block text-small text-ink-2">
        {t("fitting", { day: line.fittedOn || t("notGiven"), by: line.installer || t("notGiven") })}
      </span>
      {line.replacementSerial ? (
        <span className="block text-small text-ink-2">
          {t("replacement", {
            serial: line.replacementSerial,
            day: line.replacementFittedOn || t("notGiven"),
          })}
        </span>
      ) : null}
    </>
  );
}
