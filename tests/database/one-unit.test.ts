import { beforeAll, describe, expect, it } from "vitest";
import { withdrawClaim } from "@/lib/claims/filing/service";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { fileClaim } from "@/lib/claims/sending/service";
import { actorAt } from "../support/actor";
import { buildClaim, buildLine, buildPerson, FILED } from "../support/build";
import { adminQuery, answerOf, asRole, inTransaction } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf, type Shop } from "./shops";

const ROUNDS = 20;

type World = Awaited<ReturnType<typeof twoShops>>;
let seller: World["seller"];
let part: World["part"];
let shops: World["shops"];
let assessor: World["assessor"];
let sell: World["sell"];

beforeAll(async () => {
  ({ seller, part, shops, assessor, sell } = await twoShops());
});

const linesOf = (claimIds: readonly string[]) =>
  adminQuery<{ claim: string; holds: boolean }>(
    "select claim_id as claim, holds_unit as holds from claim_lines where claim_id = any ($1)",
    [claimIds],
  );
const flagsOf = (claimIds: readonly string[]) =>
  adminQuery<{ claim: string; kind: string; detail: Record<string, string> }>(
    "select claim_id as claim, kind, detail from claim_flags where claim_id = any ($1) order by kind",
    [claimIds],
  );

const asText = (value: unknown): string =>
  JSON.stringify(value, (_key, inner: unknown) => (typeof inner === "bigint" ? inner.toString() : inner));

/** What a claim's sheet shows its workshop, without what is the claim's own: its numbers, ids, hashes and instants. */
async function seenBy(shop: Shop, { id, number }: { id: string; number: string }): Promise<string> {
  const sheet = asText(await findClaimSheet(workerOf(shop), number));
  const own = [
    [number, "number"],
    [`${number.slice(0, 4)}-${number.slice(4)}`, "number"],
    [id, "claim"],
  ] as const;
  return own
    .reduce((text, [word, name]) => text.replaceAll(word, name), sheet)
    .replaceAll(/[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}/gu, "id")
    .replaceAll(/[0-9a-f]{64}/gu, "sha256")
    .replaceAll(/\d{4}-\d\d-\d\dT[\d:.]+Z/gu, "instant");
}

describe("two claims on one physical unit", () => {
  it("sent at the same moment: both arrive, one holds the unit, the other is flagged to the distributor", async () => {
    const [shop] = shops;
    const second = await buildPerson(shop.workshop, ["technician"]);
    for (let round = 0; round < ROUNDS; round += 1) {
      const unit = await sell(shop);
      const line = { unitId: unit.id, serial: unit.serial };
      const claims = [await draftReady(shop, line), await draftReady(shop, line)] as const;
      const answers = await Promise.all([
        fileClaim(workerOf(shop), claims[0]),
        fileClaim(actorAt(shop.workshop, second, ["technician"]), claims[1]),
      ]);
      expect(answers).toEqual(claims.map(({ number }) => ({ ok: true, value: { number } })));
      const lines = await linesOf(claims.map(({ id }) => id));
      expect(lines).toHaveLength(2);
      expect(lines.filter(({ holds }) => holds)).toHaveLength(1);
      const holder = claims.find(({ id }) => id === lines.find(({ holds }) => holds)?.claim);
      const loser = claims.find((claim) => claim !== holder);
      expect(await flagsOf(claims.map(({ id }) => id))).toEqual([
        { claim: loser?.id, kind: "unitHeld", detail: { otherClaim: holder?.number } },
      ]);
    }
  });

  it("by two workshops: the buyer's claim holds it, the other's is flagged, and neither sees it", async () => {
    const [buyer, other] = shops;
    for (let round = 0; round < ROUNDS; round += 1) {
      const unit = await sell(buyer);
      const claims = [
        await draftReady(buyer, { unitId: unit.id, serial: unit.serial }),
        await draftReady(other, { partId: part.id, serial: unit.serial.toLowerCase() }),
      ] as const;
      const answers = await Promise.all([
        fileClaim(workerOf(buyer), claims[0]),
        fileClaim(workerOf(other), claims[1]),
      ]);
      expect(answers).toEqual(claims.map(({ number }) => ({ ok: true, value: { number } })));
      const lines = await linesOf(claims.map(({ id }) => id));
      expect(lines.filter(({ holds }) => holds).map(({ claim }) => claim)).toEqual([claims[0].id]);
      expect((await flagsOf(claims.map(({ id }) => id))).map(({ claim, kind }) => [claim, kind])).toEqual([
        [claims[1].id, "soldToOther"],
      ]);
    }
  });

  it("shows a workshop the same for a serial nobody knows and for one that was sold to somebody else", async () => {
    const [buyer, other] = shops;
    const unit = await sell(buyer);
    const foreign = await draftReady(other, { partId: part.id, serial: unit.serial });
    const unknown = await draftReady(other, { partId: part.id, serial: unit.serial });
    await fileClaim(workerOf(other), foreign);
    await adminQuery("update units set serial = null, serial_normal = null where id = $1", [unit.id]);
    await fileClaim(workerOf(other), unknown);
    const flags = await flagsOf([foreign.id, unknown.id]);
    expect(flags.map(({ claim, kind }) => [claim, kind])).toEqual([
      [unknown.id, "serialUnknown"],
      [foreign.id, "soldToOther"],
    ]);
    expect(await seenBy(other, foreign)).toBe(await seenBy(other, unknown));
  });

  it("shows the workshop the same sheet whether its claim holds the unit or came second", async () => {
    const [shop] = shops;
    const unit = await sell(shop);
    const line = { unitId: unit.id, serial: unit.serial };
    const [held, late] = [await draftReady(shop, line), await draftReady(shop, line)];
    await fileClaim(workerOf(shop), held);
    await fileClaim(workerOf(shop), late);
    expect(await seenBy(shop, held)).toBe(await seenBy(shop, late));
    const sheet = asText(await findClaimSheet(actorAt(seller, assessor, ["assessor"]), late.number));
    expect(sheet).toContain("unitHeld");
  });

  it("tells the flag to the distributor alone", async () => {
    const [shop] = shops;
    const unit = await sell(shop);
    const line = { unitId: unit.id, serial: unit.serial };
    const claims = [await draftReady(shop, line), await draftReady(shop, line)];
    for (const claim of claims) await fileClaim(workerOf(shop), claim);
    const sql = "select kind from claim_flags where claim_id = any ($1)";
    const ids = claims.map(({ id }) => id);
    const read = (org: string, actor: string) => asRole("web", { org, actor }, sql, [ids]);
    expect(await read(seller.id, assessor.id)).toEqual([{ kind: "unitHeld" }]);
    expect(await read(shop.workshop.id, shop.person.id)).toEqual([]);
    expect(await read(shops[1].workshop.id, shops[1].person.id)).toEqual([]);
  });

  it("lets go of the unit when a claim is withdrawn, so that the next one holds it", async () => {
    const [shop] = shops;
    const unit = await sell(shop);
    const line = { unitId: unit.id, serial: unit.serial };
    const [first, next] = [await draftReady(shop, line), await draftReady(shop, line)];
    await fileClaim(workerOf(shop), first);
    await withdrawClaim(workerOf(shop), { number: first.number, reason: "It was the fuse." });
    await fileClaim(workerOf(shop), next);
    expect((await linesOf([next.id]))[0]?.holds).toBe(true);
    expect(await flagsOf([first.id, next.id])).toEqual([]);
  });

  it("cannot both hold it by SQL: guarded.hold_unit answers both alike and gives it to one", async () => {
    const [one, two] = shops;
    for (let round = 0; round < ROUNDS; round += 1) {
      const unit = await sell(one);
      const claimed = await Promise.all(
        [one, two].map(async (shop) => {
          const claim = await buildClaim(shop, { ...FILED, state: "filed" });
          return { shop, claim, line: await buildLine(shop, claim, part, { unit_id: unit.id }) };
        }),
      );
      const answers = await Promise.all(
        claimed.map(({ shop, line }) =>
          asRole("web", { org: shop.workshop.id, actor: shop.person.id }, "select guarded.hold_unit($1)", [
            line.id,
          ]),
        ),
      );
      expect(answers).toEqual([[{ hold_unit: "" }], [{ hold_unit: "" }]]);
      const lines = await linesOf(claimed.map(({ claim }) => claim.id));
      expect(lines.filter(({ holds }) => holds)).toHaveLength(1);
    }
  });

  it("web takes a unit through guarded.hold_unit alone, and only for its own line", async () => {
    const [one, two] = shops;
    const unit = await sell(one);
    const claim = await buildClaim(one, { ...FILED, state: "filed" });
    const line = await buildLine(one, claim, part, { unit_id: unit.id });
    const context = { org: one.workshop.id, actor: one.person.id };
    const take = asRole("web", context, "update claim_lines set holds_unit = true where id = $1", [line.id]);
    expect(await answerOf(take)).toBe("PP003");
    await asRole("web", { org: two.workshop.id, actor: two.person.id }, "select guarded.hold_unit($1)", [
      line.id,
    ]);
    expect((await linesOf([claim.id]))[0]?.holds).toBe(false);
    await asRole("web", context, "select guarded.hold_unit($1)", [line.id]);
    expect((await linesOf([claim.id]))[0]?.holds).toBe(true);
    const repoint = inTransaction("web", context, (run) =>
      run("update claim_lines set unit_id = $2 where id = $1", [line.id, unit.id]).then(() =>
        run("update claim_lines set line_number = 3 where id = $1", [line.id]),
      ),
    );
    expect(await answerOf(repoint)).toBe("PP003");
  });
});
