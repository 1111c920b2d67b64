import { useTranslations } from "next-intl";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { LifeCurvesView } from "@/lib/reports/life-curves/view";

/** Under the curves: at risk, failed and ended without a failure, from one age to the next. */
export function RiskTable({ view, locale }: { view: LifeCurvesView; locale: Locale }) {
  const t = useTranslations("lifeCurves.curve");
  const all = [...view.series, ...(view.rest ? [view.rest] : [])];
  const longest = all.reduce(
    (most, { risk }) => (risk.length > most.length ? risk : most),
    all[0]?.risk ?? [],
  );
  const count = (value: number) => formatNumber(value, locale);
  return (
    <div>
      {/* Outside of the box that scrolls, where a phone would cut it off; the table's own caption is read out. */}
      <p aria-hidden="true" className="pb-2 text-small text-ink-2">
        {t("tableCaption")}
      </p>
      <Table caption={t("tableCaption")} onPhone="scroll">
        <TableHead>
          <Th>{t("columns.curve")}</Th>
          {longest.map(({ months }) => (
            <Th key={months} isNumeric>
              {count(months)}
            </Th>
          ))}
        </TableHead>
        <TableBody>
          {all.map(({ key, risk }) => (
            <Row key={key ?? ""}>
              <RowHead>
                <span className={key === null ? undefined : "font-mono font-semibold"}>
                  {key ?? t("others")}
                </span>
              </RowHead>
              {longest.map(({ months }, place) => {
                const cell = risk[place];
                return (
                  <Td key={months} isNumeric>
                    {cell
                      ? t("cell", {
                          atRisk: count(cell.atRisk),
                          failed: count(cell.failed),
                          ended: count(cell.ended),
                        })
                      : "–"}
                  </Td>
                );
              })}
            </Row>
          ))}
        </TableBody>
      </Table>
    </div>
  );
}
