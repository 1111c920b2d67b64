import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { foldLookalikes, normaliseSerial } from "@/lib/labels/serial";

/** A unit as the workshop that bought it may see it: what it is, how it was sold, where it was fitted. */
export type SoldUnit = {
  unitId: string;
  serial: string;
  partId: string;
  partNumber: string;
  partName: string;
  family: string;
  rated: unknown;
  batchCode: string | null;
  madeOn: CalendarDay | null;
  sellerId: string;
  sellerName: string;
  accountId: string;
  invoiceLineId: string;
  invoiceNumber: string;
  lineNumber: number;
  invoicedOn: CalendarDay;
  shippedOn: CalendarDay;
  unitPriceMinor: string;
  currency: string;
  suppliedUnderClaim: boolean;
  fittingId: string | null;
  fittedOn: CalendarDay | null;
  position: "left" | "right" | "single" | null;
  frameSerial: string | null;
  vehicleModel: string | null;
  installerName: string | null;
  /** The newest claim of this workshop on the unit, if there is one. */
  ownClaim: string | null;
};

const SOLD_UNIT = `
  select u.id as "unitId", u.serial, u.part_id as "partId", p.part_number as "partNumber", p.name as "partName",
    p.family, p.rated, b.code as "batchCode", b.made_on as "madeOn", u.seller_id as "sellerId", s.name as "sellerName",
    l.account_id as "accountId", l.id as "invoiceLineId", l.invoice_number as "invoiceNumber",
    l.line_number as "lineNumber", l.invoiced_on as "invoicedOn", l.shipped_on as "shippedOn",
    l.unit_price_minor as "unitPriceMinor", l.currency, u.supplied_under_claim as "suppliedUnderClaim",
    f.id as "fittingId", f.fitted_on as "fittedOn", f.position, v.frame_serial as "frameSerial",
    v.model as "vehicleModel", i.name as "installerName",
    (select c.number from claim_lines cl join claims c on c.id = cl.claim_id
      where cl.seller_id = u.seller_id and cl.unit_id = u.id and cl.workshop_id = $1
      order by c.created_at desc limit 1) as "ownClaim"
  from units u
    join parts p on p.seller_id = u.seller_id and p.id = u.part_id
    join organisations s on s.id = u.seller_id
    join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
    left join batches b on b.seller_id = u.seller_id and b.id = u.batch_id
    left join lateral (select * from fittings g where g.seller_id = u.seller_id and g.unit_id = u.id
      and g.workshop_id = $1 order by g.fitted_on desc limit 1) f on true
    left join vehicles v on v.workshop_id = f.workshop_id and v.id = f.vehicle_id
    left join installers i on i.workshop_id = f.workshop_id and i.id = f.installer_id
  where u.buyer_id = $1`;

const bySerial = (work: Work, serialNormal: string) =>
  rows<SoldUnit>(work, `${SOLD_UNIT} and u.serial_normal = $2 order by l.shipped_on desc limit 5`, [
    work.actor.organisationId,
    serialNormal,
  ]);

/** The unit of that id, if this organisation bought it. */
export async function findSoldUnit(work: Work, unitId: string): Promise<SoldUnit | null> {
  const [found] = await rows<SoldUnit>(work, `${SOLD_UNIT} and u.id = $2`, [
    work.actor.organisationId,
    unitId,
  ]);
  return found ?? null;
}

export type SerialAnswer =
  | { readonly kind: "found"; readonly units: readonly SoldUnit[] }
  /** Serials that look the same on a worn label (O and 0, I and 1): offered as a choice, never corrected in silence. */
  | { readonly kind: "similar"; readonly units: readonly SoldUnit[] }
  | { readonly kind: "unknown" };

/** Looks a serial up among the units this organisation bought. Says nothing about units sold to anybody else. */
export const lookUpSerial = (actor: Actor, typed: string): Promise<SerialAnswer> =>
  unitOfWork(actor, (work) => serialAnswer(work, typed));

/** The same, inside a running unit of work. */
async function serialAnswer(work: Work, typed: string): Promise<SerialAnswer> {
  const normal = normaliseSerial(typed);
  if (normal.length < 3) return { kind: "unknown" };
  const found = await bySerial(work, normal);
  if (found.length > 0) return { kind: "found", units: found };

  const similar = await rows<{ id: string; serialNormal: string }>(
    work,
    `select id, serial_normal as "serialNormal" from units where buyer_id = $1 and serial_normal is not null
       and length(serial_normal) = $2 and serial_folded = $3 limit 5`,
    [work.actor.organisationId, normal.length, foldLookalikes(normal)],
  );
  const units = await Promise.all(similar.map((unit) => findSoldUnit(work, unit.id)));
  const known = units.filter((unit) => unit !== null);
  return known.length > 0 ? { kind: "similar", units: known } : { kind: "unknown" };
}

export type SoldLine = {
  invoiceLineId: string;
  partId: string;
  partNumber: string;
  partName: string;
  family: string;
  sellerId: string;
  sellerName: string;
  accountId: string;
  invoiceNumber: string;
  lineNumber: number;
  invoicedOn: CalendarDay;
  shippedOn: CalendarDay;
  quantity: number;
  unitPriceMinor: string;
  currency: string;
};

const SOLD_LINE = `
  select l.id as "invoiceLineId", l.part_id as "partId", p.part_number as "partNumber", p.name as "partName", p.family,
    l.seller_id as "sellerId", s.name as "sellerName", l.account_id as "accountId", l.invoice_number as "invoiceNumber",
    l.line_number as "lineNumber", l.invoiced_on as "invoicedOn", l.shipped_on as "shippedOn", l.quantity,
    l.unit_price_minor as "unitPriceMinor", l.currency
  from invoice_lines l
    join parts p on p.seller_id = l.seller_id and p.id = l.part_id
    join organisations s on s.id = l.seller_id
  where l.buyer_id = $1`;

/** The newest purchases of parts that carry no serial, for a claim on a quantity. */
export const listLinesWithoutSerial = (actor: Actor): Promise<SoldLine[]> =>
  unitOfWork(actor, (work) =>
    rows<SoldLine>(work, `${SOLD_LINE} and not p.serial_tracked order by l.invoiced_on desc limit 50`, [
      actor.organisationId,
    ]),
  );

/** A purchase by its line, if it is this organisation's. */
export async function findSoldLine(work: Work, invoiceLineId: string): Promise<SoldLine | null> {
  const [found] = await rows<SoldLine>(work, `${SOLD_LINE} and l.id = $2`, [
    work.actor.organisationId,
    invoiceLineId,
  ]);
  return found ?? null;
}

export type OfferedPart = { partId: string; partNumber: string; partName: string; family: string };
export type OfferedAccount = {
  accountId: string;
  sellerId: string;
  sellerName: string;
  currency: string;
  parts: OfferedPart[];
};

/** The distributors this workshop buys from, with their parts: for a part whose serial nobody can read any more. */
export const listAccountsWithParts = (actor: Actor): Promise<OfferedAccount[]> =>
  unitOfWork(actor, (work) =>
    rows<OfferedAccount>(
      work,
      `select t.id as "accountId", t.seller_id as "sellerId", s.name as "sellerName", t.currency,
         coalesce((select json_agg(json_build_object('partId', p.id, 'partNumber', p.part_number, 'partName', p.name,
           'family', p.family) order by p.family, p.part_number) from parts p where p.seller_id = t.seller_id), '[]') as parts
       from trading_accounts t join organisations s on s.id = t.seller_id
       where t.buyer_id = $1 and t.closed_on is null order by s.name`,
      [actor.organisationId],
    ),
  );
