import { calendarDay } from "@/lib/kernel/calendar-day";
import type { CoverageFacts, TermsInForce } from "@/lib/coverage/facts";
import type { Terms } from "@/lib/rule-book/terms-shape";
import { bodies } from "../rule-book/bodies";

export const day = calendarDay;

/** Terms with changes: 24 months of cover, 6 of shelf, 30 days to file, 90 days least cover, 14 days of grace. */
export const termsWith = (change: Partial<Terms> = {}, version = "Rule 4, 1 January 2025"): TermsInForce => ({
  terms: { ...bodies.terms, ...change },
  version,
});

/** Shipped to the claimant, fitted 15 January 2026, failed and filed within days; nothing missing. */
export const factsWith = (change: Partial<CoverageFacts> = {}): CoverageFacts => ({
  serial: "B0O81LI7QG96",
  shipment: { shippedOn: day("2025-12-01"), to: "claimant" },
  terms: termsWith(),
  chain: [],
  rootTerms: null,
  fittedOn: day("2026-01-15"),
  failedOn: day("2026-09-20"),
  filing: { filedOn: day("2026-09-25"), timeZone: "Europe/Vienna", lateReasonGiven: false },
  todayOn: day("2026-09-25"),
  creditedUnder: null,
  heldBy: null,
  price: "invoiceLine",
  evidenceMissing: 0,
  ...change,
});

/** A failure filed the same day. */
export const failed = (on: string): Partial<CoverageFacts> => ({
  failedOn: day(on),
  todayOn: day(on),
  filing: { filedOn: day(on), timeZone: "Europe/Vienna", lateReasonGiven: false },
});
