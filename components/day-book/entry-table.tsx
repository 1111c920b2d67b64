import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { RunningEntry } from "@/lib/day-book/book/running";
import { notePath } from "@/lib/day-book/paths";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";

const COLUMNS = [
  "sequence",
  "day",
  "kind",
  "workshop",
  "noteNumber",
  "postings",
  "movement",
  "balance",
] as const;
const NUMERIC: readonly string[] = ["movement", "balance"];

type EntryTableProps = { entries: readonly RunningEntry[]; sellerId: string; locale: Locale };

/** Entries of the book, newest first, each with what its workshop is owed after it. */
export function EntryTable({ entries, sellerId, locale }: EntryTableProps) {
  const t = useTranslations("dayBook");
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
        {entries.map((entry) => (
          <EntryRow key={entry.sequence} entry={entry} sellerId={sellerId} locale={locale} />
        ))}
      </TableBody>
    </Table>
  );
}

function EntryRow({ entry, sellerId, locale }: { entry: RunningEntry; sellerId: string; locale: Locale }) {
  const t = useTranslations("dayBook");
  const owed = entry.owed;
  return (
    <Row id={`entry-${entry.sequence}`}>
      <RowHead label={t("sequence")}>
        <span className="font-mono tabular-nums">{entry.sequence}</span>
      </RowHead>
      <Td label={t("day")}>{formatDay(entry.enteredOn, locale)}</Td>
      <Td label={t("kind")}>
        {t(`kinds.${entry.kind}`)}
        {entry.reference ? <span className="block text-small text-ink-2">{entry.reference}</span> : null}
        {entry.counters ? <Counter words={t("counters", { sequence: entry.counters })} /> : null}
        {entry.counteredBy ? <Counter words={t("counteredBy", { sequence: entry.counteredBy })} /> : null}
        {entry.by ? <span className="block text-small text-ink-2">{t("by", { name: entry.by })}</span> : null}
      </Td>
      <Td label={t("workshop")}>{entry.workshopName}</Td>
      <Td label={t("noteNumber")}>
        <TextLink href={notePath({ number: entry.noteNumber, sellerId })}>
          <span className="font-mono">{entry.noteNumber}</span>
        </TextLink>
      </Td>
      <Td label={t("postings")}>
        <Postings entry={entry} locale={locale} />
      </Td>
      <Td label={t("movement")} isNumeric>
        {owed ? formatMoney(money(owed.minor, owed.currency), locale) : null}
      </Td>
      <Td label={t("balance")} isNumeric>
        {owed ? formatMoney(money(entry.balanceMinor, owed.currency), locale) : null}
      </Td>
    </Row>
  );
}

const Counter = ({ words }: { words: string }) => (
  <span className="block text-small text-refused">{words}</span>
);

function Postings({ entry, locale }: { entry: RunningEntry; locale: Locale }) {
  const t = useTranslations("dayBook");
  return (
    // Where the row is a list, an account keeps a line of its own: beside the sum its long words would break anywhere.
    <ul className="grid max-w-80 grid-cols-[1fr_auto_auto] gap-x-3 gap-y-0.5 text-small @max-lg/ledger:grid-cols-[1fr_auto] @max-lg/ledger:gap-y-2">
      {entry.postings.map(({ account, amountMinor, currency }) => {
        const side = amountMinor > 0n ? "debit" : "credit";
        const amount = money(amountMinor > 0n ? amountMinor : -amountMinor, currency);
        return (
          <li key={`${account} ${side}`} className="col-span-full grid grid-cols-subgrid items-baseline">
            <span className="@max-lg/ledger:col-span-full">{t(`accounts.${account}`)}</span>{" "}
            <span className="text-ink-2">{t(side)}</span>{" "}
            <span className="text-right tabular-nums">{formatMoney(amount, locale)}</span>
          </li>
        );
      })}
    </ul>
  );
}
