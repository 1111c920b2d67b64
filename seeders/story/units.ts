import { normaliseSerial } from "@/lib/labels/serial";
import { idOf } from "../identity";
import type { Chance } from "../random";
import type { Batch } from "./batches";
import type { MakerName } from "./catalogue";
import { ACCOUNTS, ORGANISATIONS, type Account } from "./organisations";

/** A unit with a serial, as it left the distributor. */
export type Unit = {
  readonly id: string;
  readonly batch: Batch;
  readonly account: Account;
  readonly siteId: string;
  readonly serial: string;
  readonly shippedDaysAgo: number;
};

const DAYS_FROM_MAKER_TO_SHELF = 18;
const LONGEST_SALE_DAYS = 115;
/** Nothing leaves the warehouse on the last days before the story is told. */
const LAST_SHIPMENT_DAYS_AGO = 2;

/** Every unit with a serial, sold over the months after its batch was made. */
export function unitsOf(batches: readonly Batch[], chance: Chance): Unit[] {
  const taken = new Set<string>();
  return batches.flatMap((batch) => {
    const draw = chance.fork(batch.id);
    const accounts = ACCOUNTS.filter((account) => account.seller === batch.part.seller);
    const saleDays = Math.min(
      LONGEST_SALE_DAYS,
      batch.madeDaysAgo - DAYS_FROM_MAKER_TO_SHELF - LAST_SHIPMENT_DAYS_AGO,
    );
    return Array.from({ length: batch.units }, (_, place): Unit => {
      const account = draw.weighted(accounts.map((candidate) => [candidate, candidate.weight] as const));
      const [main, second] = ORGANISATIONS[account.buyer].sites;
      return {
        id: idOf("unit", batch.id, place),
        batch,
        account,
        siteId: second && draw.happens(0.35) ? second.id : main.id,
        serial: freshSerial(batch, draw, taken),
        shippedDaysAgo: batch.madeDaysAgo - DAYS_FROM_MAKER_TO_SHELF - draw.whole(0, saleDays),
      };
    });
  });
}

function freshSerial(batch: Batch, draw: Chance, taken: Set<string>): string {
  for (;;) {
    const serial = serialOf(batch, draw);
    const key = `${batch.part.id} ${normaliseSerial(serial)}`;
    if (!taken.has(key)) {
      taken.add(key);
      return serial;
    }
  }
}

/** A serial as the maker of the batch writes it. */
export const serialOf = (batch: Batch, draw: Chance): string => SERIALS[batch.part.maker](batch, draw);

// Half of the letters look like a figure on a worn label: O and 0, I and 1, S and 5, B and 8.
const LETTERS = [..."0O1I5S8B34679ACEHKMPRTX"];
const FIGURES = [..."0123456789"];

const letters = (draw: Chance, count: number, from: readonly string[] = LETTERS): string =>
  Array.from({ length: count }, () => from[draw.whole(0, from.length - 1)]).join("");

const SERIALS: Readonly<Record<MakerName, (batch: Batch, draw: Chance) => string>> = {
  Ostrand: (batch, draw) => `${batch.code}-${letters(draw, 5)}`,
  Kelvane: (_, draw) => `KV${letters(draw, 6, FIGURES)}-${letters(draw, 2)}`,
  Brannick: (_, draw) => `${letters(draw, 4)} ${letters(draw, 4)} ${letters(draw, 2)}`,
};
