import {
  addFractions,
  compareFractions,
  equalFractions,
  ONE,
  parseFraction,
  sumsToOne,
  ZERO,
  type Fraction,
} from "@/lib/kernel/fraction";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { VerdictOutcome } from "./lifecycle";

/** Whose doing a failure was. The shares of a line add to one. */
export const CAUSES = ["maker", "carrier", "fitter", "user", "wear"] as const;
export type Cause = (typeof CAUSES)[number];

/** Causes the distributor answers for: the part as made, and the way to the workshop. */
const CREDITED_CAUSES: readonly Cause[] = ["maker", "carrier"];

/** Exact shares as text, for example `{ maker: "3/4", wear: "1/4" }`; a cause left out has none. */
export type Attribution = Readonly<Partial<Record<Cause, string>>>;

/** Why a line was decided as it was; each has a sentence in `messages/en/verdicts.json and messages/de/verdicts.json`. */
export const REASONS = {
  upheld: ["faultOfThePart", "damagedOnTheWay", "goodwill"],
  upheldInPart: ["sharedCause", "partlyWorn", "reducedForLateFiling"],
  declined: [
    "outsideTerm",
    "fittingFault",
    "useOutsideLimits",
    "ordinaryWear",
    "openedBefore",
    "noFaultShown",
    "filedTooLate",
    "notSuppliedByUs",
    "alreadyCredited",
  ],
} as const satisfies Record<VerdictOutcome, readonly string[]>;

export type ReasonCode = (typeof REASONS)[VerdictOutcome][number];

const shareOf = (attribution: Attribution, causes: readonly Cause[]): Fraction | null => {
  let sum: Fraction = ZERO;
  for (const cause of causes) {
    const share = parseFraction(attribution[cause] ?? "0");
    if (!share || compareFractions(share, ZERO) < 0) return null;
    sum = addFractions(sum, share);
  }
  return sum;
};

/**
 * Checks one line's answer: shares add to one; upheld means that all of it is credited, in part means some of it.
 * A line may be declined whatever its cause (outside the term, say). Returns the credited share as an exact fraction.
 */
export function creditedShare(
  outcome: VerdictOutcome,
  attribution: Attribution,
): Outcome<Fraction, "sharesUnread" | "sharesNotOne" | "upheldNotWhole" | "partNotShared"> {
  const shares = CAUSES.map((cause) => parseFraction(attribution[cause] ?? "0"));
  const credited = shareOf(attribution, CREDITED_CAUSES);
  if (!credited || shares.some((share) => share === null || compareFractions(share, ZERO) < 0))
    return refuse("sharesUnread");
  if (!sumsToOne(shares.filter((share) => share !== null))) return refuse("sharesNotOne");
  if (outcome === "declined") return ok(ZERO);
  const whole = equalFractions(credited, ONE);
  if (outcome === "upheld") return whole ? ok(credited) : refuse("upheldNotWhole");
  return whole || equalFractions(credited, ZERO) ? refuse("partNotShared") : ok(credited);
}

/** The verdict of a claim from those of its lines: alike, it is theirs; mixed, it is upheld in part. */
export function outcomeOfLines(outcomes: readonly VerdictOutcome[]): VerdictOutcome {
  const [first, ...others] = outcomes;
  if (!first) throw new RangeError("a claim has at least one line");
  return others.every((outcome) => outcome === first) ? first : "upheldInPart";
}
