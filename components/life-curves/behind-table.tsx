import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Serial } from "@/components/ui/serial";
import { SheetTable } from "@/components/ui/sheet-table";
import { ClaimMark } from "@/components/ui/status-mark";
import { Row, RowHead, Td } from "@/components/ui/table";
import { formatDay, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { BehindItem } from "@/lib/reports/life-curves/behind-view";

/** Claims by the age at which their unit failed. */
export function BehindTable({ claims, locale }: { claims: readonly BehindItem[]; locale: Locale }) {
  const t = useTranslations("lifeCurves.claims");
  const heads = (["number", "state", "batch", "serial", "workshop", "failed", "age", "counted"] as const).map(
    (column) => t(`columns.${column}`),
  );
  return (
    <SheetTable caption={t("caption")} heads={heads}>
      {claims.map((claim) => (
        <Row key={`${claim.number} ${claim.serial ?? ""}`}>
          <RowHead>
            <TextLink href={`/claims/${claim.number}`}>
              <span className="font-mono">{claim.number}</span>
            </TextLink>
          </RowHead>
          <Td label={t("columns.state")}>
            <ClaimMark state={claim.mark} />
          </Td>
          <Td label={t("columns.batch")}>
            <span className="font-mono">{claim.batchCode ?? "?"}</span>
          </Td>
          <Td label={t("columns.serial")}>
            {claim.serial ? <Serial value={claim.serial} /> : t("noSerial")}
          </Td>
          <Td label={t("columns.workshop")}>{claim.workshop}</Td>
          <Td label={t("columns.failed")}>{formatDay(claim.failedOn, locale)}</Td>
          <Td label={t("columns.age")} isNumeric>
            {formatNumber(claim.ageDays, locale)}
          </Td>
          <Td label={t("columns.counted")}>{t(`counted.${claim.counted}`)}</Td>
        </Row>
      ))}
    </SheetTable>
  );
}
