import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { notePath } from "@/lib/day-book/paths";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Money } from "@/lib/kernel/money";

export type NoteRow = {
  readonly number: string;
  readonly sellerId: string;
  readonly kind: "credit" | "counter";
  readonly issuedOn: CalendarDay;
  readonly side: "issued" | "received";
  readonly partner: string;
  readonly claimNumber: string;
  readonly total: Money;
  readonly allocated: Money;
  readonly open: Money;
  readonly isCountered: boolean;
};

/** Whom the notes of a list are with: workshops, distributors, or some of each. */
const partnersOf = (notes: readonly NoteRow[]): "workshop" | "distributor" | "partner" => {
  const isIssued = notes.some(({ side }) => side === "issued");
  if (isIssued && notes.some(({ side }) => side === "received")) return "partner";
  return isIssued ? "workshop" : "distributor";
};

/** Notes, newest first: what they come to, what of it is allocated, what is open. */
export function NoteTable({ notes, locale }: { notes: readonly NoteRow[]; locale: Locale }) {
  const t = useTranslations("credits.issued");
  const partners = partnersOf(notes);
  return (
    <Table caption={t("caption")} isHeadSticky>
      <TableHead>
        <Th>{t("number")}</Th>
        <Th>{t("issuedOn")}</Th>
        <Th>{t(partners)}</Th>
        <Th>{t("claim")}</Th>
        <Th isNumeric>{t("total")}</Th>
        <Th isNumeric>{t("allocated")}</Th>
        <Th isNumeric>{t("open")}</Th>
      </TableHead>
      <TableBody>
        {notes.map((note) => (
          <Row key={`${note.sellerId} ${note.number}`}>
            <RowHead>
              <TextLink href={notePath(note)}>
                <span className="font-mono">{note.number}</span>
              </TextLink>
              <NoteKind note={note} />
            </RowHead>
            <Td label={t("issuedOn")}>{formatDay(note.issuedOn, locale)}</Td>
            <Td label={t(partners)}>
              {note.partner}
              {partners === "partner" && note.side === "received" ? (
                <span className="block text-small text-ink-2">{t("received")}</span>
              ) : null}
            </Td>
            <Td label={t("claim")}>
              <TextLink href={`/claims/${note.claimNumber}`}>
                <span className="font-mono">{note.claimNumber}</span>
              </TextLink>
            </Td>
            <Td label={t("total")} isNumeric>
              {formatMoney(note.total, locale)}
            </Td>
            <Td label={t("allocated")} isNumeric>
              {formatMoney(note.allocated, locale)}
            </Td>
            <Td label={t("open")} isNumeric>
              {formatMoney(note.open, locale)}
            </Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}

function NoteKind({ note }: { note: NoteRow }) {
  const t = useTranslations("credits.issued");
  if (note.kind === "counter") return <span className="block text-small text-ink-2">{t("counter")}</span>;
  return note.isCountered ? <span className="block text-small text-refused">{t("countered")}</span> : null;
}
