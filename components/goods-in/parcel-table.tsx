import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { parcelPath } from "@/lib/returns/paths";
import type { ParcelItem } from "@/lib/returns/view";

type ParcelTableProps = { parcels: readonly ParcelItem[]; count: number; locale: Locale; timeZone: string };

/** Parcels nobody announced, the oldest first: what stands on each, and the way to its return. */
export function ParcelTable({ parcels, count, locale, timeZone }: ParcelTableProps) {
  const t = useTranslations("goodsIn");
  return (
    <Card
      id="unmatched"
      title={t("unmatched.title")}
      note={parcels.length < count ? t("shown", { shown: parcels.length, count }) : String(count)}
    >
      {parcels.length === 0 ? (
        <EmptyState kind="allDone" title={t("unmatched.none")} />
      ) : (
        <Table caption={t("unmatched.title")}>
          <TableHead>
            <Th>{t("columns.arrived")}</Th>
            <Th>{t("columns.written")}</Th>
            <Th>{t("columns.condition")}</Th>
            <Th>{t("columns.way")}</Th>
          </TableHead>
          <TableBody>
            {parcels.map((parcel) => (
              <Row key={parcel.id}>
                <RowHead>{formatInstant(new Date(parcel.arrivedAt), locale, timeZone)}</RowHead>
                <Td label={t("columns.written")}>
                  <WrittenOn parcel={parcel} />
                </Td>
                <Td label={t("columns.condition")}>{t(`conditions.${parcel.condition}`)}</Td>
                <Td label={t("columns.way")}>
                  <TextLink href={parcelPath(parcel)}>{t("unmatched.match")}</TextLink>
                </Td>
              </Row>
            ))}
          </TableBody>
        </Table>
      )}
    </Card>
  );
}

/** What stands on a parcel, in the order somebody would read it out. */
export function WrittenOn({ parcel }: { parcel: ParcelItem }) {
  const t = useTranslations("goodsIn.unmatched");
  const { sender, part, serial, numberWritten } = parcel;
  return (
    <>
      {t("from", { sender: sender || t("nothingWritten") })}
      {part ? <span className="block">{part}</span> : null}
      {[serial, numberWritten]
        .filter((text) => text !== "")
        .map((text) => (
          <span key={text} translate="no" className="block font-mono text-small">
            {text}
          </span>
        ))}
    </>
  );
}
