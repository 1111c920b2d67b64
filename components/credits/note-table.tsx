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
  readonly partner: string;
  readonly claimNumber: string;
  readonly total: Money;
  readonly allocated: Money;
  readonly open: Money;
  readonly isCountered: boolean;
};

const COLUMNS = ["number", "issuedOn", "partner", "claim", "total", "allocated", "open"] as const;
const NUMERIC: readonly string[] = ["total", "allocated", "open"];

/** Notes, newest first: what they come to, what of it is allocated, what is open. */
export function NoteTable({ notes, locale }: { notes: readonly NoteRow[]; locale: Locale }) {
  const t = useTranslations("credits.issued");
  return (
    <Table caption={t("caption")} isHeadSticky>
      <TableHead>
        {COLUMNS.map((column) => (
          <Th key={column} isNumeric={NUMERIC.includes(column)}>
            {t(column)}
          </Th>
        ))}
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
            <Td label={t("partner")}>{note.partner}</Td>
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
