import "server-only";
import { randomUUID } from "node:crypto";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { batchKey } from "./known";
import type { InPieces } from "./pieces";
import { inSlices } from "./slices-service";
import { quantityOf, type InvoiceLine } from "./totals";
import { inPieces } from "./recorded-queries";

/** Few enough that one statement stays far below the time a statement may take. */
const LINES_AT_ONCE = 2_000;

type Numbered = InvoiceLine & { readonly id: string };

const INSERT_BATCHES = `
  insert into batches (seller_id, part_id, code)
  select distinct $1::uuid, x.part_id, x.code from jsonb_to_recordset($2::jsonb) x (part_id uuid, code text)
  on conflict (seller_id, part_id, code) do nothing returning id`;

const INSERT_LINES = `
  insert into invoice_lines (id, seller_id, buyer_id, account_id, site_id, invoice_number, line_number, invoiced_on, shipped_on,
    part_id, quantity, unit_price_minor, currency, tax_category, tax_rate, exemption_reason)
  select x.id, $1::uuid, x."buyerId", x."accountId", x."siteId", x.invoice, x."lineNumber", x."invoicedOn", x."shippedOn",
    x."partId", x.quantity, x."unitPriceMinor", x.currency, x."taxCategory", x."taxRate", x."exemptionReason"
  from jsonb_to_recordset($2::jsonb) x (id uuid, "buyerId" uuid, "accountId" uuid, "siteId" uuid, invoice text,
    "lineNumber" int, "invoicedOn" date, "shippedOn" date, "partId" uuid, quantity int, "unitPriceMinor" bigint,
    currency text, "taxCategory" text, "taxRate" numeric, "exemptionReason" text)`;

const INSERT_UNITS = `
  insert into units (seller_id, buyer_id, part_id, batch_id, invoice_line_id, serial, serial_normal)
  select $1::uuid, x."buyerId", x."partId", b.id, x."invoiceLineId", x.serial, x.normal
  from jsonb_to_recordset($2::jsonb) x ("buyerId" uuid, "partId" uuid, "invoiceLineId" uuid, serial text, normal text, batch text)
    left join batches b on b.seller_id = $1::uuid and b.part_id = x."partId" and b.code = x.batch`;

const lineRow = (line: Numbered) => ({
  id: line.id,
  buyerId: line.first.buyerId,
  invoice: line.first.invoice,
  lineNumber: line.first.lineNumber,
  quantity: quantityOf(line),
  ...line.first.facts,
});

type UnitRow = {
  readonly buyerId: string;
  readonly partId: string;
  readonly invoiceLineId: string;
  readonly serial: string;
  readonly normal: string;
  readonly batch: string | null;
};

/** The units of some invoice lines in pieces; all of them may be on one line. */
function* unitRows(lines: readonly Numbered[]): Generator<UnitRow[], void, undefined> {
  let piece: UnitRow[] = [];
  for (const { id, lines: goods } of lines)
    for (const { buyerId, facts, serial, batch } of goods) {
      if (serial === null) continue;
      const { raw, normal } = serial;
      piece.push({ buyerId, partId: facts.partId, invoiceLineId: id, serial: raw, normal, batch });
      if (piece.length < LINES_AT_ONCE) continue;
      yield piece;
      piece = [];
    }
  if (piece.length > 0) yield piece;
}

type BatchRow = { readonly part_id: string; readonly code: string };

function* batchRows(fresh: readonly InvoiceLine[]): InPieces<BatchRow[]> {
  const found = new Map<string, BatchRow>();
  for (const { lines } of fresh)
    for (const { facts, batch } of lines) {
      if (batch !== null) found.set(batchKey(facts.partId, batch), { part_id: facts.partId, code: batch });
      yield;
    }
  return [...found.values()];
}

/** Writes invoice lines with their units and the batches that are new, many rows a statement. */
export async function writeLines(work: Work, fresh: readonly InvoiceLine[]): Promise<void> {
  const seller = work.actor.organisationId;
  for (const some of inPieces(await inSlices(batchRows(fresh)), LINES_AT_ONCE))
    await rows(work, INSERT_BATCHES, [seller, JSON.stringify(some)]);
  for (const some of inPieces(fresh, LINES_AT_ONCE)) {
    const lines = some.map((line) => ({ ...line, id: randomUUID() }));
    await rows(work, INSERT_LINES, [seller, JSON.stringify(lines.map(lineRow))]);
    for (const units of unitRows(lines)) await rows(work, INSERT_UNITS, [seller, JSON.stringify(units)]);
  }
}
