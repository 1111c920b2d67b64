import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { FamilyGlyph } from "@/components/ui/family-glyph";
import { PageHeader } from "@/components/ui/page-header";
import { ClaimMark, LateMark } from "@/components/ui/status-mark";
import { formatDay, formatInstant, formatMoney } from "@/lib/kernel/format";
import { calendarDay, dayInZone, daysBetween } from "@/lib/kernel/calendar-day";
import type { SheetProps } from "./shared";

/** Which claim, what it is about, where it stands, and until when somebody owes an answer. */
export function SheetHead({ sheet, locale, timeZone }: SheetProps) {
  const t = useTranslations("sheet");
  const words = useTranslations("families");
  const draft = useTranslations("draft");
  const mark =
    sheet.state === "decided" && sheet.outcome
      ? sheet.outcome
      : sheet.state === "decided"
        ? "upheld"
        : sheet.state;
  const title = sheet.symptom
    ? words(`${sheet.family}.symptoms.${sheet.symptom}`)
    : words(`${sheet.family}.name`);
  const other = sheet.side === "distributor" ? sheet.workshopName : sheet.sellerName;
  const asked =
    sheet.state === "answerNeeded" ? sheet.queries.find(({ answeredAt }) => !answeredAt) : undefined;
  return (
    <div className="grid gap-4">
      <PageHeader
        eyebrow={
          <>
            {t("claim")} <span className="font-mono">{sheet.number}</span> · {other}
            {sheet.siteName ? ` · ${sheet.siteName}` : null}
          </>
        }
        title={
          <span className="inline-flex items-center gap-3">
            <FamilyGlyph family={sheet.family} className="size-6 sm:size-7" /> {title}
          </span>
        }
        note={
          <>
            <ClaimMark state={mark} />
            <Due sheet={sheet} locale={locale} timeZone={timeZone} />
            <span>{t("asked", { amount: formatMoney(sheet.asked, locale) })}</span>
            <span>{t("revision", { revision: sheet.revision })}</span>
          </>
        }
      />
      {sheet.safetyReported ? (
        <Banner kind="caution" title={t("safetyTitle")}>
          {t("safety", {
            at: sheet.incidentKnownAt ? formatInstant(new Date(sheet.incidentKnownAt), locale, timeZone) : "",
          })}
        </Banner>
      ) : null}
      {asked ? (
        <Banner kind="wanting" title={draft("queryTitle")}>
          <p className="whitespace-pre-wrap">{asked.question}</p>
        </Banner>
      ) : null}
      {sheet.state === "contested" ? <Contested sheet={sheet} /> : null}
      {sheet.parked ? (
        <Banner kind="info" title={t("parkedTitle", { name: sheet.parked.withName })}>
          {sheet.parked.question}
        </Banner>
      ) : null}
    </div>
  );
}

/** Why the verdict is contested, in the words of the workshop: it is what is to be judged now. */
function Contested({ sheet }: Pick<SheetProps, "sheet">) {
  const kinds = useTranslations("sheet.record.kinds");
  const reason = sheet.timeline.findLast(({ kind }) => kind === "contest")?.detail.reason;
  if (typeof reason !== "string") return null;
  return (
    <Banner kind="wanting" title={kinds("contest")}>
      <p className="whitespace-pre-wrap">{reason}</p>
    </Banner>
  );
}

function Due({ sheet, locale, timeZone }: SheetProps) {
  const t = useTranslations("sheet");
  if (sheet.queryLapsesOn && sheet.state === "answerNeeded")
    return <span>{t("answerUntil", { day: formatDay(calendarDay(sheet.queryLapsesOn), locale) })}</span>;
  if (!sheet.answerDueAt || (sheet.state !== "filed" && sheet.state !== "beingJudged")) return null;
  const due = new Date(sheet.answerDueAt);
  const daysOver = daysBetween(dayInZone(due, timeZone), dayInZone(new Date(), timeZone));
  if (daysOver > 0) return <LateMark daysOver={daysOver} plain={sheet.side === "workshop"} />;
  return <span>{t("dueBy", { at: formatInstant(due, locale, timeZone) })}</span>;
}
