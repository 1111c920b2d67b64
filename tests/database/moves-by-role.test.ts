import { beforeAll, describe, expect, it } from "vitest";
import { ROLES, type Role } from "@/lib/access/roles";
import { putBackClaim, takeClaim } from "@/lib/claims/judging/service";
import { CLAIM_STATES, MOVES, type ClaimMove, type ClaimState } from "@/lib/claims/lifecycle";
import { moveClaim } from "@/lib/claims/moves/service";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { appendToTimeline } from "@/lib/claims/timeline/service";
import { ok, refuse } from "@/lib/kernel/outcome";
import { actorAt } from "../support/actor";
import {
  buildAccount,
  buildClaim,
  buildDistributor,
  buildOrganisation,
  buildPerson,
  type Between,
} from "../support/build";
import { adminQuery } from "../support/database";
import { rowIn } from "./claim-rows";

const ROUNDS = 20;

let between: Between;
let assessor: { id: string; name: string };
let colleague: { id: string; name: string };
let stranger: { id: string };

beforeAll(async () => {
  const [seller, workshop] = [await buildDistributor(), await buildOrganisation()];
  stranger = await buildOrganisation({ sells: true });
  [assessor, colleague] = [await buildPerson(seller, ["assessor"]), await buildPerson(seller, ["assessor"])];
  const account = await buildAccount(seller, workshop);
  between = { seller, workshop, account, person: await buildPerson(workshop, []) };
});

type Side = "workshop" | "seller" | "stranger";
type Allowed = readonly [name: ClaimMove, side: Side | "nobody", roles: readonly Role[]];

/** Written by hand from what the product promises, not read from its table: who presses what. */
const ALLOWED: readonly Allowed[] = [
  ["file", "workshop", ["technician", "workshopManager"]],
  ["discard", "workshop", ["technician", "workshopManager"]],
  ["take", "seller", ["assessor"]],
  ["putBack", "seller", ["assessor"]],
  ["ask", "seller", ["assessor"]],
  ["answer", "workshop", ["technician", "workshopManager"]],
  ["decide", "seller", ["assessor"]],
  ["withdraw", "workshop", ["technician", "workshopManager"]],
  ["lapse", "nobody", []],
  ["contest", "workshop", ["workshopManager"]],
  ["settle", "nobody", []],
  ["reopen", "seller", ["administrator"]],
];
const SIDES: readonly Side[] = ["workshop", "seller", "stranger"];
const cells = ALLOWED.flatMap((allowed) =>
  ROLES.flatMap((role) => SIDES.map((side) => ({ allowed, role, side }))),
);

/** What the row needs for its new state. */
const changesFor = (from: ClaimState, to: ClaimState) => {
  if (from === "draft" && to === "filed")
    return {
      revision: 1,
      filedAt: new Date("2026-05-06T09:00:00Z"),
      filedOn: calendarDay("2026-05-06"),
      failedOn: calendarDay("2026-05-04"),
    };
  return to === "decided" ? { outcome: "upheld" as const, decidedAt: new Date("2026-05-12T09:00:00Z") } : {};
};

const stateOf = async (id: string) => {
  const [row] = await adminQuery<{ state: string; entries: number }>(
    `select state, (select count(*)::integer from timeline_entries t where t.claim_id = c.id) as entries
     from claims c where id = $1`,
    [id],
  );
  return [row?.state, row?.entries];
};

describe("a move", () => {
  it.each(CLAIM_STATES)("out of %s is open to its roles on its side, and to nobody else", async (state) => {
    const differences: unknown[] = [];
    for (const { allowed, role, side } of cells) {
      const [name, openSide, roles] = allowed;
      const { person } = between;
      const organisation = { workshop: between.workshop, seller: between.seller, stranger }[side];
      const held = { holder_id: state === "beingJudged" ? person.id : null };
      const claim = await buildClaim(between, { ...rowIn(state), ...held });
      const { to } = MOVES[name];
      const moved = await moveClaim(
        actorAt(organisation, person, [role]),
        { number: claim.number, move: name },
        () => ok({ changes: changesFor(state, to) }),
      );
      const isOpen =
        MOVES[name].from.some((from) => from === state) && openSide === side && roles.includes(role);
      const found = [moved.ok, ...(await stateOf(claim.id))];
      const expected = isOpen ? [true, to, 1] : [false, state, 0];
      if (String(found) !== String(expected)) differences.push({ name, role, side, found, expected });
    }
    expect(differences).toEqual([]);
    expect(cells).toHaveLength(12 * 7 * 3);
  });

  it("of a stranger is answered as for a number that does not exist", async () => {
    const claim = await buildClaim(between, rowIn("filed"));
    const actor = actorAt(stranger, between.person, ["assessor"]);
    expect(await takeClaim(actor, claim)).toEqual(await takeClaim(actor, { number: "00000000" }));
  });

  it("that only the holder may make is closed to a colleague", async () => {
    const claim = await buildClaim(between, { ...rowIn("beingJudged"), holder_id: assessor.id });
    const putBack = (person: { id: string }) =>
      putBackClaim(actorAt(between.seller, person, ["assessor"]), {
        number: claim.number,
        reason: "Not mine.",
      });
    expect(await putBack(colleague)).toMatchObject({ ok: false, code: "moveNotOpen" });
    expect(await putBack(assessor)).toMatchObject({ ok: true });
  });

  it("that hears a contested verdict is closed to who gave it", async () => {
    const claim = await buildClaim(between, { ...rowIn("contested"), decided_by_id: assessor.id });
    const take = (person: { id: string }) => takeClaim(actorAt(between.seller, person, ["assessor"]), claim);
    expect(await take(assessor)).toMatchObject({ ok: false, code: "moveNotOpen" });
    expect(await take(colleague)).toMatchObject({ ok: true });
  });

  it("refused after something was written leaves nothing of it", async () => {
    const claim = await buildClaim(between, rowIn("filed"));
    const fault = moveClaim(
      actorAt(between.seller, assessor, ["assessor"]),
      { number: claim.number, move: "take" },
      () => ok({ changes: { accountId: claim.id } }),
    );
    await expect(fault).rejects.toThrow(/foreign key/u);
    expect(await stateOf(claim.id)).toEqual(["filed", 0]);
  });

  it("whose decision writes and then says no leaves nothing of it either", async () => {
    const claim = await buildClaim(between, rowIn("filed"));
    const answer = await moveClaim(
      actorAt(between.seller, assessor, ["assessor"]),
      { number: claim.number, move: "take" },
      async (found, work) => {
        await appendToTimeline(work, found, { kind: "take" });
        return refuse("staleVersion");
      },
    );
    expect(answer).toMatchObject({ ok: false, code: "staleVersion" });
    expect(await stateOf(claim.id)).toEqual(["filed", 0]);
  });
});

describe("two assessors who take a claim at the same moment", () => {
  it("one holds it and the other is told, in each of twenty rounds", async () => {
    for (let round = 0; round < ROUNDS; round += 1) {
      const claim = await buildClaim(between, rowIn("filed"));
      const answers = await Promise.all(
        [assessor, colleague].map((person) =>
          takeClaim(actorAt(between.seller, person, ["assessor"]), claim),
        ),
      );
      expect(answers.filter((answer) => answer.ok)).toHaveLength(1);
      expect(answers.find((answer) => !answer.ok)).toMatchObject({ code: "moveNotOpen" });
      const [row] = await adminQuery<{ holder: string }>(
        "select holder_id as holder from claims where id = $1",
        [claim.id],
      );
      expect(row?.holder).toBe((answers[0]?.ok ? assessor : colleague).id);
      expect(await stateOf(claim.id)).toEqual(["beingJudged", 1]);
    }
  });
});
