import type { Role } from "@/lib/access/roles";
import type { ClaimState, ReturnState } from "@/lib/claims/lifecycle";
import { isAfter, type CalendarDay } from "@/lib/kernel/calendar-day";
import { keysOf } from "@/lib/kernel/keys";

/** Who may make a move: people of one side with a role; `holder` only who holds the claim, while it is being judged. */
type PartMoveRule = {
  readonly from: readonly ReturnState[];
  readonly to: ReturnState;
  readonly side: "workshop" | "distributor";
  readonly by: readonly Role[];
  readonly holder?: true;
  /** Only once the day is over by which the part was to be sent. */
  readonly overdue?: true;
};

const WORKSHOP_PEOPLE = ["technician", "workshopManager"] as const;

/**
 * The life of the part of a claim line. Nothing else says which state may follow which, or who moves it. A part that was
 * examined may be examined again: the newest finding counts. One that was lost may still turn up.
 */
export const PART_MOVES = {
  callIn: {
    from: ["notNeeded", "notSentInTime"],
    to: "awaited",
    side: "distributor",
    by: ["assessor"],
    holder: true,
  },
  callOff: { from: ["awaited"], to: "notNeeded", side: "distributor", by: ["assessor"], holder: true },
  closeUnsent: {
    from: ["awaited"],
    to: "notSentInTime",
    side: "distributor",
    by: ["assessor"],
    holder: true,
    overdue: true,
  },
  dispatch: { from: ["awaited"], to: "sent", side: "workshop", by: WORKSHOP_PEOPLE },
  markMissing: { from: ["sent"], to: "missing", side: "distributor", by: ["assessor"], holder: true },
  receive: {
    from: ["awaited", "sent", "missing", "notSentInTime"],
    to: "received",
    side: "distributor",
    by: ["goodsIn"],
  },
  examine: { from: ["received", "examined"], to: "examined", side: "distributor", by: ["goodsIn"] },
  dispose: { from: ["examined"], to: "disposed", side: "distributor", by: ["goodsIn"] },
} as const satisfies Record<string, PartMoveRule>;
export type PartMove = keyof typeof PART_MOVES;

/** What a part is asked by a permission: who the claim lies between, where the part is, until when it was to be sent. */
export type PartStanding = {
  readonly sellerId: string;
  readonly workshopId: string;
  readonly claimState: ClaimState;
  readonly holderId: string | null;
  readonly returnState: ReturnState;
  /** Null where it was never called in. */
  readonly dueOn: CalendarDay | null;
};

type Mover = {
  readonly userId: string;
  readonly organisationId: string;
  readonly roles: ReadonlySet<Role>;
};

/** Whether this person makes such moves at all: of the right side, with a role that goes with it. */
export function makesMove(
  mover: Mover,
  parties: Pick<PartStanding, "sellerId" | "workshopId">,
  move: PartMove,
): boolean {
  const rule: PartMoveRule = PART_MOVES[move];
  const side = rule.side === "workshop" ? parties.workshopId : parties.sellerId;
  return mover.organisationId === side && rule.by.some((role) => mover.roles.has(role));
}

function isOpenTo(mover: Mover, part: PartStanding, { move, today }: { move: PartMove; today: CalendarDay }) {
  const rule: PartMoveRule = PART_MOVES[move];
  if (!rule.from.includes(part.returnState) || !makesMove(mover, part, move)) return false;
  if (rule.holder && (part.claimState !== "beingJudged" || part.holderId !== mover.userId)) return false;
  return !rule.overdue || (part.dueOn !== null && isAfter(today, part.dueOn));
}

/** Draws the buttons and guards the services: one answer for both. `today` is the mover's own day. */
export const partMovesOpenTo = (mover: Mover, part: PartStanding, today: CalendarDay): PartMove[] =>
  keysOf(PART_MOVES).filter((move) => isOpenTo(mover, part, { move, today }));

/** How each move stands in the record of the claim. */
export const PART_ENTRIES = {
  callIn: "partCalledIn",
  callOff: "partCalledOff",
  closeUnsent: "partNotSent",
  dispatch: "partSent",
  markMissing: "partMissing",
  receive: "partReceived",
  examine: "partExamined",
  dispose: "partDisposed",
} as const satisfies Record<PartMove, string>;

/** The ways a part that was called in does not come; each with its reason, from whoever holds the claim. */
export const SETTLING_MOVES = [
  "callOff",
  "closeUnsent",
  "markMissing",
] as const satisfies readonly PartMove[];
