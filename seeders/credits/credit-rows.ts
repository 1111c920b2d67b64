import { dayInZone } from "@/lib/kernel/calendar-day";
import type { Scene } from "../claims/scene";
import { ORGANISATIONS, type SellerKey } from "../story/organisations";
import { ACCOUNTANTS, PEOPLE } from "../story/people";
import type { SaleLine } from "../story/sales";
import type { World } from "../story/world";
import { together, type Row, type Tables } from "../tables";
import { documentsOf, type Document } from "./documents";
import { ledgerRows } from "./ledger-rows";
import { movementsOf, type Movement } from "./movements";
import { allocatedMinor, allocationId, noteId, noteRows } from "./note-rows";

/** Credit notes, their allocations and the Day book of both distributors. Fills the numbers into the claims' timelines. */
export const creditRows = (scenes: readonly Scene[], world: World): Tables =>
  together((["larkmoor", "fenwright"] as const).map((seller) => creditsOf(seller, scenes, world)));

function creditsOf(seller: SellerKey, scenes: readonly Scene[], world: World): Tables {
  const movements = movementsOf(scenes.filter(({ one }) => one.seller === seller));
  const { documents, series } = documentsOf(seller, movements);
  tellNumbers(documents, world);
  return together([
    {
      creditNoteSeries: series.map(({ prefix, year, lastSequence, lastIssuedOn }) => ({
        sellerId: ORGANISATIONS[seller].id,
        year,
        prefix,
        lastSequence,
        lastIssuedOn,
      })),
      creditAllocations: movements
        .filter(({ what }) => what === "allocated")
        .map((movement) => allocationRow(movement, world)),
    },
    noteRows(documents),
    ledgerRows(seller, movements),
  ]);
}

/** What the timeline of a claim says of its note: its number, what it was set against, the note that took it back. */
function tellNumbers(documents: readonly Document[], { sales }: World): void {
  for (const { movement, document } of documents) {
    const [issued, ...later] = movement.note.details;
    const isCounter = movement.what === "noteCountered";
    const number = isCounter ? { counter: document.number } : { note: document.number };
    for (const detail of isCounter ? later : movement.note.details) Object.assign(detail, number);
    if (issued && movement.note.allocation)
      for (const detail of later) Object.assign(detail, { reference: referenceOf(movement, sales) });
  }
}

/** The invoice the workshop had last before the day of the allocation, or a reference of the bank. */
function referenceOf({ scene: { one }, note }: Movement, sales: readonly SaleLine[]): string {
  if (!note.allocation) return "";
  const on = dayInZone(note.allocation.at, ORGANISATIONS[one.seller].timeZone);
  if (note.allocation.how === "paidOut") return `PAY ${on.replaceAll("-", "")}`;
  const last = sales.findLast(
    ({ account, day }) => account.seller === one.seller && account.buyer === one.workshop && day <= on,
  );
  return last?.invoiceNumber ?? one.number;
}

function allocationRow(movement: Movement, { sales }: World): Row {
  const { scene, note, at } = movement;
  const { one, life } = scene;
  const on = dayInZone(at, ORGANISATIONS[one.seller].timeZone);
  const how = note.allocation?.how ?? "invoice";
  return {
    id: allocationId(movement),
    noteId: noteId({ note, what: "noteIssued" }),
    ...life.parties,
    amountMinor: String(allocatedMinor(movement)),
    how,
    reference: referenceOf(movement, sales),
    allocatedOn: on,
    takesBackId: null,
    allocatedById: PEOPLE[ACCOUNTANTS[one.seller]].id,
    allocatedAt: at,
  };
}
