import { isCurrency, type Currency } from "@/lib/kernel/currency";
import { addMoney, money, noMoney, type Money } from "@/lib/kernel/money";
import { batchKey, type GoodLine, type Recorded } from "./known";
import type { InPieces } from "./pieces";

/** One invoice line as the file has it: a line of the file for each unit, or one with a quantity. */
export type InvoiceLine = { readonly first: GoodLine; readonly lines: readonly GoodLine[] };

export type Totals = {
  readonly invoiceLines: number;
  readonly units: number;
  readonly batches: number;
  readonly sums: readonly Money[];
};

/** How many pieces an invoice line of the file is about. */
export const quantityOf = ({ first, lines }: InvoiceLine): number =>
  first.serial === null ? first.quantity : lines.length;

/** What an import would write, counted and summed by currency. May pause. */
export function* totalsOf(fresh: readonly InvoiceLine[], { batches }: Recorded): InPieces<Totals> {
  const sums = new Map<Currency, Money>();
  const newBatches = new Set<string>();
  let units = 0;
  for (const invoiceLine of fresh) {
    const { currency, unitPriceMinor, partId } = invoiceLine.first.facts;
    for (const { serial, batch } of invoiceLine.lines) {
      yield;
      if (serial !== null) units += 1;
      if (batch !== null && !batches.has(batchKey(partId, batch))) newBatches.add(batchKey(partId, batch));
    }
    if (!isCurrency(currency)) continue;
    const minor = BigInt(unitPriceMinor) * BigInt(quantityOf(invoiceLine));
    sums.set(currency, addMoney(sums.get(currency) ?? noMoney(currency), money(minor, currency)));
  }
  return { invoiceLines: fresh.length, units, batches: newBatches.size, sums: [...sums.values()] };
}
