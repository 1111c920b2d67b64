import type { Role } from "@/lib/access/roles";
import { keysOf } from "@/lib/kernel/keys";

/*
 * Words. unit: one physical part · part: a catalogue item · family: brake, motor, ... · batch: the maker's lot ·
 * claim: what a workshop asks, with one or more lines · revision: what a claim contained when it was sent ·
 * query: a question to the workshop · verdict: the answer, bound to the revision it saw · finding: what goods-in found ·
 * move: a step from one state to another.
 */

export const CLAIM_STATES = [
  "draft",
  "filed",
  "beingJudged",
  "answerNeeded",
  "decided",
  "contested",
  "settled",
  "withdrawn",
  "lapsed",
  "discarded",
] as const;
export type ClaimState = (typeof CLAIM_STATES)[number];

export const VERDICT_OUTCOMES = ["upheld", "upheldInPart", "declined"] as const;
export type VerdictOutcome = (typeof VERDICT_OUTCOMES)[number];

export const RETURN_STATES = [
  "notNeeded",
  "awaited",
  "sent",
  "received",
  "examined",
  "disposed",
  "scrapOnSite",
  "notSentInTime",
  "missing",
] as const;
export type ReturnState = (typeof RETURN_STATES)[number];

export const CREDIT_STATES = [
  "none",
  "due",
  "noteIssued",
  "allocated",
  "paidOut",
  "replaced",
  "countered",
] as const;
export type CreditState = (typeof CREDIT_STATES)[number];

/** `system` is the clock: a lapse or a settlement that no person presses. */
type Side = "workshop" | "distributor" | "system";
type Move = { from: readonly ClaimState[]; to: ClaimState; side: Side; by: readonly Role[] };

const WORKSHOP_PEOPLE = ["technician", "workshopManager"] as const;

/** The whole life of a claim. Nothing else in the project says which state may follow which, or who moves it. */
export const MOVES = {
  file: { from: ["draft"], to: "filed", side: "workshop", by: WORKSHOP_PEOPLE },
  discard: { from: ["draft"], to: "discarded", side: "workshop", by: WORKSHOP_PEOPLE },
  take: { from: ["filed", "contested"], to: "beingJudged", side: "distributor", by: ["assessor"] },
  putBack: { from: ["beingJudged"], to: "filed", side: "distributor", by: ["assessor"] },
  ask: { from: ["beingJudged"], to: "answerNeeded", side: "distributor", by: ["assessor"] },
  answer: { from: ["answerNeeded"], to: "filed", side: "workshop", by: WORKSHOP_PEOPLE },
  decide: { from: ["beingJudged"], to: "decided", side: "distributor", by: ["assessor"] },
  withdraw: {
    from: ["filed", "beingJudged", "answerNeeded"],
    to: "withdrawn",
    side: "workshop",
    by: WORKSHOP_PEOPLE,
  },
  lapse: { from: ["answerNeeded"], to: "lapsed", side: "system", by: [] },
  contest: { from: ["decided"], to: "contested", side: "workshop", by: ["workshopManager"] },
  settle: { from: ["decided"], to: "settled", side: "system", by: [] },
  reopen: { from: ["settled"], to: "beingJudged", side: "distributor", by: ["administrator"] },
} as const satisfies Record<string, Move>;
export type ClaimMove = keyof typeof MOVES;

/** States in which a line keeps its unit to itself: while it is live, and after it was given. */
export const holdsItsUnit = (state: ClaimState, lineVerdict: VerdictOutcome | null): boolean => {
  if (state === "withdrawn" || state === "lapsed" || state === "discarded" || state === "draft") return false;
  return !(state === "settled" && lineVerdict === "declined");
};

/** Who a claim lies between, as a permission needs it. */
export type ClaimParties = {
  readonly sellerId: string;
  readonly workshopId: string;
  readonly state: ClaimState;
  readonly holderId: string | null;
  readonly decidedById: string | null;
};

type Mover = { readonly userId: string; readonly organisationId: string; readonly roles: ReadonlySet<Role> };

const sideOf = (mover: Mover, claim: ClaimParties, side: Side): boolean => {
  if (side === "workshop") return mover.organisationId === claim.workshopId;
  return side === "distributor" && mover.organisationId === claim.sellerId;
};

/** What only the person who holds a claim may do with it. */
const HOLDER_ONLY: readonly ClaimMove[] = ["putBack", "ask", "decide"];

const isOpenTo = (mover: Mover, claim: ClaimParties, name: ClaimMove): boolean => {
  const move: Move = MOVES[name];
  if (!move.from.includes(claim.state) || !sideOf(mover, claim, move.side)) return false;
  if (!move.by.some((role) => mover.roles.has(role))) return false;
  if (HOLDER_ONLY.includes(name) && claim.holderId !== mover.userId) return false;
  return !(name === "take" && gaveTheVerdict(mover, claim));
};

/** A contested verdict is heard by somebody who did not give it, also once that claim was put back or is held by another. */
export const gaveTheVerdict = (mover: Pick<Mover, "userId">, claim: ClaimParties): boolean =>
  claim.decidedById === mover.userId;

/** Draws the buttons and guards the services: one answer for both. */
export const movesOpenTo = (mover: Mover, claim: ClaimParties): ClaimMove[] =>
  keysOf(MOVES).filter((name) => isOpenTo(mover, claim, name));
