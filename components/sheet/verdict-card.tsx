import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { ClaimMark } from "@/components/ui/status-mark";
import type { VerdictView } from "@/lib/claims/sheet/view";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatInstant } from "@/lib/kernel/format";
import { CoverageSteps } from "./coverage-steps";
import type { SheetProps } from "./shared";

/** The verdict as it was given: rule, fact, reason and the way to object, for each line. */
export function VerdictCard({ verdict, sheet, locale, timeZone }: SheetProps & { verdict: VerdictView }) {
  const t = useTranslations("sheet.verdict");
  const words = useTranslations("verdicts");
  return (
    <Card
      isInCharge
      id="verdict"
      title={t("title")}
      note={t("on", {
        at: formatInstant(new Date(verdict.decidedAt), locale, timeZone),
        revision: verdict.revision,
      })}
      actions={<ClaimMark state={verdict.outcome} />}
    >
      <p className="mb-4 max-w-measure whitespace-pre-wrap">{verdict.letter}</p>
      {verdict.lines.map((line) => (
        <section key={line.lineNumber} className="mb-4 border-t border-rule pt-4">
          <h3 className="mb-2 flex flex-wrap items-center gap-3 text-18">
            {t("line", { line: line.lineNumber })} <ClaimMark state={line.outcome} />
          </h3>
          <Facts>
            <Fact term={t("reason")}>
              <span className="font-semibold">{words(`reasons.${line.reasonCode}.name`)}</span>
              <p className="max-w-measure whitespace-pre-wrap">{line.reason}</p>
            </Fact>
            <Fact term={t("rule")}>
              {line.rule
                ? t("ruleCited", {
                    number: line.rule.number,
                    title: line.rule.title,
                    day: formatDay(calendarDay(line.rule.validFrom), locale),
                  })
                : t("noRule")}
            </Fact>
            <Fact term={t("shares")}>
              {Object.entries(line.attribution)
                .map(([cause, share]) => `${words(`causes.${cause}`)} ${share}`)
                .join(", ")}
            </Fact>
            {line.returnWaivedReason ? <Fact term={t("returnWaived")}>{line.returnWaivedReason}</Fact> : null}
          </Facts>
          <details className="mt-2">
            <summary className="min-h-target cursor-pointer py-2 text-petrol underline underline-offset-4">
              {t("cover")}
            </summary>
            <CoverageSteps coverage={line.coverage} locale={locale} />
          </details>
        </section>
      ))}
      {sheet.isContestOpen && sheet.contestUntil ? (
        <p className="font-semibold">
          {t("contestUntil", { day: formatDay(calendarDay(sheet.contestUntil), locale) })}
        </p>
      ) : null}
    </Card>
  );
}
