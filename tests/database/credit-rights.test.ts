import { beforeAll, describe, expect, it } from "vitest";
import { allocateCredit } from "@/lib/day-book/allocating/service";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { issueCredit, issueCredits } from "@/lib/day-book/issuing/service";
import { findNote, listNotes } from "@/lib/day-book/notes/queries";
import { creditWorld, decidedClaim, issued, type CreditWorld } from "./credit-world";

let world: CreditWorld;
beforeAll(async () => {
  world = await creditWorld();
});

describe("who may issue, allocate and counter", () => {
  it("is told nothing as a stranger, and refused without the right", async () => {
    const claim = await decidedClaim(world);
    const other = await creditWorld();
    expect(await issueCredit(other.clerk, { number: claim.number, issuedBefore: 0 })).toMatchObject({
      code: "notFound",
    });
    expect(await issueCredit(world.assessor, { number: claim.number, issuedBefore: 0 })).toMatchObject({
      code: "notAllowed",
    });
    for (const manager of world.managers)
      expect(await issueCredit(manager, { number: claim.number, issuedBefore: 0 })).toMatchObject({
        code: "notAllowed",
      });
    const number = await issued(world, claim);
    const of = world.seller.id;
    const [mine, others] = world.managers;
    expect((await findNote(mine, { number, of }))?.side).toBe("workshop");
    expect(await findNote(others, { number, of })).toBeNull();
    expect(await findNote(other.clerk, { number, of })).toBeNull();
    expect(await findNote(world.assessor, { number, of })).toBeNull();
    const form = { number, how: "invoice" as const, amount: "1", reference: "x", rowsBefore: 0 };
    expect(await allocateCredit(other.clerk, form)).toMatchObject({ code: "notFound" });
    expect(await allocateCredit(mine, form)).toMatchObject({ code: "notAllowed" });
    expect(await counterCredit(other.clerk, { number, reason: "x" })).toMatchObject({ code: "notFound" });
    expect(await counterCredit(mine, { number, reason: "x" })).toMatchObject({ code: "notAllowed" });
  });

  it("may issue several at once, each on its own: one that is refused keeps no other back", async () => {
    const [good, bad] = [await decidedClaim(world), await decidedClaim(world, { outcome: "declined" })];
    const outcome = await issueCredits(world.clerk, {
      claims: [good, bad].map(({ number }) => ({ number, issuedBefore: 0 })),
    });
    expect(outcome).toMatchObject({
      ok: true,
      value: { issued: [{ number: good.number }], refused: [{ number: bad.number, code: "creditNothing" }] },
    });
  });

  it("read lists of their own notes: the distributor's desk shows what it issued, a workshop what it was given", async () => {
    const number = await issued(world, await decidedClaim(world));
    const [mine, others] = world.managers;
    const numbers = async (reader: typeof mine, isOwnOnly: boolean) =>
      (await listNotes(reader, { view: "all", isOwnOnly })).notes.map((note) => note.number);
    expect(await numbers(world.clerk, true)).toContain(number);
    expect(await numbers(mine, false)).toContain(number);
    expect(await numbers(mine, true)).toEqual([]);
    expect(await numbers(others, false)).not.toContain(number);
    expect(await numbers(world.assessor, false)).toEqual([]);
  });
});
