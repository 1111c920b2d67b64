import {
  addDays,
  addMonths,
  completedMonths,
  earlier,
  isBefore,
  later,
  type CalendarDay,
} from "@/lib/kernel/calendar-day";
import type { Step } from "@/lib/kernel/explanation";
import type { CoverageFacts, EarlierUnit, TermsInForce } from "./facts";
import { cited, coverageStep } from "./steps";

/**
 * A term: from `startOn` up to, not including, `firstUncoveredOn`. Where the fitting that starts it is not known, both
 * are null and only `latestEndOn` can be told: whatever the fitting day, it is over from then on.
 */
export type Term = {
  readonly startOn: CalendarDay | null;
  readonly firstUncoveredOn: CalendarDay | null;
  readonly latestEndOn: CalendarDay;
  readonly steps: readonly Step[];
};

/** The term of a unit: of its own, or, where it was supplied under a claim, what its chain leaves it. Null without terms. */
export function termOf(facts: CoverageFacts): Term | null {
  const { shipment, terms, chain, fittedOn } = facts;
  const root = chain[0];
  if (shipment === null || terms === null) return null;
  const unit = { shippedOn: shipment.shippedOn, fittedOn };
  if (root === undefined) return boughtTerm(unit, fittedOn, terms);
  if (facts.rootTerms === null) return null;
  // A root replaced before it was ever fitted has not begun its term: the first fitting of its chain begins it.
  const firstFitting = [...chain, unit].find((one) => one.fittedOn !== null)?.fittedOn ?? null;
  return withMinimum(boughtTerm(root, firstFitting, facts.rootTerms), unit, terms);
}

/**
 * The term of a bought unit: the earlier of (fitting + term) and (shipment + [shelf limit + term], added once). Without
 * a fitting, the terms say whether the shipment day starts it.
 */
function boughtTerm(
  unit: EarlierUnit,
  firstFittedOn: CalendarDay | null,
  { terms, version }: TermsInForce,
): Term {
  const { shippedOn } = unit;
  const { coverMonths, shelfLimitMonths } = terms;
  const shelfEndOn = addMonths(shippedOn, shelfLimitMonths + coverMonths);
  const shelf = cited(
    version,
    coverageStep("shelfLimit", shelfEndOn, { shippedOn, shelfLimitMonths, coverMonths }),
  );

  if (unit.fittedOn === null && terms.startsWithoutFitting === "shipment") {
    const endOn = addMonths(shippedOn, coverMonths);
    const steps = [
      cited(version, coverageStep("termFromShipment", endOn, { startOn: shippedOn, coverMonths })),
    ];
    return { startOn: shippedOn, firstUncoveredOn: endOn, latestEndOn: endOn, steps };
  }
  if (firstFittedOn === null)
    return { startOn: null, firstUncoveredOn: null, latestEndOn: shelfEndOn, steps: [shelf] };

  const termEndOn = addMonths(firstFittedOn, coverMonths);
  const endOn = earlier(termEndOn, shelfEndOn);
  const steps = [
    cited(version, coverageStep("termFromFitting", termEndOn, { startOn: firstFittedOn, coverMonths })),
    shelf,
    coverageStep("earlierEnd", endOn, { termEndOn, shelfEndOn }),
  ];
  return { startOn: firstFittedOn, firstUncoveredOn: endOn, latestEndOn: endOn, steps };
}

/** A unit supplied under a claim keeps what is left of the root's term, or the least cover of its own terms if longer. */
function withMinimum(root: Term, unit: EarlierUnit, { terms, version }: TermsInForce): Term {
  const { replacementMinimumDays } = terms;
  const startOn = unit.fittedOn ?? unit.shippedOn;
  const minimumEndOn = addDays(startOn, replacementMinimumDays);
  const minimum = cited(
    version,
    coverageStep("replacementMinimum", minimumEndOn, { startOn, replacementMinimumDays }),
  );
  const latestEndOn = later(root.latestEndOn, minimumEndOn);
  if (root.firstUncoveredOn === null) return { ...root, latestEndOn, steps: [...root.steps, minimum] };

  const remainingEndOn = root.firstUncoveredOn;
  const endOn = later(remainingEndOn, minimumEndOn);
  return {
    startOn: root.startOn,
    firstUncoveredOn: endOn,
    latestEndOn,
    steps: [...root.steps, minimum, coverageStep("laterEnd", endOn, { remainingEndOn, minimumEndOn })],
  };
}

type Service = {
  readonly startOn: CalendarDay;
  readonly monthsUsed: number;
  readonly terms: TermsInForce;
  readonly steps: readonly Step[];
};

/**
 * Months in service for the cover fraction: from the start of the term by the terms of the root; where only the least
 * cover of a replacement reaches to the failure, from the unit's own start by its own terms. So no covered day has used
 * up the full term. Null where the start is not known or the failure lies before it.
 */
export function serviceOf(facts: CoverageFacts, term: Term): Service | null {
  const { shipment, failedOn, terms, chain } = facts;
  const termTerms = chain.length === 0 ? terms : facts.rootTerms;
  if (shipment === null || terms === null || termTerms === null || term.startOn === null) return null;
  const isInTermOfRoot =
    chain.length === 0 || isBefore(failedOn, addMonths(term.startOn, termTerms.terms.coverMonths));
  const startOn = isInTermOfRoot ? term.startOn : (facts.fittedOn ?? shipment.shippedOn);
  if (isBefore(failedOn, startOn)) return null;
  const monthsUsed = completedMonths(startOn, failedOn);
  const steps = [coverageStep("monthsUsed", String(monthsUsed), { startOn, failedOn })];
  return { startOn, monthsUsed, terms: isInTermOfRoot ? termTerms : terms, steps };
}
