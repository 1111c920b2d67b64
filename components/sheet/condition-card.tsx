import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { formatNumber } from "@/lib/kernel/format";
import type { SheetProps } from "./shared";

/** What was ruled out, how the part was found, who worked on the vehicle before, and the swap. */
export function ConditionCard({ sheet, locale }: SheetProps) {
  const t = useTranslations("sheet.condition");
  const words = useTranslations("families");
  const { facts, family } = sheet;
  if (!facts) return null;
  const found = facts.condition.filter((item) => item.found);
  const looked = facts.condition.length;
  const list = (items: readonly string[], of: "ruledOut" | "conditionAsFound") =>
    items.length === 0 ? null : (
      <ul className="list-disc pl-5">
        {items.map((item) => (
          <li key={item}>{words.has(`${family}.${of}.${item}`) ? words(`${family}.${of}.${item}`) : item}</li>
        ))}
      </ul>
    );
  return (
    <Card id="seen" title={t("title")}>
      <Facts>
        <Fact term={t("note")}>
          {facts.note ? <span className="whitespace-pre-wrap">{facts.note}</span> : t("notGiven")}
        </Fact>
        <Fact term={t("ruledOut")}>
          {list(
            facts.ruledOut.map(({ itemId }) => itemId),
            "ruledOut",
          ) ?? t("notGiven")}
        </Fact>
        <Fact term={t("found")}>
          {list(
            found.map(({ itemId }) => itemId),
            "conditionAsFound",
          ) ?? t("nothingFound", { looked })}
          {facts.conditionNote ? <p className="whitespace-pre-wrap">{facts.conditionNote}</p> : null}
        </Fact>
        <Fact term={t("earlierWork")}>{facts.earlierWork || t("notGiven")}</Fact>
        <Fact term={t("swap")}>
          {facts.swap
            ? t("swapRun", {
                minutes:
                  facts.swap.minutes === null ? t("notGiven") : formatNumber(facts.swap.minutes, locale),
                heat: facts.swap.abnormalHeat === null ? "open" : String(facts.swap.abnormalHeat),
                drive: facts.swap.testDrive === null ? "open" : String(facts.swap.testDrive),
              })
            : t("notGiven")}
        </Fact>
        {facts.incident ? <Fact term={t("incident")}>{facts.incident.note || t("notGiven")}</Fact> : null}
      </Facts>
    </Card>
  );
}
