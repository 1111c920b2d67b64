import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { RuleView } from "@/lib/rule-book/rule-view";
import { RuleBodyByKind } from "./rule-body";

/** One rule as it stands: number, title, since when, and what it says. */
export function RuleCard({
  rule,
  locale,
  isInCharge,
}: {
  rule: RuleView;
  locale: Locale;
  isInCharge: boolean;
}) {
  const t = useTranslations("ruleBook");
  const families = useTranslations("families");
  return (
    <Card
      id={`rule-${rule.id}`}
      isInCharge={isInCharge}
      title={<span className="wrap-anywhere hyphens-auto">{rule.title}</span>}
      note={rule.ruleNumber}
    >
      <div className="grid gap-6">
        <Facts columns={2}>
          <Fact term={t("inForce")}>{formatDay(rule.validFrom, locale)}</Fact>
          {rule.family ? <Fact term={t("family")}>{families(`${rule.family}.name`)}</Fact> : null}
          {rule.partNumber ? (
            <Fact term={t("part")}>
              <span translate="no" className="font-mono">
                {rule.partNumber}
              </span>
            </Fact>
          ) : null}
          {rule.replacedOn ? <Fact term={t("replaced")}>{formatDay(rule.replacedOn, locale)}</Fact> : null}
          <Fact term={t("version")}>
            <span translate="no" className="font-mono text-small break-all">
              {rule.id}
            </span>
          </Fact>
        </Facts>
        <RuleBodyByKind rule={rule} locale={locale} />
      </div>
    </Card>
  );
}
