import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Serial } from "@/components/ui/serial";
import { PartMark } from "@/components/ui/status-mark";
import type { Locale } from "@/lib/kernel/locale";
import type { ReturnLineView } from "@/lib/returns/view";
import type { Limits } from "@/lib/rule-book/limits-shape";
import { FindingView } from "./finding-view";

type ReturnLineProps = {
  line: ReturnLineView;
  limits: Limits | null;
  locale: Locale;
  timeZone: string;
};

/** One part of a return: where it is, whether it is the one, and what the bench found. */
export function ReturnLine({ line, limits, locale, timeZone }: ReturnLineProps) {
  const t = useTranslations("returns.card");
  const words = useTranslations("returns");
  return (
    <section className="grid gap-2 [section+&]:border-t [section+&]:border-rule [section+&]:pt-4">
      <h3 className="flex flex-wrap items-center gap-x-3 gap-y-1 text-18">
        {t("line", { line: line.lineNumber, part: line.partName })}
        <PartMark state={line.state === "notSentInTime" ? "notSent" : line.state} />
      </h3>
      {line.serial ? (
        <p>
          <Serial value={line.serial} />
        </p>
      ) : null}
      {line.isOtherSerial ? (
        <Banner kind="wanting">
          {t("otherSerial")} <Serial value={line.serialSeen ?? ""} />
        </Banner>
      ) : null}
      {line.isQuarantined ? <Banner kind="caution">{t("quarantined")}</Banner> : null}
      {line.place ? (
        <p className="text-small text-ink-2">
          {t("place")} <span className="font-mono">{line.place}</span>
        </p>
      ) : null}
      {line.finding ? (
        <FindingView finding={line.finding} limits={limits} locale={locale} timeZone={timeZone} />
      ) : null}
      {line.disposedAs ? <p>{t("disposed", { how: words(`disposals.${line.disposedAs}`) })}</p> : null}
    </section>
  );
}
