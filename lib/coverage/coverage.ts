import { addDays, daysBetween, isAfter, isBefore, type CalendarDay } from "@/lib/kernel/calendar-day";
import type { Step } from "@/lib/kernel/explanation";
import { dayReasons, fileReasons, originReasons } from "./fact-reasons";
import type { CoverageFacts, TermsInForce } from "./facts";
import { filingOf } from "./filing";
import { graceAfter } from "./grace";
import { reason, type CoverageReason } from "./reasons";
import { coverageStep } from "./steps";
import { serviceOf, termOf, type Term } from "./term";

/** Whether a unit was under warranty on the day it failed, and why. */
export type Coverage = {
  /** `outside` where a reason blocks, else `open` where something is missing, else `covered`. */
  readonly answer: "covered" | "outside" | "open";
  /** The last day of cover; null where the day that starts it is not known. */
  readonly lastCoveredOn: CalendarDay | null;
  /** Days from the failure to the last covered day: 0 on that day, negative after it. */
  readonly daysLeft: number | null;
  /** The day from which months in service count for the cover fraction, and the months completed at the failure. */
  readonly serviceStartOn: CalendarDay | null;
  readonly monthsUsed: number | null;
  /** The terms whose schedule these months are for: the root's, or the unit's own where its least cover applies. */
  readonly coverTerms: TermsInForce | null;
  readonly reasons: readonly CoverageReason[];
  readonly steps: readonly Step[];
  /** Outside by the term alone, and within its grace band: a person may decide on goodwill, and says why. */
  readonly goodwillMayBeConsidered: boolean;
};

type Part = { readonly reasons: readonly CoverageReason[]; readonly steps: readonly Step[] };

/**
 * Answers from the facts alone, no clock and no look-up. A term of n months is added once from its first day (Regulation
 * (EEC, Euratom) 1182/71, Article 3); the last covered day is the day before the day so found.
 */
export function coverageOn(facts: CoverageFacts): Coverage {
  const term = termOf(facts);
  const inTerm = term === null ? NOTHING : termPart(facts, term);
  const filing = facts.terms === null ? NOTHING : filingOf(facts, facts.terms);
  const first = [...originReasons(facts), ...dayReasons(facts), ...inTerm.reasons, ...filing.reasons];
  const grace = term === null ? NOTHING : gracePart(facts, term, first);
  const reasons = [...first, ...grace.reasons, ...fileReasons(facts)];

  const service = term === null ? null : serviceOf(facts, term);
  const lastCoveredOn = term?.firstUncoveredOn ? addDays(term.firstUncoveredOn, -1) : null;
  return {
    answer: answerFrom(reasons),
    lastCoveredOn,
    daysLeft: lastCoveredOn === null ? null : daysBetween(facts.failedOn, lastCoveredOn),
    serviceStartOn: service?.startOn ?? null,
    monthsUsed: service?.monthsUsed ?? null,
    coverTerms: service?.terms ?? null,
    reasons,
    steps: [
      ...(term?.steps ?? []),
      ...inTerm.steps,
      ...(service?.steps ?? []),
      ...filing.steps,
      ...grace.steps,
    ],
    goodwillMayBeConsidered: grace.reasons.length > 0,
  };
}

const NOTHING: Part = { reasons: [], steps: [] };

function answerFrom(reasons: readonly CoverageReason[]): Coverage["answer"] {
  if (reasons.some(({ effect }) => effect === "blocks")) return "outside";
  return reasons.some(({ effect }) => effect === "opens") ? "open" : "covered";
}

/** The failure day against the term. Without a known start only one thing is sure: the day after which it is over. */
function termPart({ chain, failedOn }: CoverageFacts, term: Term): Part {
  const { startOn, firstUncoveredOn, latestEndOn } = term;
  const lastCoveredOn = addDays(firstUncoveredOn ?? latestEndOn, -1);
  const daysLeft = daysBetween(failedOn, lastCoveredOn);
  const over = { lastCoveredOn, daysOver: -daysLeft };
  const kept = chain.length > 0 ? chainReasons(failedOn, startOn) : [];
  if (firstUncoveredOn === null) {
    const known = daysLeft < 0 ? reason("termOverAtLatest", over) : reason("fittingMissing", {});
    return { reasons: [known, ...kept], steps: [] };
  }
  const steps = [
    coverageStep("lastCoveredDay", lastCoveredOn, { firstUncoveredOn }),
    coverageStep("daysLeft", String(daysLeft), { failedOn, lastCoveredOn }),
  ];
  const known = daysLeft < 0 ? reason("termOver", over) : reason("inTerm", { lastCoveredOn, daysLeft });
  return { reasons: [known, ...kept], steps };
}

function chainReasons(failedOn: CalendarDay, startOn: CalendarDay | null): readonly CoverageReason[] {
  const kept = reason("coverOfReplacement", {});
  // A unit cannot have failed before the one it stands in for was taken into use.
  if (startOn === null || !isBefore(failedOn, startOn)) return [kept];
  return [kept, reason("failureBeforeChain", { failedOn, startOn })];
}

/** Goodwill is open to a person only where nothing but the term blocks, and the failure lies in the grace band. */
function gracePart(facts: CoverageFacts, term: Term, reasons: readonly CoverageReason[]): Part {
  const blocking = reasons.filter(({ effect }) => effect === "blocks");
  const byTermAlone =
    blocking.length === 1 && blocking.every(({ code }) => code === "termOver" || code === "termOverAtLatest");
  if (!byTermAlone || facts.terms === null) return NOTHING;
  const grace = graceAfter(term, addDays(term.latestEndOn, -1), facts.terms);
  const isWithin = !isAfter(facts.failedOn, grace.lastOn);
  return {
    reasons: isWithin ? [reason("withinGrace", { graceLastOn: grace.lastOn })] : [],
    steps: grace.steps,
  };
}
