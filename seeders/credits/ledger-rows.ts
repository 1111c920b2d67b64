import { postingsOf, type Movement as LedgerMovement } from "@/lib/credits/ledger";
import { keptAccount } from "@/lib/day-book/ledger/accounts";
import { currencyFrom } from "@/lib/kernel/currency";
import { dayInZone } from "@/lib/kernel/calendar-day";
import { ORGANISATIONS, type SellerKey } from "../story/organisations";
import { ACCOUNTANTS, PEOPLE } from "../story/people";
import type { Row, Tables } from "../tables";
import type { Movement } from "./movements";
import { allocatedMinor, allocationId, noteId } from "./note-rows";

/** The Day book of a distributor: each movement an entry, its postings summing to nothing. */
export function ledgerRows(seller: SellerKey, movements: readonly Movement[]): Tables {
  const sequenceOf = new Map(movements.map((movement, place) => [movement, place + 1]));
  const issuedAs = new Map(
    movements.filter(({ what }) => what === "noteIssued").map((movement) => [movement.note, movement]),
  );
  const sellerId = ORGANISATIONS[seller].id;
  return {
    ledgerHeads: movements.length === 0 ? [] : [{ sellerId, sequence: movements.length }],
    ledgerEntries: movements.map((movement, place): Row => {
      const { note, what, at, scene } = movement;
      const issued = issuedAs.get(note);
      const isCounter = what === "noteCountered";
      return {
        sellerId,
        sequence: place + 1,
        workshopId: scene.life.parties.workshopId,
        kind: what,
        entryOn: dayInZone(at, ORGANISATIONS[seller].timeZone),
        noteId: noteId(movement),
        allocationId: what === "allocated" ? allocationId(movement) : null,
        countersSequence: isCounter && issued ? (sequenceOf.get(issued) ?? null) : null,
        enteredById: PEOPLE[ACCOUNTANTS[seller]].id,
        enteredAt: at,
      };
    }),
    ledgerPostings: movements.flatMap((movement, place) =>
      postingsOf(ledgerMovement(movement)).map(({ account, amountMinor, currency }, nth): Row => ({
        sellerId,
        sequence: place + 1,
        position: nth + 1,
        account: keptAccount(account),
        amountMinor: String(amountMinor),
        currency,
      })),
    ),
  };
}

function ledgerMovement(movement: Movement): LedgerMovement {
  const { what, note, scene } = movement;
  if (!scene.given) throw new RangeError("A movement without a verdict");
  const { credit } = scene.given;
  const currency = currencyFrom(credit.currency);
  if (what === "allocated")
    return {
      kind: "allocated",
      how: note.allocation?.how ?? "invoice",
      currency,
      amountMinor: allocatedMinor(movement),
    };
  return { kind: what, currency, netMinor: credit.netMinor, taxMinor: credit.taxMinor };
}
