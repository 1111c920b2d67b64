import { beforeAll, describe, expect, it } from "vitest";
import { fileClaim } from "@/lib/claims/sending/service";
import { buildUnit } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

const SERIAL = "BR40-771-0C9";

let world: Awaited<ReturnType<typeof twoShops>>;
beforeAll(async () => {
  world = await twoShops();
  const [{ workshop, account }] = world.shops;
  await buildUnit({ seller: world.seller, buyer: workshop, account, part: world.part }, { serial: SERIAL });
});

const flagsFor = async (serial: string) => {
  const { part, shops } = world;
  const [, other] = shops;
  const claim = await draftReady(other, { partId: part.id, serial });
  expect(await fileClaim(workerOf(other), claim)).toEqual({ ok: true, value: { number: claim.number } });
  const flags = await adminQuery<{ kind: string }>("select kind from claim_flags where claim_id = $1", [
    claim.id,
  ]);
  return flags.map(({ kind }) => kind);
};

describe("a serial sold to another workshop", () => {
  it.each([
    ["as printed", "BR40-771-0C9"],
    ["small letters", "br40-771-0c9"],
    ["no dashes", "BR407710C9"],
    ["spaces", " BR40 771 0C9 "],
    ["a no-break space", "BR40\u00a07710C9"],
    ["full-width letters", "\uff22\uff32\uff14\uff10\uff0d\uff17\uff17\uff11\uff0d\uff10\uff23\uff19"],
    ["a zero-width space", "BR40\u200b7710C9"],
    ["a right-to-left mark", "BR407710C9\u200f"],
    ["a soft hyphen", "BR40\u00ad7710C9"],
    ["an en dash", "BR40\u2013771\u20130C9"],
    ["a minus sign", "BR40\u2212771\u22120C9"],
    ["a tab", "BR40\t7710C9"],
  ])("is known again with %s", async (_name, serial) => {
    expect(await flagsFor(serial)).toEqual(["soldToOther"]);
  });

  it("is not taken for one that only looks like it", async () => {
    expect(await flagsFor("BR4O-771-OC9")).toEqual(["serialUnknown"]);
  });
});
