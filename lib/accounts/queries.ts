import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";

export type AccountRow = {
  number: string;
  buyerName: string;
  buyerLegalName: string;
  buyerAddress: string;
  taxNumber: string | null;
  currency: string;
  openedOn: CalendarDay;
  closedOn: CalendarDay | null;
  sites: { name: string; address: string }[];
};

/** The accounts on which the actor's organisation sells, with the buyers and their sites. */
export const listAccounts = (actor: Actor): Promise<AccountRow[]> =>
  unitOfWork(actor, (work) =>
    rows<AccountRow>(
      work,
      `select t.account_number as number, o.name as "buyerName", o.legal_name as "buyerLegalName",
         o.address as "buyerAddress", o.tax_number as "taxNumber", t.currency::text as currency,
         t.opened_on as "openedOn", t.closed_on as "closedOn",
         coalesce((select json_agg(json_build_object('name', s.name, 'address', s.address) order by s.name)
           from sites s where s.organisation_id = o.id), '[]') as sites
       from trading_accounts t join organisations o on o.id = t.buyer_id
       where t.seller_id = $1 order by t.account_number`,
      [actor.organisationId],
    ),
  );

export type KnownBuyer = { id: string; name: string };

/** Organisations the actor's one can already see, that buy, and that have no account with it yet. */
export const listKnownBuyers = (actor: Actor): Promise<KnownBuyer[]> =>
  unitOfWork(actor, (work) =>
    rows<KnownBuyer>(
      work,
      `select o.id, o.name from organisations o where o.buys and o.id <> $1
         and not exists (select 1 from trading_accounts t where t.seller_id = $1 and t.buyer_id = o.id)
       order by o.name`,
      [actor.organisationId],
    ),
  );
