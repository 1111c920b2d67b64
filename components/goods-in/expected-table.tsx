import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { TextLink } from "@/components/ui/link-button";
import { Serial } from "@/components/ui/serial";
import { LateMark, Mark, PartMark } from "@/components/ui/status-mark";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { benchPath, returnPath } from "@/lib/returns/paths";
import type { ExpectedItem } from "@/lib/returns/view";

type ExpectedTableProps = {
  list: "due" | "toExamine";
  items: readonly ExpectedItem[];
  count: number;
  locale: Locale;
  isInCharge?: boolean;
};

/** Parts on their way, or waiting for the bench: each line leads to what is to be done with it. */
export function ExpectedTable({ list, items, count, locale, isInCharge = false }: ExpectedTableProps) {
  const t = useTranslations("goodsIn");
  const last = list === "due" ? "due" : "place";
  return (
    <Card
      id={list}
      isInCharge={isInCharge}
      title={t(`${list}.title`)}
      note={items.length < count ? t("shown", { shown: items.length, count }) : String(count)}
    >
      {items.length === 0 ? (
        <EmptyState kind="allDone" title={t(`${list}.none`)} />
      ) : (
        <Table caption={t(`${list}.title`)}>
          <TableHead>
            <Th>{t("columns.number")}</Th>
            <Th>{t("columns.part")}</Th>
            <Th>{t("columns.workshop")}</Th>
            <Th>{t("columns.state")}</Th>
            <Th>{t(`columns.${last}`)}</Th>
          </TableHead>
          <TableBody>
            {items.map((item) => (
              <ExpectedRow
                key={`${item.number}-${item.lineNumber}`}
                list={list}
                item={item}
                locale={locale}
              />
            ))}
          </TableBody>
        </Table>
      )}
    </Card>
  );
}

type ExpectedRowProps = { list: "due" | "toExamine"; item: ExpectedItem; locale: Locale };

function ExpectedRow({ list, item, locale }: ExpectedRowProps) {
  const t = useTranslations("goodsIn");
  return (
    <Row isAlarming={item.isQuarantined}>
      <RowHead>
        <TextLink href={list === "due" ? returnPath(item) : benchPath(item)}>
          <span translate="no" className="font-mono whitespace-nowrap">
            {item.printed}
          </span>
        </TextLink>
        {item.lineCount > 1 ? (
          <span className="block text-small text-ink-2">
            {t("line", { line: item.lineNumber, count: item.lineCount })}
          </span>
        ) : null}
      </RowHead>
      <Td label={t("columns.part")}>
        {item.partName}
        {item.serial ? <Serial value={item.serial} className="block text-small" /> : null}
      </Td>
      <Td label={t("columns.workshop")}>{item.workshopName}</Td>
      <Td label={t("columns.state")}>
        <PartMark state={item.state === "notSentInTime" ? "notSent" : item.state} />
        {item.isQuarantined ? (
          <Mark shape="barOctagon" tone="refused">
            {t("quarantine")}
          </Mark>
        ) : null}
      </Td>
      {list === "due" ? (
        <Td label={t("columns.due")}>
          <span className="block">{formatDay(item.dueOn, locale)}</span>
          {item.daysOver > 0 ? <LateMark daysOver={item.daysOver} /> : null}
        </Td>
      ) : (
        <Td label={t("columns.place")}>
          <span className="font-mono">{item.place ?? t("noPlace")}</span>
        </Td>
      )}
    </Row>
  );
}
