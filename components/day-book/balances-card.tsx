import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { Row, RowHead, Table, TableBody, TableFoot, TableHead, Td, Th } from "@/components/ui/table";
import type { Balance } from "@/lib/day-book/book/running";
import type { Currency } from "@/lib/kernel/currency";
import { formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { money } from "@/lib/kernel/money";

type Owed = { readonly workshopId: string; readonly currency: Currency; opening: bigint; closing: bigint };

type BalancesCardProps = {
  opening: readonly Balance[];
  closing: readonly Balance[];
  workshops: readonly { readonly id: string; readonly name: string }[];
  locale: Locale;
};

function together(opening: readonly Balance[], closing: readonly Balance[]): Owed[] {
  const found = new Map<string, Owed>();
  const at = ({ workshopId, currency }: Balance): Owed => {
    const key = `${workshopId} ${currency}`;
    const owed = found.get(key) ?? { workshopId, currency, opening: 0n, closing: 0n };
    found.set(key, owed);
    return owed;
  };
  for (const one of opening) at(one).opening = one.owedMinor;
  for (const one of closing) at(one).closing = one.owedMinor;
  return [...found.values()];
}

/** What each workshop is owed before and after the entries that are shown, summed by currency under a double rule. */
export function BalancesCard({ opening, closing, workshops, locale }: BalancesCardProps) {
  const t = useTranslations("dayBook.balances");
  const owed = together(opening, closing);
  const names = new Map(workshops.map(({ id, name }) => [id, name]));
  const amount = (minor: bigint, currency: Currency) => formatMoney(money(minor, currency), locale);
  const sum = (currency: Currency, of: "opening" | "closing") =>
    owed.reduce((so, one) => (one.currency === currency ? so + one[of] : so), 0n);
  const currencies = [...new Set(owed.map(({ currency }) => currency))];
  if (owed.length === 0) return null;
  return (
    <Card id="balances" title={t("title")}>
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("workshop")}</Th>
          <Th isNumeric>{t("opening")}</Th>
          <Th isNumeric>{t("closing")}</Th>
        </TableHead>
        <TableBody>
          {owed.map((one) => (
            <Row key={`${one.workshopId} ${one.currency}`}>
              <RowHead>{names.get(one.workshopId) ?? ""}</RowHead>
              <Td label={t("opening")} isNumeric>
                {amount(one.opening, one.currency)}
              </Td>
              <Td label={t("closing")} isNumeric>
                {amount(one.closing, one.currency)}
              </Td>
            </Row>
          ))}
        </TableBody>
        <TableFoot>
          {currencies.map((currency) => (
            <Row key={currency}>
              <RowHead>{t("all", { currency })}</RowHead>
              <Td label={t("opening")} isNumeric>
                {amount(sum(currency, "opening"), currency)}
              </Td>
              <Td label={t("closing")} isNumeric>
                {amount(sum(currency, "closing"), currency)}
              </Td>
            </Row>
          ))}
        </TableFoot>
      </Table>
    </Card>
  );
}
