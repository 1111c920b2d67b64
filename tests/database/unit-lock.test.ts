import { beforeAll, describe, expect, it } from "vitest";
import { buildClaim, buildLine, FILED } from "../support/build";
import { adminQuery, answerOf, asRole, inTransaction } from "../support/database";
import { twoShops } from "./shops";

const HOLD = "select guarded.hold_unit($1)";
const HELD_ALREADY = "23505";

let world: Awaited<ReturnType<typeof twoShops>>;
beforeAll(async () => {
  world = await twoShops();
});

/** Two filed claims of the workshop that bought the unit, each with a line on it that does not hold it yet. */
async function twoLines() {
  const { part, sell, shops } = world;
  const [shop] = shops;
  const unit = await sell(shop);
  const lineOn = async () => {
    const claim = await buildClaim(shop, { ...FILED, state: "filed" });
    return buildLine(shop, claim, part, { unit_id: unit.id });
  };
  const context = { org: shop.workshop.id, actor: shop.person.id };
  return { context, first: await lineOn(), late: await lineOn() };
}

describe("two claims of one buyer on one unit", () => {
  it("in two transactions at once: the later one waits, is told nothing, and is flagged", async () => {
    const { context, first, late } = await twoLines();
    const { waiting } = await inTransaction("web", context, async (run) => {
      await run(HOLD, [first.id]);
      const later = answerOf(asRole("web", context, HOLD, [late.id]));
      await new Promise((resolve) => setTimeout(resolve, 200));
      return { waiting: later };
    });
    expect(await waiting).toBe("done");
    const kept = await adminQuery(
      `select l.holds_unit as holds, (select array_agg(f.kind) from claim_flags f where f.claim_id = l.claim_id) as flags
         from claim_lines l where l.id = any ($1) order by l.holds_unit desc`,
      [[first.id, late.id]],
    );
    expect(kept).toEqual([
      { holds: true, flags: null },
      { holds: false, flags: ["unitHeld"] },
    ]);
  });

  it("are kept apart by the table itself, also from the role that gives units out", async () => {
    const { first, late } = await twoLines();
    const both = asRole("keeper", {}, "update claim_lines set holds_unit = true where id = any ($1)", [
      [first.id, late.id],
    ]);
    expect(await answerOf(both)).toBe(HELD_ALREADY);
  });
});
