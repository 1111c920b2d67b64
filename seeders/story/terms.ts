import type { Terms } from "@/lib/rule-book/terms-shape";
import type { SellerKey } from "./organisations";

const CAPS = { diagnosisMinor: 3000, consumablesMinor: 1500, carriageMinor: 1200, claimMinor: null };

const LARKMOOR_FIRST: Terms = {
  coverMonths: 18,
  shelfLimitMonths: 6,
  startsWithoutFitting: "shipment",
  transfer: "refused",
  coverFraction: { kind: "straightLine" },
  filingLimitDays: 30,
  lateFiling: { policy: "refuse" },
  replacementMinimumDays: 90,
  grace: { kind: "days", days: 30 },
  contestDays: 14,
  queryLapseDays: 21,
  currency: "GBP",
  labour: { months: 6, standardMinutes: 60, hourlyRateMinor: 4200 },
  caps: CAPS,
};

const LARKMOOR_NOW: Terms = {
  ...LARKMOOR_FIRST,
  coverMonths: 24,
  coverFraction: {
    kind: "step",
    steps: [
      { fromMonth: 0, fraction: "1" },
      { fromMonth: 12, fraction: "3/4" },
      { fromMonth: 18, fraction: "1/2" },
    ],
  },
  filingLimitDays: 45,
  lateFiling: { policy: "reduce", fraction: "1/2" },
  contestDays: 21,
  queryLapseDays: 30,
  labour: { months: 12, standardMinutes: 75, hourlyRateMinor: 4800 },
};

const FENWRIGHT_FIRST: Terms = {
  ...LARKMOOR_FIRST,
  coverMonths: 24,
  coverFraction: { kind: "full" },
  filingLimitDays: 60,
  lateFiling: { policy: "accept" },
  grace: { kind: "fractionOfTerm", fraction: "1/12" },
  contestDays: 14,
  queryLapseDays: 30,
  currency: "EUR",
  labour: null,
};

const FENWRIGHT_NOW: Terms = {
  ...FENWRIGHT_FIRST,
  labour: { months: 6, standardMinutes: 60, hourlyRateMinor: 5400 },
  contestDays: 28,
};

/** Each distributor's terms: the first edition, and the one that took its place. */
export const TERMS: Readonly<Record<SellerKey, readonly [before: Terms, now: Terms]>> = {
  larkmoor: [LARKMOOR_FIRST, LARKMOOR_NOW],
  fenwright: [FENWRIGHT_FIRST, FENWRIGHT_NOW],
};
