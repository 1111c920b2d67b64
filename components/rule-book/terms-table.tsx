import { useTranslations } from "next-intl";
import { formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";
import type { Terms } from "@/lib/rule-book/terms-shape";
import { AnswerTable, type Answer } from "./answer-table";

type Words = ReturnType<typeof useTranslations<"ruleBook.terms">>;

/** Warranty terms: how long, how much, until when. */
export function TermsTable({ terms, locale }: { terms: Terms; locale: Locale }) {
  const t = useTranslations("ruleBook.terms");
  const amount = (minor: number) => formatMoney(money(minor, terms.currency), locale);
  return (
    <AnswerTable
      caption={t("caption")}
      heads={[t("question"), t("answer")]}
      answers={[...coverAnswers(terms, t), ...filingAnswers(terms, t), ...moneyAnswers(terms, t, amount)]}
    />
  );
}

const coverAnswers = (terms: Terms, t: Words): Answer[] => [
  { question: t("cover"), answer: t("months", { count: terms.coverMonths }) },
  { question: t("shelf"), answer: t("months", { count: terms.shelfLimitMonths }) },
  { question: t("withoutFitting"), answer: t(`withoutFittingOf.${terms.startsWithoutFitting}`) },
  { question: t("transfer"), answer: t(`transferOf.${terms.transfer}`) },
  { question: t("fraction"), answer: <Fractions terms={terms} /> },
  { question: t("replacement"), answer: t("days", { count: terms.replacementMinimumDays }) },
];

const lateOf = ({ lateFiling }: Terms, t: Words): string =>
  lateFiling.policy === "reduce"
    ? t("lateOf.reduce", { fraction: lateFiling.fraction })
    : t(`lateOf.${lateFiling.policy}`);

const graceOf = ({ grace }: Terms, t: Words): string =>
  grace.kind === "days" ? t("days", { count: grace.days }) : t("graceFraction", { fraction: grace.fraction });

const filingAnswers = (terms: Terms, t: Words): Answer[] => [
  { question: t("filing"), answer: t("filingDays", { count: terms.filingLimitDays }) },
  { question: t("late"), answer: lateOf(terms, t) },
  { question: t("grace"), answer: graceOf(terms, t) },
  { question: t("contest"), answer: t("days", { count: terms.contestDays }) },
  { question: t("lapse"), answer: t("days", { count: terms.queryLapseDays }) },
];

const moneyAnswers = ({ labour, caps }: Terms, t: Words, amount: (minor: number) => string): Answer[] => [
  {
    question: t("labour"),
    answer: labour
      ? t("labourPaid", {
          months: labour.months,
          minutes: labour.standardMinutes,
          rate: amount(labour.hourlyRateMinor),
        })
      : t("labourNot"),
  },
  { question: t("diagnosis"), answer: t("upTo", { amount: amount(caps.diagnosisMinor) }) },
  { question: t("consumables"), answer: t("upTo", { amount: amount(caps.consumablesMinor) }) },
  { question: t("carriage"), answer: t("upTo", { amount: amount(caps.carriageMinor) }) },
  {
    question: t("claimCap"),
    answer: caps.claimMinor === null ? t("noCap") : t("upTo", { amount: amount(caps.claimMinor) }),
  },
];

function Fractions({ terms: { coverFraction } }: { terms: Terms }) {
  const t = useTranslations("ruleBook.terms");
  if (coverFraction.kind !== "step") return t(`fractionOf.${coverFraction.kind}`);
  return (
    <ul>
      {coverFraction.steps.map(({ fromMonth, fraction }) => (
        <li key={fromMonth}>
          {fraction === "1"
            ? t("fractionWhole", { month: fromMonth })
            : t("fractionStep", { month: fromMonth, fraction })}
        </li>
      ))}
    </ul>
  );
}
