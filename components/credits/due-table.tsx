import { useTranslations } from "next-intl";
import { Checkbox } from "@/components/ui/check";
import { TextLink } from "@/components/ui/link-button";
import { Row, RowHead, Table, TableBody, TableFoot, TableHead, Td, Th } from "@/components/ui/table";
import type { Credit } from "@/lib/credits/credit";
import { notePath } from "@/lib/day-book/paths";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money, type Money } from "@/lib/kernel/money";

export type DueItem = {
  readonly number: string;
  readonly key: string;
  readonly workshopName: string;
  readonly parts: string;
  readonly decidedOn: CalendarDay;
  readonly contestUntil: CalendarDay | null;
  readonly credit: Credit;
  readonly isCountered: boolean;
  readonly standing: { readonly number: string; readonly sellerId: string } | null;
};

const COLUMNS = ["claim", "workshop", "part", "decidedOn", "net", "total"] as const;
type DueTableProps = { due: readonly DueItem[]; sums: readonly Money[]; locale: Locale };

/** Upheld claims without a note, oldest first, each with its box; what has to be countered first has none. */
export function DueTable({ due, sums, locale }: DueTableProps) {
  const t = useTranslations("credits.due");
  return (
    <Table caption={t("caption")} isHeadSticky>
      <TableHead>
        {COLUMNS.map((column) => (
          <Th key={column} isNumeric={column === "net" || column === "total"}>
            {t(column)}
          </Th>
        ))}
      </TableHead>
      <TableBody>
        {due.map((item) => (
          <DueRow key={item.number} item={item} locale={locale} />
        ))}
      </TableBody>
      <TableFoot>
        {sums.map((sum) => (
          <Row key={sum.currency}>
            <RowHead>{t("sum")}</RowHead>
            <Td>{null}</Td>
            <Td>{null}</Td>
            <Td>{null}</Td>
            <Td>{null}</Td>
            <Td label={t("total")} isNumeric>
              {formatMoney(sum, locale)}
            </Td>
          </Row>
        ))}
      </TableFoot>
    </Table>
  );
}

function DueRow({ item, locale }: { item: DueItem; locale: Locale }) {
  const t = useTranslations("credits.due");
  const elsewhere = useTranslations("credits.elsewhere");
  const { credit, standing } = item;
  const amount = (minor: bigint) => formatMoney(money(minor, credit.currency), locale);
  return (
    <Row>
      <RowHead>
        <span className="flex items-center gap-3">
          {standing ? null : (
            <Checkbox
              name="claims[]"
              value={item.key}
              label={<span className="sr-only">{t("tick", { number: item.number })}</span>}
            />
          )}
          <TextLink href={`/claims/${item.number}`}>
            <span className="font-mono">{item.number}</span>
          </TextLink>
        </span>
        {standing ? (
          <TextLink href={notePath(standing)}>{t("counterFirst", { number: standing.number })}</TextLink>
        ) : null}
        {item.isCountered ? <span className="block text-small text-wanting">{t("wasCountered")}</span> : null}
      </RowHead>
      <Td label={t("workshop")}>{item.workshopName}</Td>
      <Td label={t("part")}>
        {item.parts}
        {credit.elsewhere.map(({ settledBy, netMinor }) =>
          settledBy === "creditNote" ? null : (
            <span key={settledBy} className="block text-small text-ink-2">
              {elsewhere(settledBy, { amount: amount(netMinor) })}
            </span>
          ),
        )}
      </Td>
      <Td label={t("decidedOn")}>
        {formatDay(item.decidedOn, locale)}
        {item.contestUntil ? (
          <span className="block text-small text-ink-2">
            {t("contestUntil", { day: formatDay(item.contestUntil, locale) })}
          </span>
        ) : null}
      </Td>
      <Td label={t("net")} isNumeric>
        {amount(credit.netMinor)}
      </Td>
      <Td label={t("total")} isNumeric>
        {amount(credit.totalMinor)}
      </Td>
    </Row>
  );
}
