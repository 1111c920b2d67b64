import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ROLES, type Role } from "@/lib/access/roles";
import { CLAIM_STATES, RETURN_STATES, type ReturnState } from "@/lib/claims/lifecycle";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { keysOf } from "@/lib/kernel/keys";
import { PART_MOVES, partMovesOpenTo, type PartMove } from "@/lib/returns/lifecycle";

const TODAY = calendarDay("2026-12-01");
const moves = keysOf(PART_MOVES);

const anyone = fc.record({
  userId: fc.constantFrom("ana", "ben"),
  organisationId: fc.constantFrom("seller", "workshop", "stranger"),
  roles: fc.subarray([...ROLES]).map((roles): ReadonlySet<Role> => new Set(roles)),
});
const anyPart = fc.record({
  sellerId: fc.constant("seller"),
  workshopId: fc.constant("workshop"),
  claimState: fc.constantFrom(...CLAIM_STATES),
  holderId: fc.constantFrom("ana", "ben", null),
  returnState: fc.constantFrom(...RETURN_STATES),
  dueOn: fc.option(fc.integer({ min: -3, max: 3 }).map((days) => addDays(TODAY, days))),
});
const openTo = (mover: Parameters<typeof partMovesOpenTo>[0], part: Parameters<typeof partMovesOpenTo>[1]) =>
  partMovesOpenTo(mover, part, TODAY);

/** Where a part can get to, by however many moves. */
function reachable(from: ReturnState): Set<ReturnState> {
  const seen = new Set<ReturnState>([from]);
  for (let grown = true; grown;) {
    grown = false;
    for (const move of moves) {
      const { from: starts, to } = PART_MOVES[move];
      if (!seen.has(to) && starts.some((state) => seen.has(state))) {
        seen.add(to);
        grown = true;
      }
    }
  }
  return seen;
}

describe("the moves of a part", () => {
  it("are made by nobody of a third organisation and by nobody without a role of the move", () => {
    fc.assert(
      fc.property(anyone, anyPart, (mover, part) => {
        for (const move of openTo(mover, part)) {
          const { side, by } = PART_MOVES[move];
          expect(mover.organisationId).toBe(side === "workshop" ? "workshop" : "seller");
          expect(by.some((role) => mover.roles.has(role))).toBe(true);
        }
      }),
    );
  });

  it("start where the table says, and at most one person may call a part in or give it up", () => {
    fc.assert(
      fc.property(anyone, anyPart, (mover, part) => {
        for (const move of openTo(mover, part)) {
          const froms: readonly ReturnState[] = PART_MOVES[move].from;
          expect(froms).toContain(part.returnState);
          const holders: readonly PartMove[] = ["callIn", "callOff", "closeUnsent", "markMissing"];
          if (holders.includes(move))
            expect([part.claimState, part.holderId]).toEqual(["beingJudged", mover.userId]);
        }
      }),
    );
  });

  it("close a return as not sent only after its day", () => {
    fc.assert(
      fc.property(anyone, anyPart, (mover, part) => {
        if (openTo(mover, part).includes("closeUnsent"))
          expect(part.dueOn !== null && part.dueOn < TODAY).toBe(true);
      }),
    );
    const part = {
      sellerId: "seller",
      workshopId: "workshop",
      claimState: "beingJudged",
      holderId: "ana",
      returnState: "awaited",
      dueOn: TODAY,
    } as const;
    const ana = { userId: "ana", organisationId: "seller", roles: new Set(["assessor"] as const) };
    expect(openTo(ana, part)).toEqual(["callOff"]);
    expect(openTo(ana, { ...part, dueOn: addDays(TODAY, -1) })).toEqual(["callOff", "closeUnsent"]);
  });

  it("reach every state from the first but scrapping on site, and end at the disposal", () => {
    const never: ReturnState[] = ["scrapOnSite"];
    expect([...reachable("notNeeded")].toSorted()).toEqual(
      RETURN_STATES.filter((state) => !never.includes(state)).toSorted(),
    );
    expect([...reachable("disposed")]).toEqual(["disposed"]);
  });

  it("never reach a finding past the bench: only what was received is examined, only what was examined disposed of", () => {
    expect(PART_MOVES.examine.from).toEqual(["received", "examined"]);
    expect(PART_MOVES.dispose.from).toEqual(["examined"]);
    for (const move of moves) {
      const { to, by } = PART_MOVES[move];
      if (["received", "examined", "disposed"].includes(to)) expect(by).toEqual(["goodsIn"]);
    }
  });
});
