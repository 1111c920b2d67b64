import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { ClaimMark } from "@/components/ui/status-mark";
import type { VerdictView } from "@/lib/claims/sheet/view";
import { CAUSES, type Attribution } from "@/lib/claims/verdict";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatInstant } from "@/lib/kernel/format";
import { equalFractions, ONE, parseFraction, printFraction, ZERO } from "@/lib/kernel/fraction";
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
            {t("line", { line: line.lineNumber })}
            {verdict.lines.length > 1 ? <ClaimMark state={line.outcome} /> : null}
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
              <Shares attribution={line.attribution} />
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

/** Whose doing it was, always in the same order of causes; those without a share are left out. */
function Shares({ attribution }: { attribution: Attribution }) {
  const t = useTranslations("sheet.verdict");
  const words = useTranslations("verdicts");
  const shares = CAUSES.map((cause) => ({ cause, share: parseFraction(attribution[cause] ?? "0") ?? ZERO }));
  return (
    <ul>
      {shares
        .filter(({ share }) => !equalFractions(share, ZERO))
        .map(({ cause, share }) => (
          <li key={cause}>
            {equalFractions(share, ONE)
              ? t("shareWhole", { cause: words(`causes.${cause}`) })
              : t("share", { cause: words(`causes.${cause}`), share: printFraction(share) })}
          </li>
        ))}
    </ul>
  );
}
