import { beforeAll, describe, expect, it } from "vitest";
import { ask, problemOf } from "../../support/http";
import { pdfText } from "../../support/pdf-text";
import { creditWorld, decidedClaim, issued, type CreditWorld } from "../credit-world";
import { startSession } from "../signed-in";

let world: CreditWorld;
let path: string;
beforeAll(async () => {
  world = await creditWorld();
  const number = await issued(world, await decidedClaim(world));
  path = `/api/v1/credit-notes/${number}/pdf?of=${world.seller.id}`;
});

const sessionOf = (actor: { userId: string; organisationId: string }) =>
  startSession({ id: actor.userId }, { id: actor.organisationId });

describe("the PDF of a note", () => {
  it("is given to both of its sides, and is theirs alone", async () => {
    const [mine, others] = world.managers;
    for (const reader of [world.clerk, mine]) {
      const answer = await ask("GET", path, { session: await sessionOf(reader) });
      expect([answer.status, answer.headers.get("content-type")]).toEqual([200, "application/pdf"]);
      expect(answer.headers.get("cache-control")).toContain("private");
      expect(await pdfText(new Uint8Array(await answer.arrayBuffer()))).toContain("192");
    }
    const outside = await creditWorld();
    for (const stranger of [others, outside.clerk, world.assessor]) {
      const session = await sessionOf(stranger);
      const refused = await ask("GET", path, { session });
      expect(refused.status).toBe(404);
      // Told no more than of a note that is not there.
      const nothing = await ask("GET", "/api/v1/credit-notes/CN-2026-99999/pdf", { session });
      const told = { ...(await problemOf(nothing)), instance: "" };
      expect({ ...(await problemOf(refused)), instance: "" }).toEqual(told);
    }
    expect((await ask("GET", path)).status).toBe(401);
  });

  it("is not found under what is no number", async () => {
    const session = await sessionOf(world.clerk);
    for (const name of ["%20", "x'--", "..%2f..", "CN-2026-00001%00"])
      expect((await ask("GET", `/api/v1/credit-notes/${name}/pdf?of=x`, { session })).status).toBe(404);
  });
});
