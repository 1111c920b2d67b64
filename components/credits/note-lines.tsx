import { useTranslations } from "next-intl";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { NoteDocument } from "@/lib/credits/note-document";
import { formatDecimal, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";

type Props = { note: NoteDocument; locale: Locale };

/** The lines of a note, each with the tax of the original invoice line. */
export function NoteLines({ note, locale }: Props) {
  const t = useTranslations("credits.document");
  const kinds = useTranslations("creditSteps.kinds");
  return (
    <Table caption={t(note.kind === "credit" ? "lines" : "linesBack")}>
      <TableHead>
        <Th>{t("position")}</Th>
        <Th>{t("what")}</Th>
        <Th>{t("taxHead")}</Th>
        <Th isNumeric>{t("net")}</Th>
      </TableHead>
      <TableBody>
        {note.lines.map((line) => (
          <Row key={line.position}>
            <RowHead label={t("position")}>{line.position}</RowHead>
            <Td label={t("what")}>
              {t("whatOf", {
                kind: kinds(line.kind),
                quantity: line.quantity,
                name: line.partName,
                number: line.partNumber,
              })}
              {line.serial ? (
                <span className="block text-small text-ink-2">{t("serial", { serial: line.serial })}</span>
              ) : null}
              {line.invoice ? (
                <span className="block text-small text-ink-2">
                  {t("invoiceLine", { number: line.invoice.invoiceNumber, line: line.invoice.lineNumber })}
                </span>
              ) : null}
            </Td>
            <Td label={t("taxHead")}>
              {t("taxOf", { category: line.taxCategory, rate: formatDecimal(line.taxRate, locale) })}
            </Td>
            <Td label={t("net")} isNumeric>
              {formatMoney(money(line.netMinor, note.currency), locale)}
            </Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}

/** Tax once for each category and rate, with the reason where there is none. */
export function TaxGroups({ note, locale }: Props) {
  const t = useTranslations("credits.document");
  const amount = (minor: bigint) => formatMoney(money(minor, note.currency), locale);
  return (
    <Table caption={t("taxGroups")}>
      <TableHead>
        <Th>{t("category")}</Th>
        <Th isNumeric>{t("rate")}</Th>
        <Th isNumeric>{t("base")}</Th>
        <Th isNumeric>{t("tax")}</Th>
        <Th>{t("exemption")}</Th>
      </TableHead>
      <TableBody>
        {note.taxGroups.map((group) => (
          <Row key={`${group.taxCategory} ${group.taxRate}`}>
            <RowHead>{t(`categories.${group.taxCategory}`)}</RowHead>
            <Td label={t("rate")} isNumeric>
              {t("percent", { rate: formatDecimal(group.taxRate, locale) })}
            </Td>
            <Td label={t("base")} isNumeric>
              {amount(group.baseMinor)}
            </Td>
            <Td label={t("tax")} isNumeric>
              {amount(group.taxMinor)}
            </Td>
            <Td label={t("exemption")}>{group.exemptionReason}</Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
