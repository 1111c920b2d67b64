import { useTranslations } from "next-intl";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { RunLog } from "@/lib/evidence/run-log";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { withoutUnit } from "./run-log-labels";

const MOST_ROWS = 20;

/** Some twenty rows of the log, the first and the last among them, evenly spread over what is drawn. */
export function RunLogTable({ log, rowCount, locale }: { log: RunLog; rowCount: number; locale: Locale }) {
  const t = useTranslations("evidence.runLog");
  const last = log.timeS.length - 1;
  const steps = Math.min(MOST_ROWS - 1, last);
  const rows = Array.from({ length: steps + 1 }, (_, step) => Math.round((last * step) / Math.max(1, steps)));
  const unitOf = (unit: string) => (unit === "rpm" ? t("axis.speed") : unit);
  const count = (value: number) => formatNumber(value, locale);
  return (
    <Table
      caption={t("table.caption", { shown: count(rows.length), rows: count(rowCount) })}
      isCaptionShown
      onPhone="scroll"
    >
      <TableHead>
        <Th>{t("table.time")}</Th>
        {log.series.map(({ heading, unit }, place) => (
          <Th key={place} isNumeric>
            {t("table.column", { heading: withoutUnit(heading), unit: unitOf(unit) })}
          </Th>
        ))}
      </TableHead>
      <TableBody>
        {rows.map((index) => (
          <Row key={index}>
            <RowHead>{formatNumber((log.timeS[index] ?? 0) / 60, locale, { least: 2, most: 2 })}</RowHead>
            {log.series.map(({ values, unit }, place) => (
              <Td key={place} isNumeric>
                {<Value value={values[index] ?? null} unit={unit} locale={locale} />}
              </Td>
            ))}
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}

const DECIMALS = {
  "°C": { least: 1, most: 1 },
  A: { least: 3, most: 3 },
  V: { least: 2, most: 2 },
  rpm: { most: 0 },
} as const;

function Value({
  value,
  unit,
  locale,
}: {
  value: number | null;
  unit: keyof typeof DECIMALS;
  locale: Locale;
}) {
  const t = useTranslations("evidence.runLog.table");
  return value === null ? t("gap") : formatNumber(value, locale, DECIMALS[unit]);
}
