import { useTranslations } from "next-intl";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { WEEKDAYS } from "@/lib/kernel/working-time";
import type { ServiceLevels } from "@/lib/rule-book/service-levels-shape";
import { AnswerTable } from "./answer-table";

const WEIGHTS = ["safetyCritical", "batchUnderWatch", "timeLeft", "repeatFailure", "age"] as const;

/** When the distributor works, how soon it answers, what makes a claim urgent. */
export function ServiceLevelsTable({ levels, locale }: { levels: ServiceLevels; locale: Locale }) {
  const t = useTranslations("ruleBook.levels");
  const { calendar, priorityWeights } = levels;
  const hoursOn = (day: (typeof WEEKDAYS)[number]) =>
    calendar.hours[day].map(({ opens, closes }) => t("hours", { opens, closes })).join(", ") || t("dayOff");
  return (
    <div className="grid gap-6">
      <AnswerTable
        caption={t("caption")}
        heads={[t("question"), t("answer")]}
        answers={[
          { question: t("answerWithin"), answer: t("workingDays", { count: levels.answerWorkingDays }) },
          ...WEEKDAYS.map((day) => ({ question: t(`days.${day}`), answer: hoursOn(day) })),
          { question: t("timeZone"), answer: calendar.timeZone },
          {
            question: t("holidays"),
            answer: calendar.holidays.map((day) => formatDay(day, locale)).join("; ") || t("noHolidays"),
          },
        ]}
      />
      <AnswerTable
        caption={t("weightsCaption")}
        heads={[t("cause"), t("points")]}
        answers={WEIGHTS.map((cause) => ({
          question: t(`weights.${cause}`),
          answer: priorityWeights[cause],
        }))}
      />
    </div>
  );
}
