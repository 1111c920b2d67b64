import { useTranslations } from "next-intl";
import { SheetTable } from "@/components/ui/sheet-table";
import { Row, RowHead, Td } from "@/components/ui/table";

type AccountItem = {
  readonly number: string;
  readonly buyerName: string;
  readonly buyerLegalName: string;
  readonly buyerAddress: string;
  readonly taxNumber: string | null;
  readonly currency: string;
  /** Days as they are read, in the reader's language. */
  readonly opened: string;
  readonly closed: string | null;
  readonly sites: readonly { readonly name: string; readonly address: string }[];
};

const COLUMNS = ["number", "buyer", "sites", "currency", "state"] as const;

/** Who buys on which account, and where they work. */
export function AccountTable({ accounts }: { accounts: readonly AccountItem[] }) {
  const t = useTranslations("accounts");
  return (
    <SheetTable caption={t("caption")} heads={COLUMNS.map((column) => t(`columns.${column}`))}>
      {accounts.map((account) => (
        <AccountRow key={account.number} account={account} />
      ))}
    </SheetTable>
  );
}

function AccountRow({ account }: { account: AccountItem }) {
  const t = useTranslations("accounts");
  return (
    <Row>
      <RowHead>
        <span translate="no" className="font-mono">
          {account.number}
        </span>
      </RowHead>
      <Td label={t("columns.buyer")}>
        {account.buyerName}
        <span className="block text-small text-ink-2">{account.buyerLegalName}</span>
        <span className="block text-small whitespace-pre-line text-ink-2">{account.buyerAddress}</span>
        {account.taxNumber ? (
          <span className="block text-small text-ink-2">{t("taxNumber", { number: account.taxNumber })}</span>
        ) : null}
      </Td>
      <Td label={t("columns.sites")}>
        <ul className="grid gap-1">
          {account.sites.map((site) => (
            <li key={site.name}>
              {site.name}
              <span className="block text-small whitespace-pre-line text-ink-2">{site.address}</span>
            </li>
          ))}
        </ul>
      </Td>
      <Td label={t("columns.currency")}>{account.currency}</Td>
      <Td label={t("columns.state")}>
        {account.closed ? t("closed", { day: account.closed }) : t("open", { day: account.opened })}
      </Td>
    </Row>
  );
}
