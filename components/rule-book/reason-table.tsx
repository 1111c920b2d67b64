import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { VERDICT_OUTCOMES } from "@/lib/claims/lifecycle";
import { REASONS } from "@/lib/claims/verdict";

/** The reasons a verdict may give, by what it decides; they are the same for every distributor. */
export function ReasonTable() {
  const t = useTranslations("ruleBook.reasons");
  const reasons = useTranslations("verdicts.reasons");
  const outcomes = useTranslations("ui.mark.claim");
  const lines = VERDICT_OUTCOMES.toReversed().flatMap((outcome) =>
    REASONS[outcome].map((code) => ({ code, outcome })),
  );
  return (
    <Card isInCharge title={t("title")}>
      <div className="grid gap-4">
        <p className="max-w-measure text-ink-2">{t("note")}</p>
        <Table caption={t("title")}>
          <TableHead>
            <Th>{t("reason")}</Th>
            <Th>{t("outcome")}</Th>
          </TableHead>
          <TableBody>
            {lines.map(({ code, outcome }) => (
              <Row key={code}>
                <RowHead>{reasons(`${code}.name`)}</RowHead>
                <Td label={t("outcome")}>{outcomes(outcome)}</Td>
              </Row>
            ))}
          </TableBody>
        </Table>
      </div>
    </Card>
  );
}
