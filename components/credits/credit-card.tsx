import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import type { SheetProps } from "@/components/sheet/shared";
import type { Credit } from "@/lib/credits/credit";
import { linesToExplain } from "@/lib/credits/explained";
import { notePath } from "@/lib/day-book/paths";
import { formatDecimal, formatMoney } from "@/lib/kernel/format";
import { money } from "@/lib/kernel/money";
import { NotGivenList, Why } from "./why";

type CreditCardProps = SheetProps & { credit: Credit; verdictId: string };

/** What a verdict gives: line by line, tax by group, the total; before a note is issued it says "promised". */
export function CreditCard({ credit, verdictId, sheet, locale }: CreditCardProps) {
  const t = useTranslations("credits.card");
  const kinds = useTranslations("creditSteps.kinds");
  const amount = (minor: bigint) => formatMoney(money(minor, credit.currency), locale);
  const onNote = credit.lines.filter((line) => line.settledBy === "creditNote" && line.netMinor > 0n);
  return (
    <Card
      id="credit"
      title={t("title")}
      note={<NoteState sheet={sheet} verdictId={verdictId} credit={credit} />}
    >
      <div className="grid gap-4">
        {onNote.length > 0 ? (
          <div>
            {onNote.map((line) => (
              <MoneyLine
                key={`${line.lineNumber} ${line.kind}`}
                label={t("line", { line: line.lineNumber, kind: kinds(line.kind) })}
                amount={amount(line.netMinor)}
                note={
                  line.askedMinor === line.netMinor
                    ? undefined
                    : t("asked", { amount: amount(line.askedMinor) })
                }
              />
            ))}
            <Totals credit={credit} amount={amount} locale={locale} />
          </div>
        ) : (
          <p>{t("none")}</p>
        )}
        <Elsewhere credit={credit} sheet={sheet} amount={amount} />
        <NotGivenList notGiven={credit.notGiven} currency={credit.currency} locale={locale} />
        <Why explained={linesToExplain(credit)} steps={credit.steps} locale={locale} />
      </div>
    </Card>
  );
}

type Amounts = { credit: Credit; amount: (minor: bigint) => string };

function Totals({ credit, amount, locale }: Amounts & Pick<SheetProps, "locale">) {
  const t = useTranslations("credits.card");
  const words = useTranslations("credits.document");
  return (
    <>
      {credit.allowances.map((one) => (
        <MoneyLine
          key={`${one.taxCategory} ${one.taxRate}`}
          label={words("allowance", { reason: one.reason })}
          note={words("taxOf", { category: one.taxCategory, rate: formatDecimal(one.taxRate, locale) })}
          amount={amount(-one.amountMinor)}
        />
      ))}
      {credit.taxGroups.map((group) => (
        <MoneyLine
          key={`${group.taxCategory} ${group.taxRate}`}
          label={`${t("tax")}: ${words("taxOf", { category: group.taxCategory, rate: formatDecimal(group.taxRate, locale) })}`}
          amount={amount(group.taxMinor)}
          note={group.exemptionReason ?? undefined}
        />
      ))}
      <MoneyTotal
        label={t("total")}
        amount={amount(credit.totalMinor)}
        note={`${t("net")}: ${amount(credit.netMinor)}`}
      />
    </>
  );
}

function NoteState({ sheet, verdictId, credit }: Pick<CreditCardProps, "sheet" | "verdictId" | "credit">) {
  const t = useTranslations("credits.card");
  const standing = sheet.notes.find(({ isStanding }) => isStanding);
  if (!standing) return credit.totalMinor > 0n ? t("promised") : null;
  return (
    <TextLink href={notePath(standing)}>
      {t(standing.verdictId === verdictId ? "issued" : "reversed", { number: standing.number })}
    </TextLink>
  );
}

function Elsewhere({ credit, sheet, amount }: Amounts & Pick<SheetProps, "sheet">) {
  const t = useTranslations("credits");
  if (credit.elsewhere.length === 0) return null;
  return (
    <ul className="grid gap-1">
      {credit.elsewhere.map(({ settledBy, netMinor }) =>
        settledBy === "creditNote" ? null : (
          <li key={settledBy}>
            {sheet.side === "workshop"
              ? t(`invoiceUs.${settledBy}`, { amount: amount(netMinor), distributor: sheet.sellerName })
              : t(`elsewhere.${settledBy}`, { amount: amount(netMinor) })}
          </li>
        ),
      )}
    </ul>
  );
}
