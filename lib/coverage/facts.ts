import type { CalendarDay } from "@/lib/kernel/calendar-day";
import type { Terms } from "@/lib/rule-book/terms-shape";

/** Terms of the Rule book with the words by which their version is cited. */
export type TermsInForce = { readonly terms: Terms; readonly version: string };

/** To whom this distributor shipped the unit, seen from the organisation that claims. */
export type Recipient = "claimant" | "otherSite" | "otherOrganisation";

/** A unit that was replaced under a claim on the way to the unit in question. */
export type EarlierUnit = { readonly shippedOn: CalendarDay; readonly fittedOn: CalendarDay | null };

/** Where the price comes from; `typed` is by hand with a reason. */
export type PriceSource = "invoiceLine" | "datedList" | "typed" | "unknown";

/** All that is asked before a unit's cover is told. Days are the workshop's, save the filing day and where said. */
export type CoverageFacts = {
  /** In its normal form; null for a part without one, which stands for its invoice line. */
  readonly serial: string | null;
  /** Null where this distributor has no shipment of it. */
  readonly shipment: { readonly shippedOn: CalendarDay; readonly to: Recipient } | null;
  /** Terms of the day this unit was shipped. */
  readonly terms: TermsInForce | null;
  /** Units it stands in for under earlier claims, the one that was bought (the root) first; none for a bought unit. */
  readonly chain: readonly EarlierUnit[];
  /** Terms of the day the root was shipped; not looked at without a chain. */
  readonly rootTerms: TermsInForce | null;
  readonly fittedOn: CalendarDay | null;
  readonly failedOn: CalendarDay;
  /** The filing day in the distributor's zone, and whether a reason was given for filing late. */
  readonly filing: {
    readonly filedOn: CalendarDay;
    readonly timeZone: string;
    readonly lateReasonGiven: boolean;
  };
  readonly todayOn: CalendarDay;
  /** The claim under which it was credited in full, where that credit was not countered. */
  readonly creditedUnder: { readonly claimNumber: string; readonly ofClaimant: boolean } | null;
  /** Another claim that is live and holds the unit. */
  readonly heldBy: { readonly claimNumber: string } | null;
  readonly price: PriceSource;
  /** How many rows of the evidence list are required and not there. */
  readonly evidenceMissing: number;
};

/**
 * The facts as far as the workshop may know them: nothing tells it of another organisation's unit, claim or credit,
 * so that a serial typed at random teaches nobody anything.
 */
export const asSeenByWorkshop = (facts: CoverageFacts): CoverageFacts => ({
  ...facts,
  shipment: facts.shipment?.to === "otherOrganisation" ? null : facts.shipment,
  creditedUnder: facts.creditedUnder?.ofClaimant ? facts.creditedUnder : null,
  heldBy: null,
});
