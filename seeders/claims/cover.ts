import { coverageOn, type Coverage } from "@/lib/coverage/coverage";
import type { EarlierUnit, TermsInForce } from "@/lib/coverage/facts";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { workingDayAgo } from "../days";
import { ORGANISATIONS } from "../story/organisations";
import { ruleOn, type Rule } from "../story/rule-book";
import type { World } from "../story/world";
import type { Case, CaseLine } from "./case";

export type Covered = { readonly coverage: Coverage; readonly terms: Rule<"terms"> | null };

/** Terms with the version that is named beside every step taken from them. */
export const citing = (terms: Rule<"terms">): TermsInForce => ({
  terms: terms.body,
  version: `${terms.ruleNumber} (${terms.validFrom})`,
});

/** Whether a line was covered, as the product tells it on the day of the verdict. */
export function coverOf(
  one: Case,
  line: CaseLine,
  { world, on }: { world: World; on: CalendarDay },
): Covered {
  const { today, ruleBook } = world;
  const shippedOn = line.sale?.day ?? null;
  const terms =
    shippedOn === null ? null : ruleOn(ruleBook, { seller: one.seller, kind: "terms", on: shippedOn });
  const chain = chainOf(one, world);
  const [root] = chain;
  const rootTerms = root ? ruleOn(ruleBook, { seller: one.seller, kind: "terms", on: root.shippedOn }) : null;
  const coverage = coverageOn({
    serial: line.serialTyped === "" ? null : line.serialTyped,
    shipment: shippedOn === null ? null : { shippedOn, to: "claimant" },
    terms: terms && citing(terms),
    chain,
    rootTerms: rootTerms && citing(rootTerms),
    fittedOn: line.fittedDaysAgo === null ? null : workingDayAgo(today, line.fittedDaysAgo),
    failedOn: workingDayAgo(today, one.failedDaysAgo),
    filing: {
      filedOn: workingDayAgo(today, one.filedDaysAgo),
      timeZone: ORGANISATIONS[one.seller].timeZone,
      lateReasonGiven: false,
    },
    todayOn: on,
    creditedUnder: null,
    heldBy: null,
    price: shippedOn === null ? "unknown" : "invoiceLine",
    evidenceMissing: 0,
  });
  return { coverage, terms };
}

function chainOf(one: Case, { chain, today }: World): EarlierUnit[] {
  if (one.twist !== "chainSecond") return [];
  const { unit, fittedDaysAgo } = chain.first;
  return [
    { shippedOn: workingDayAgo(today, unit.shippedDaysAgo), fittedOn: workingDayAgo(today, fittedDaysAgo) },
  ];
}
