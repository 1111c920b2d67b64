import { daysBetween, type CalendarDay } from "@/lib/kernel/calendar-day";

/** Ages of open claims in days since they were sent; the last has no end. */
export const AGE_BANDS = [
  { code: "week", fromDays: 0, toDays: 7 },
  { code: "month", fromDays: 8, toDays: 30 },
  { code: "twoMonths", fromDays: 31, toDays: 60 },
  { code: "older", fromDays: 61, toDays: null },
] as const;

export type AgeBand = (typeof AGE_BANDS)[number]["code"];
export type OpenClaim = { readonly filedOn: CalendarDay };

/** How many open claims are of which age, and for how many days they have waited, together and at most. */
export type Ages = {
  readonly bands: readonly { readonly code: AgeBand; readonly count: number }[];
  readonly openDays: number;
  readonly oldestDays: number;
};

/** Puts every open claim into exactly one band, by whole days from its sending to today. */
export function agesOf(claims: readonly OpenClaim[], today: CalendarDay): Ages {
  const ages = claims.map(({ filedOn }) => Math.max(0, daysBetween(filedOn, today)));
  const inBand = (from: number, to: number | null) =>
    ages.filter((days) => days >= from && (to === null || days <= to)).length;
  return {
    bands: AGE_BANDS.map(({ code, fromDays, toDays }) => ({ code, count: inBand(fromDays, toDays) })),
    openDays: ages.reduce((sum, days) => sum + days, 0),
    oldestDays: Math.max(0, ...ages),
  };
}

export type Sum = { readonly currency: string; readonly minor: bigint };

/** Amounts added up by currency, in the order of their codes: nothing is converted by itself. */
export function sumsByCurrency(amounts: readonly Sum[]): readonly Sum[] {
  const sums = new Map<string, bigint>();
  for (const { currency, minor } of amounts) sums.set(currency, (sums.get(currency) ?? 0n) + minor);
  return [...sums]
    .toSorted(([a], [b]) => (a < b ? -1 : 1))
    .flatMap(([currency, minor]) => (minor === 0n ? [] : [{ currency, minor }]));
}
