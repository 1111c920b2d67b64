import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { TextLink } from "@/components/ui/link-button";
import { Mark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { importPath } from "@/lib/imports/paths";
import type { ImportView } from "@/lib/imports/view";
import { formatInstant, formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";

type ImportListProps = { imports: readonly ImportView[]; locale: Locale; timeZone: string };

/** Whether a file is on record or only looked at. */
function ImportMark({ isImported }: { isImported: boolean }) {
  const t = useTranslations("imports.list");
  return isImported ? (
    <Mark shape="tickSquare" tone="proven">
      {t("imported")}
    </Mark>
  ) : (
    <Mark shape="dashedRing" tone="quiet">
      {t("previewed")}
    </Mark>
  );
}

/** The files sent so far, newest first. */
export function ImportList({ imports, locale, timeZone }: ImportListProps) {
  const t = useTranslations("imports.list");
  const whenAndWho = ({ sentAt, byName }: ImportView) => {
    const when = formatInstant(sentAt, locale, timeZone);
    return byName ? t("sentBy", { when, who: byName }) : when;
  };
  if (imports.length === 0)
    return (
      <EmptyState kind="nothingYet" title={t("empty")}>
        {t("emptyNote")}
      </EmptyState>
    );
  return (
    <Card title={t("title")}>
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("file")}</Th>
          <Th>{t("sent")}</Th>
          <Th isNumeric>{t("lines")}</Th>
          <Th>{t("state")}</Th>
        </TableHead>
        <TableBody>
          {imports.map((one) => (
            <Row key={one.id}>
              <RowHead>
                <TextLink href={importPath({ importId: one.id })}>
                  <span className="break-all">{one.fileName}</span>
                </TextLink>
              </RowHead>
              <Td label={t("sent")}>{whenAndWho(one)}</Td>
              <Td label={t("lines")} isNumeric>
                {formatNumber(one.lineCount, locale)}
              </Td>
              <Td label={t("state")}>
                <ImportMark isImported={one.isImported} />
              </Td>
            </Row>
          ))}
        </TableBody>
      </Table>
    </Card>
  );
}
