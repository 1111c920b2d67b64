import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { buttonStyle } from "@/components/ui/button-style";
import { COLUMN_KEYS, COLUMNS } from "@/lib/imports/columns";
import { headingIn } from "@/lib/imports/heading";
import type { Locale } from "@/lib/kernel/locale";

const OTHERS_SHOWN = 3;

/** What a file may hold, column by column, with a small one to start from. */
export function ColumnTable({ locale }: { locale: Locale }) {
  const t = useTranslations("imports.columns");
  return (
    <Card
      title={t("title")}
      note={t("note")}
      actions={
        <a href="/api/v1/invoice-imports/example" download className={buttonStyle({ small: true })}>
          {t("example")}
        </a>
      }
    >
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("heading")}</Th>
          <Th>{t("meaning")}</Th>
          <Th>{t("need")}</Th>
          <Th>{t("also")}</Th>
        </TableHead>
        <TableBody>
          {COLUMN_KEYS.map((key) => (
            <Row key={key}>
              <RowHead>
                <span translate="no" className="font-semibold whitespace-nowrap">
                  {headingIn(key, locale)}
                </span>
              </RowHead>
              <Td label={t("meaning")}>{t(`of.${key}`)}</Td>
              <Td label={t("need")}>{t(COLUMNS[key].isRequired ? "required" : "optional")}</Td>
              <Td label={t("also")}>
                <span translate="no" className="text-small text-ink-2">
                  {[COLUMNS[key].heading[locale === "de" ? "en" : "de"], ...COLUMNS[key].synonyms]
                    .slice(0, OTHERS_SHOWN)
                    .join(", ")}
                </span>
              </Td>
            </Row>
          ))}
        </TableBody>
      </Table>
    </Card>
  );
}
