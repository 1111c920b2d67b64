import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import type { FormAction } from "@/lib/kernel/action-result";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { formatDay } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { StartButton } from "./start-button";

type Purchase = {
  invoiceLineId: string;
  partName: string;
  partNumber: string;
  sellerName: string;
  invoiceNumber: string;
  invoicedOn: CalendarDay;
  quantity: number;
};
type Part = { partId: string; partNumber: string; partName: string; family: string };
type Account = { accountId: string; sellerName: string; parts: readonly Part[] };
type HandPickerProps = {
  serial: string;
  accounts: readonly Account[];
  purchases: readonly Purchase[];
  locale: Locale;
  start: FormAction;
};

/** The ways in without a readable serial: a purchase of a part that has none, or the part chosen from the catalogue. */
export function HandPicker({ serial, accounts, purchases, locale, start }: HandPickerProps) {
  const t = useTranslations("start");
  return (
    <>
      <Card title={t("purchases")} note={t("purchasesNote")}>
        {purchases.length === 0 ? (
          <EmptyState kind="nothingYet" title={t("noPurchases")} />
        ) : (
          <ul className="grid gap-4">
            {purchases.slice(0, 12).map((purchase) => (
              <li
                key={purchase.invoiceLineId}
                className="grid items-center gap-2 border-b border-rule pb-4 sm:grid-cols-[1fr_auto]"
              >
                <div>
                  <p className="font-semibold">{purchase.partName}</p>
                  <p className="text-small text-ink-2">
                    {t("purchase", {
                      part: purchase.partNumber,
                      quantity: purchase.quantity,
                      invoice: purchase.invoiceNumber,
                      day: formatDay(purchase.invoicedOn, locale),
                      seller: purchase.sellerName,
                    })}
                  </p>
                </div>
                <StartButton
                  start={start}
                  fields={{ invoiceLineId: purchase.invoiceLineId }}
                  label={t("startWithPurchase")}
                />
              </li>
            ))}
          </ul>
        )}
      </Card>
      {accounts.map((account) => (
        <Card
          key={account.accountId}
          title={t("catalogueOf", { seller: account.sellerName })}
          note={t("catalogueNote")}
        >
          <ul className="grid gap-2">
            {account.parts.map((part) => (
              <li
                key={part.partId}
                className="grid items-center gap-2 border-b border-rule pb-2 sm:grid-cols-[1fr_auto]"
              >
                <p>
                  <span className="font-semibold">{part.partName}</span>{" "}
                  <span className="text-ink-2">{part.partNumber}</span>
                </p>
                <StartButton
                  start={start}
                  fields={{ accountId: account.accountId, partId: part.partId, serial }}
                  label={t("startWithPart")}
                />
              </li>
            ))}
          </ul>
        </Card>
      ))}
    </>
  );
}
