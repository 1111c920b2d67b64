import { creditedShare, type Attribution, type ReasonCode } from "@/lib/claims/verdict";
import type { VerdictOutcome } from "@/lib/claims/lifecycle";
import type { Coverage } from "@/lib/coverage/coverage";
import type { Case } from "./case";
import { isContested } from "./plots";

export type LineVerdict = {
  readonly outcome: VerdictOutcome;
  readonly attribution: Attribution;
  readonly reasonCode: ReasonCode;
};

const UPHELD: LineVerdict = {
  outcome: "upheld",
  attribution: { maker: "1/1" },
  reasonCode: "faultOfThePart",
};
const WORN: LineVerdict = {
  outcome: "upheldInPart",
  attribution: { maker: "3/4", wear: "1/4" },
  reasonCode: "partlyWorn",
};
const SHARED: LineVerdict = {
  outcome: "upheldInPart",
  attribution: { maker: "1/4", fitter: "3/4" },
  reasonCode: "sharedCause",
};
const FITTED_WRONG: LineVerdict = {
  outcome: "declined",
  attribution: { fitter: "1/1" },
  reasonCode: "fittingFault",
};
const NOTHING_SHOWN: LineVerdict = {
  outcome: "declined",
  attribution: { user: "1/1" },
  reasonCode: "noFaultShown",
};
const OUTSIDE: LineVerdict = { outcome: "declined", attribution: { wear: "1/1" }, reasonCode: "outsideTerm" };

const MONTHS_UNTIL_WORN = 11;
/** One of the gearboxes had a fault of its own beside the loose key. */
const SHARED_FITTING_DAYS_AGO = 178;

/** What the distributor decides about a line, the first time or after it was contested. Throws on shares that do not add up. */
export function verdictOn(one: Case, coverage: Coverage, round: number): LineVerdict {
  const verdict = decided(one, coverage, round);
  const share = creditedShare(verdict.outcome, verdict.attribution);
  if (!share.ok) throw new RangeError(`${one.number}: ${share.code}`);
  return verdict;
}

function decided(one: Case, { answer, monthsUsed }: Coverage, round: number): LineVerdict {
  if (answer === "outside") return OUTSIDE;
  if (one.plot === "refused" || one.plot === "settledUnproven") return NOTHING_SHOWN;
  if (isContested(one.plot)) return round === 1 ? NOTHING_SHOWN : UPHELD;
  if (one.twist === "fittingFault") return one.filedDaysAgo > SHARED_FITTING_DAYS_AGO ? SHARED : FITTED_WRONG;
  return (monthsUsed ?? 0) >= MONTHS_UNTIL_WORN && one.twist === null ? WORN : UPHELD;
}
