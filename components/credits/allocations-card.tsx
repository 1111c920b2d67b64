import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { ActionButton } from "@/components/record-form/action-button";
import { Card } from "@/components/ui/card";
import { MoneyLine, MoneyTotal } from "@/components/ui/money-total";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import type { AllocationWay } from "@/lib/credits/ledger";
import type { FormAction } from "@/lib/kernel/action-result";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay, formatMoney } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { Money } from "@/lib/kernel/money";

export type AllocationItem = {
  readonly id: string;
  readonly amount: Money;
  readonly how: AllocationWay;
  readonly reference: string;
  readonly allocatedOn: CalendarDay;
  readonly by: string | null;
  readonly isTakingBack: boolean;
  readonly isTakenBack: boolean;
};

type AllocationsCardProps = {
  number: string;
  allocations: readonly AllocationItem[];
  total: Money;
  open: Money;
  /** Absent for who may only read. */
  takeBack: FormAction | undefined;
  /** The form to allocate more, where something is open. */
  children?: ReactNode;
  locale: Locale;
};

/** Where a note went, row by row; what was taken back keeps its row beside the one that took it back. */
export function AllocationsCard({
  allocations,
  total,
  open,
  children,
  locale,
  ...own
}: AllocationsCardProps) {
  const t = useTranslations("credits.allocations");
  const allocated = { ...total, minor: allocations.reduce((so, { amount }) => so + amount.minor, 0n) };
  return (
    <Card id="allocations" title={t("title")}>
      <div className="grid gap-6">
        {allocations.length > 0 ? (
          <AllocationTable allocations={allocations} locale={locale} {...own} />
        ) : (
          <p className="text-ink-2">{t("none")}</p>
        )}
        <div className="ml-auto w-full max-w-md">
          <MoneyLine label={t("allocated")} amount={formatMoney(allocated, locale)} />
          <MoneyTotal label={t("openSum")} amount={formatMoney(open, locale)} />
        </div>
        {children}
      </div>
    </Card>
  );
}

type TableProps = Pick<AllocationsCardProps, "number" | "allocations" | "takeBack" | "locale">;

function AllocationTable({ number, allocations, takeBack, locale }: TableProps) {
  const t = useTranslations("credits.allocations");
  return (
    <Table caption={t("caption")}>
      <TableHead>
        <Th>{t("day")}</Th>
        <Th>{t("how")}</Th>
        <Th>{t("reference")}</Th>
        <Th>{t("by")}</Th>
        <Th isNumeric>{t("amount")}</Th>
      </TableHead>
      <TableBody>
        {allocations.map((one) => (
          <Row key={one.id}>
            <RowHead>{formatDay(one.allocatedOn, locale)}</RowHead>
            <Td label={t("how")}>
              {t(`hows.${one.how}`)}
              {one.isTakenBack ? <span className="block text-small text-ink-2">{t("takenBack")}</span> : null}
              {one.isTakingBack ? (
                <span className="block text-small text-ink-2">{t("takingBack")}</span>
              ) : null}
            </Td>
            <Td label={t("reference")}>
              {one.reference}
              {takeBack && !one.isTakenBack && !one.isTakingBack ? (
                <ActionButton
                  action={takeBack}
                  fields={{ number, allocationId: one.id }}
                  label={t("takeBack")}
                  kind="quiet"
                  small
                />
              ) : null}
            </Td>
            <Td label={t("by")}>{one.by}</Td>
            <Td label={t("amount")} isNumeric>
              {formatMoney(one.amount, locale)}
            </Td>
          </Row>
        ))}
      </TableBody>
    </Table>
  );
}
