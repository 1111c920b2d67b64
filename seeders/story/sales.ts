import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { workingDayAgo } from "../days";
import { idOf } from "../identity";
import type { Chance } from "../random";
import { partNumbered, type Part } from "./catalogue";
import { ACCOUNTS, ORGANISATIONS, type Account, type SellerKey } from "./organisations";
import type { Unit } from "./units";

export type Tax = {
  readonly category: "S" | "Z" | "G";
  readonly rate: number;
  readonly reason: string | null;
};

/** One line of an invoice: one unit, or a quantity of a part without serial. */
export type SaleLine = {
  readonly id: string;
  readonly account: Account;
  readonly siteId: string;
  readonly invoiceNumber: string;
  readonly lineNumber: number;
  readonly day: CalendarDay;
  readonly part: Part;
  readonly quantity: number;
  readonly unitPriceMinor: number;
  readonly tax: Tax;
  readonly unitId: string | null;
};

type Sold = Pick<SaleLine, "account" | "siteId" | "part" | "quantity" | "unitId" | "unitPriceMinor"> & {
  day: CalendarDay;
};

/** A price of a year ago was four in a hundred lower, and so on back; in whole minor units. */
const priceAt = (part: Part, daysAgo: number): number =>
  Math.round(part.priceMinor * (1 - 0.04 * Math.floor(daysAgo / 365)));

const ofUnit = (unit: Unit, today: CalendarDay): Sold => ({
  account: unit.account,
  siteId: unit.siteId,
  part: unit.batch.part,
  quantity: 1,
  unitId: unit.id,
  unitPriceMinor: priceAt(unit.batch.part, unit.shippedDaysAgo),
  day: workingDayAgo(today, unit.shippedDaysAgo),
});

const LOOSE_PART = "LML-2405";
const LOOSE_EVERY_DAYS = 31;

/** Chargers without a serial, a handful a month to each workshop of Larkmoor Parts. */
function looseSales(today: CalendarDay, draw: Chance): Sold[] {
  const part = partNumbered(LOOSE_PART);
  return ACCOUNTS.filter((account) => account.seller === "larkmoor").flatMap((account) =>
    Array.from({ length: 25 }, (_, month): Sold => {
      const daysAgo = 12 + month * LOOSE_EVERY_DAYS + draw.whole(0, 20);
      const siteId = ORGANISATIONS[account.buyer].sites[0].id;
      const unitPriceMinor = priceAt(part, daysAgo);
      return {
        account,
        siteId,
        part,
        quantity: draw.whole(2, 9),
        unitId: null,
        unitPriceMinor,
        day: workingDayAgo(today, daysAgo),
      };
    }),
  );
}

const ZERO_RATED: Tax = { category: "Z", rate: 0, reason: null };

const INVOICE_NUMBER: Readonly<Record<SellerKey, (day: CalendarDay, place: number) => string>> = {
  larkmoor: (day, place) => `LP${day.slice(2, 4)}-${String(20_000 + place * 3).padStart(5, "0")}`,
  fenwright: (day, place) => `${day.slice(0, 4)}-${String(4000 + place * 2).padStart(5, "0")}`,
};

type SalesPlan = {
  readonly today: CalendarDay;
  readonly chance: Chance;
  readonly zeroRatedUnitId: string;
  readonly freeUnitId: string;
};

/**
 * Everything sold, as invoices: one a day, account and site, invoiced on the day it was shipped. The invoice with
 * `zeroRatedUnitId` on it is zero-rated from the first line to the last; the unit with
 * `freeUnitId` was given under a claim and costs nothing.
 */
export function salesOf(
  units: readonly Unit[],
  { today, chance, zeroRatedUnitId, freeUnitId }: SalesPlan,
): SaleLine[] {
  const sold = [
    ...units.map((unit) => ofUnit(unit, today)),
    ...looseSales(today, chance.fork("loose parts")),
  ];
  const invoices = new Map<string, Sold[]>();
  for (const one of sold) {
    const key = [one.day, one.account.id, one.siteId].join(" ");
    invoices.set(key, [...(invoices.get(key) ?? []), one]);
  }
  const placeOf: Record<SellerKey, number> = { larkmoor: 0, fenwright: 0 };
  return [...invoices.keys()].sort().flatMap((key) => {
    const lines = invoices.get(key) ?? [];
    const seller = lines[0]?.account.seller ?? "larkmoor";
    placeOf[seller] += 1;
    const isZeroRated = lines.some((line) => line.unitId === zeroRatedUnitId);
    return lines.map((line, place): SaleLine => {
      const invoiceNumber = INVOICE_NUMBER[seller](line.day, placeOf[seller]);
      const id = idOf("invoice line", seller, invoiceNumber, place + 1);
      return {
        ...line,
        id,
        invoiceNumber,
        lineNumber: place + 1,
        unitPriceMinor: line.unitId === freeUnitId ? 0 : line.unitPriceMinor,
        tax: isZeroRated ? ZERO_RATED : line.account.tax,
      };
    });
  });
}
