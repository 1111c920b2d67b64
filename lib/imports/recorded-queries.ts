import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";
import {
  batchKey,
  lineKey,
  unitKey,
  type Catalogue,
  type GoodLine,
  type KnownAccount,
  type KnownLine,
  type KnownPart,
  type KnownUnit,
  type LineFacts,
  type Recorded,
} from "./known";
import type { ReadLines } from "./check";
import { cellOf, type CsvFile } from "./csv-file";
import type { ColumnKey } from "./columns";
import type { InPieces } from "./pieces";
import { inSlices } from "./slices-service";

/** Few enough that neither asking nor reading the answer holds the process noticeably. */
const KEYS_AT_ONCE = 1_000;
/** A number as long as any account or part may have; a longer text names neither. */
const LONGEST_NUMBER = 40;

/** A list in pieces that one statement takes. */
export const inPieces = <T>(list: readonly T[], size: number): T[][] =>
  Array.from({ length: Math.ceil(list.length / size) }, (_piece, at) =>
    list.slice(at * size, (at + 1) * size),
  );

function* distinct({ heading, rows: lines }: CsvFile, column: ColumnKey): InPieces<string[]> {
  const found = new Set<string>();
  for (const row of lines) {
    const number = cellOf(heading, row, column);
    if (number !== "" && number.length <= LONGEST_NUMBER) found.add(number);
    yield;
  }
  return [...found];
}

async function addAccounts(work: Work, numbers: string[], accounts: Map<string, KnownAccount>) {
  const found = await rows<KnownAccount & { number: string }>(
    work,
    `select t.account_number as number, t.id, t.buyer_id as "buyerId", o.name as "buyerName", t.currency,
       t.closed_on::text as "closedOn", coalesce((select json_agg(json_build_object('id', s.id, 'name', s.name) order by s.name)
         from sites s where s.organisation_id = t.buyer_id), '[]') as sites
     from trading_accounts t join organisations o on o.id = t.buyer_id
     where t.seller_id = $1 and t.account_number = any($2::text[])`,
    [work.actor.organisationId, numbers],
  );
  for (const account of found) accounts.set(account.number, account);
}

async function addParts(work: Work, numbers: string[], parts: Map<string, KnownPart>) {
  const found = await rows<KnownPart & { number: string }>(
    work,
    `select part_number as number, id, serial_tracked as "isSerialTracked" from parts
     where seller_id = $1 and part_number = any($2::text[])`,
    [work.actor.organisationId, numbers],
  );
  for (const part of found) parts.set(part.number, part);
}

/** The accounts and parts that a file names and this organisation has. */
export async function findCatalogue(work: Work, file: CsvFile): Promise<Catalogue> {
  const accounts = new Map<string, KnownAccount>();
  const parts = new Map<string, KnownPart>();
  for (const some of inPieces(await inSlices(distinct(file, "account")), KEYS_AT_ONCE))
    await addAccounts(work, some, accounts);
  for (const some of inPieces(await inSlices(distinct(file, "part")), KEYS_AT_ONCE))
    await addParts(work, some, parts);
  return { accounts, parts };
}

type LineRow = LineFacts & { id: string; quantity: number; invoice: string; lineNumber: number };

async function addLines(work: Work, goods: readonly GoodLine[], lines: Map<string, KnownLine>) {
  const found = await rows<LineRow>(
    work,
    `select l.id, l.quantity, l.invoice_number as invoice, l.line_number as "lineNumber", l.account_id as "accountId",
       l.site_id as "siteId", l.invoiced_on::text as "invoicedOn", l.shipped_on::text as "shippedOn", l.part_id as "partId",
       l.currency, l.unit_price_minor::text as "unitPriceMinor", l.tax_category as "taxCategory",
       l.tax_rate::text as "taxRate", l.exemption_reason as "exemptionReason"
     from unnest($2::text[], $3::int[]) k (invoice, line)
       join invoice_lines l on l.seller_id = $1 and l.invoice_number = k.invoice and l.line_number = k.line`,
    [work.actor.organisationId, goods.map((good) => good.invoice), goods.map((good) => good.lineNumber)],
  );
  for (const { id, quantity, invoice, lineNumber, ...facts } of found)
    lines.set(lineKey(invoice, lineNumber), { id, quantity, facts });
}

type UnitRow = KnownUnit & { partId: string; normal: string };

async function addUnits(work: Work, goods: readonly GoodLine[], units: Map<string, KnownUnit>) {
  const found = await rows<UnitRow>(
    work,
    `select u.part_id as "partId", u.serial_normal as normal, u.invoice_line_id as "invoiceLineId",
       l.invoice_number as invoice, l.line_number as "lineNumber", b.code as batch
     from unnest($2::uuid[], $3::text[]) k (part_id, normal)
       join units u on u.seller_id = $1 and u.part_id = k.part_id and u.serial_normal = k.normal
       left join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
       left join batches b on b.seller_id = u.seller_id and b.id = u.batch_id`,
    [
      work.actor.organisationId,
      goods.map((good) => good.facts.partId),
      goods.map((good) => good.serial?.normal ?? ""),
    ],
  );
  for (const { partId, normal, ...unit } of found) units.set(unitKey(partId, normal), unit);
}

type BatchRow = { id: string; partId: string; code: string };

async function addBatches(work: Work, goods: readonly GoodLine[], batches: Map<string, string>) {
  const found = await rows<BatchRow>(
    work,
    `select b.id, b.part_id as "partId", b.code
     from (select distinct part_id, code from unnest($2::uuid[], $3::text[]) u (part_id, code)) k
       join batches b on b.seller_id = $1 and b.part_id = k.part_id and b.code = k.code`,
    [
      work.actor.organisationId,
      goods.map((good) => good.facts.partId),
      goods.map((good) => good.batch ?? ""),
    ],
  );
  for (const { id, partId, code } of found) batches.set(batchKey(partId, code), id);
}

/** What is on record of the invoice lines, units and batches of a file: a few statements, however many lines it has. */
export async function findRecorded(work: Work, { invoiceLines }: ReadLines): Promise<Recorded> {
  const recorded = {
    lines: new Map<string, KnownLine>(),
    units: new Map<string, KnownUnit>(),
    batches: new Map<string, string>(),
  };
  const goods = invoiceLines.flatMap(({ lines }) => lines);
  for (const some of inPieces(
    invoiceLines.map(({ first }) => first),
    KEYS_AT_ONCE,
  ))
    await addLines(work, some, recorded.lines);
  for (const some of inPieces(goods, KEYS_AT_ONCE)) {
    await addUnits(work, some, recorded.units);
    await addBatches(work, some, recorded.batches);
  }
  return recorded;
}
