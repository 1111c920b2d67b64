import { isAfter, isBefore } from "@/lib/kernel/calendar-day";
import type { CoverageFacts } from "./facts";
import { reason, type CoverageReason } from "./reasons";

/** Where the unit comes from, who has it, and whether another claim already had its turn. */
export function originReasons(facts: CoverageFacts): readonly CoverageReason[] {
  const { creditedUnder, heldBy } = facts;
  return [
    ...shipmentReasons(facts),
    ...(creditedUnder ? [reason("creditedInFull", { claimNumber: creditedUnder.claimNumber })] : []),
    ...(heldBy ? [reason("heldByAnotherClaim", { claimNumber: heldBy.claimNumber })] : []),
  ];
}

function shipmentReasons({
  serial,
  shipment,
  terms,
  chain,
  rootTerms,
}: CoverageFacts): readonly CoverageReason[] {
  if (shipment === null)
    return [serial === null ? reason("shipmentUnknown", {}) : reason("notShipped", { serial })];
  const { shippedOn, to } = shipment;
  if (terms === null) return [reason("termsMissing", { shippedOn })];
  const root = chain[0];
  const ofRoot = root && rootTerms === null ? [reason("termsMissing", { shippedOn: root.shippedOn })] : [];
  if (to === "claimant") return ofRoot;
  if (to === "otherSite") return [...ofRoot, reason("shippedToOtherSite", {})];
  return [...ofRoot, reason(terms.terms.transfer === "allowed" ? "transferred" : "shippedToAnother", {})];
}

/** Days that cannot be, or cannot be in this order. */
export function dayReasons({
  shipment,
  fittedOn,
  failedOn,
  todayOn,
}: CoverageFacts): readonly CoverageReason[] {
  const reasons: CoverageReason[] = [];
  const shippedOn = shipment?.shippedOn ?? null;
  if (fittedOn !== null && isBefore(failedOn, fittedOn))
    reasons.push(reason("failureBeforeFitting", { failedOn, fittedOn }));
  if (fittedOn === null && shippedOn !== null && isBefore(failedOn, shippedOn)) {
    reasons.push(reason("failureBeforeShipment", { failedOn, shippedOn }));
  }
  if (isAfter(failedOn, todayOn)) reasons.push(reason("failureInFuture", { failedOn }));
  if (fittedOn !== null && isAfter(fittedOn, todayOn)) reasons.push(reason("fittingInFuture", { fittedOn }));
  if (fittedOn !== null && shippedOn !== null && isBefore(fittedOn, shippedOn)) {
    reasons.push(reason("fittingBeforeShipment", { fittedOn, shippedOn }));
  }
  return reasons;
}

/** What the file of the claim still lacks, and what it rests on instead. */
export function fileReasons({ price, evidenceMissing }: CoverageFacts): readonly CoverageReason[] {
  const reasons: CoverageReason[] = [];
  if (price === "unknown") reasons.push(reason("priceUnknown", {}));
  if (price === "datedList") reasons.push(reason("priceFromList", {}));
  if (price === "typed") reasons.push(reason("priceTyped", {}));
  if (evidenceMissing > 0) reasons.push(reason("evidenceMissing", { missing: evidenceMissing }));
  return reasons;
}
