import { beforeAll, describe, expect, it } from "vitest";
import { draftChange } from "@/lib/claims/draft-shape";
import { frozenText } from "@/lib/credits/frozen-credit-shape";
import { decideClaim } from "@/lib/claims/deciding/service";
import { addLine, saveDraft } from "@/lib/claims/filing/service";
import { parkClaim, putBackClaim, takeClaim, takeOverClaim } from "@/lib/claims/judging/service";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { fileClaim } from "@/lib/claims/sending/service";
import { actorAt } from "../support/actor";
import { buildClaim, buildPerson, buildUnit } from "../support/build";
import { adminQuery } from "../support/database";
import { rowIn } from "./claim-rows";
import { draftReady } from "./draft-ready";
import { twoShops, workerOf, type Shop } from "./shops";

let world: Awaited<ReturnType<typeof twoShops>>;
let colleague: { id: string; name: string };
beforeAll(async () => {
  world = await twoShops();
  colleague = await buildPerson(world.seller, ["assessor"]);
});

const judge = (person: { id: string; name: string }) => actorAt(world.seller, person, ["assessor"]);
const claimIn = (shop: Shop, over: Record<string, unknown>) => buildClaim(shop, over);

/** A claim of the first workshop as sent, held by the assessor. */
async function taken(line: Parameters<typeof draftReady>[1]) {
  const [shop] = world.shops;
  const claim = await draftReady(shop, line);
  expect(await fileClaim(workerOf(shop), claim)).toMatchObject({ ok: true });
  expect(await takeClaim(judge(world.assessor), claim)).toMatchObject({ ok: true });
  return claim;
}

describe("what the workshop reads of its claim", () => {
  it("names no claim and no unit of another workshop in the cover of a verdict", async () => {
    const [shop, other] = world.shops;
    const sold = await world.sell(other);
    const first = await draftReady(other, { unitId: sold.id, serial: sold.serial });
    expect(await fileClaim(workerOf(other), first)).toMatchObject({ ok: true });
    const claim = await taken({ serial: sold.serial, partId: world.part.id });
    const sheet = await findClaimSheet(judge(world.assessor), claim.number);
    expect(JSON.stringify(sheet?.lines[0]?.coverage)).toContain("heldByAnotherClaim");
    const decided = await decideClaim(judge(world.assessor), {
      number: claim.number,
      revision: 1,
      lines: [
        {
          lineId: sheet?.lines[0]?.lineId ?? "",
          outcome: "declined",
          shares: { maker: "", carrier: "", fitter: "", user: "1", wear: "" },
          reasonCode: "notSuppliedByUs",
          reason: "We have no sale of this serial to you.",
        },
      ],
      letter: "We cannot credit this claim.",
      returnWaivedReason: "Nothing to examine.",
    });
    expect(decided).toMatchObject({ ok: true });
    const seen = frozenText((await findClaimSheet(workerOf(shop), claim.number))?.verdicts);
    for (const word of ["heldByAnotherClaim", "shippedToAnother", "transferred", first.number.slice(4)])
      expect(seen).not.toContain(word);
  });

  it("has neither who took it nor why it was put back", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await taken({ unitId: unit.id, serial: unit.serial });
    const reason = "The manager knows these people.";
    expect(await putBackClaim(judge(world.assessor), { number: claim.number, reason })).toMatchObject({
      ok: true,
    });
    const seen = JSON.stringify((await findClaimSheet(workerOf(shop), claim.number))?.timeline);
    expect(seen).not.toContain(reason);
    expect(seen).not.toContain(world.assessor.name);
    expect(JSON.stringify((await findClaimSheet(judge(colleague), claim.number))?.timeline)).toContain(
      reason,
    );
  });
});

describe("a contested verdict", () => {
  const decidedBy = () => ({ decided_by_id: world.assessor.id });

  it("is not taken over by who gave it from the colleague who hears it", async () => {
    const [shop] = world.shops;
    const held = { ...rowIn("beingJudged"), ...decidedBy(), holder_id: colleague.id };
    const claim = await claimIn(shop, held);
    expect(await takeOverClaim(judge(world.assessor), claim)).toMatchObject({ code: "moveNotOpen" });
    const third = await buildPerson(world.seller, ["assessor"]);
    expect(await takeOverClaim(judge(third), claim)).toMatchObject({ ok: true });
  });

  it("stays closed to who gave it after it was put back", async () => {
    const [shop] = world.shops;
    const claim = await claimIn(shop, { ...rowIn("filed"), ...decidedBy() });
    expect(await takeClaim(judge(world.assessor), claim)).toMatchObject({ code: "moveNotOpen" });
    expect(await takeClaim(judge(colleague), claim)).toMatchObject({ ok: true });
  });
});

describe("a question to a colleague", () => {
  it("is left by the holder alone, and with nobody whose access has ended", async () => {
    const [shop] = world.shops;
    const gone = await buildPerson(world.seller, ["assessor"]);
    await adminQuery("update memberships set disabled_at = now() where user_id = $1", [gone.id]);
    const { number } = await claimIn(shop, { ...rowIn("beingJudged"), holder_id: world.assessor.id });
    const ask = { number, question: "Have you seen this pad?" };
    expect(await parkClaim(judge(world.assessor), { ...ask, colleagueId: gone.id })).toMatchObject({
      code: "notFound",
    });
    expect(await parkClaim(judge(colleague), { ...ask, colleagueId: world.assessor.id })).toMatchObject({
      code: "moveNotOpen",
    });
    expect(await parkClaim(judge(world.assessor), { ...ask, colleagueId: colleague.id })).toMatchObject({
      ok: true,
    });
  });
});

describe("a draft", () => {
  it("takes no name that could not be kept", () => {
    for (const name of ["a\u0000b", "", "a.b", "x".repeat(61)])
      for (const map of ["answers", "cannotGet", "ruledOut"])
        expect(draftChange.safeParse({ [map]: { [name]: "x" } }).success).toBe(false);
    expect(draftChange.safeParse({ answers: { userWeight: "82 kg" } }).success).toBe(true);
  });

  it("does not grow without end, however often rows nobody asked for are sent", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial });
    for (let round = 0; round < 3; round += 1) {
      const answers = Object.fromEntries(
        Array.from({ length: 90 }, (_one, at) => [`row${round}x${at}`, "x".repeat(1000)]),
      );
      expect(await saveDraft(workerOf(shop), claim.number, { answers })).toMatchObject({ ok: true });
    }
    const [kept] = await adminQuery<{ bytes: number }>(
      "select length(body::text) as bytes from claim_drafts where claim_id = $1",
      [claim.id],
    );
    expect(kept?.bytes).toBeLessThan(120_000);
  });

  it("of one unit asks for the price of one, whatever number is sent", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial, quantity: "99999" });
    expect(await fileClaim(workerOf(shop), claim)).toMatchObject({ ok: true });
    const asked = await adminQuery("select asked_minor from claims where id = $1", [claim.id]);
    expect(asked).toEqual([{ asked_minor: "18450" }]);
  });

  it("answers an id that is none like a unit of somebody else", async () => {
    const [shop, other] = world.shops;
    const own = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: own.id, serial: own.serial });
    const foreign = await buildUnit({
      seller: world.seller,
      buyer: other.workshop,
      account: other.account,
      part: world.part,
    });
    const add = (id: string) => addLine(workerOf(shop), claim.number, id);
    expect(await add("'; select 1 --")).toEqual(await add(foreign.id));
    expect(await add(foreign.id)).toMatchObject({ ok: false, code: "notFound" });
  });
});

describe("the same step sent twenty times at once", () => {
  const TIMES = 20;
  const oks = (answers: readonly { ok: boolean }[]) => answers.filter(({ ok }) => ok).length;

  it("files a claim once: one revision, one line, one mail each", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await draftReady(shop, { unitId: unit.id, serial: unit.serial });
    const sent = Array.from({ length: TIMES }, () => fileClaim(workerOf(shop), claim));
    expect(oks(await Promise.all(sent))).toBe(1);
    const [kept] = await adminQuery(
      `select (select count(*)::int from claim_revisions where claim_id = $1) as revisions,
         (select count(*)::int from claim_lines where claim_id = $1) as lines,
         (select count(*)::int from timeline_entries where claim_id = $1) as entries,
         (select count(*)::int from outbox where dedupe_key like 'claimFiled:' || $1 || '%') as mails`,
      [claim.id],
    );
    expect(kept).toEqual({ revisions: 1, lines: 1, entries: 1, mails: 1 });
  });

  it("gives one verdict, and none on a revision that is not the newest", async () => {
    const [shop] = world.shops;
    const unit = await world.sell(shop);
    const claim = await taken({ unitId: unit.id, serial: unit.serial });
    const [line] = await adminQuery<{ id: string }>("select id from claim_lines where claim_id = $1", [
      claim.id,
    ]);
    const verdict = (revision: number, person: { id: string; name: string } = world.assessor) =>
      decideClaim(judge(person), {
        number: claim.number,
        revision,
        lines: [
          {
            lineId: line?.id ?? "",
            outcome: "declined",
            shares: { maker: "", carrier: "", fitter: "1", user: "", wear: "" },
            reasonCode: "fittingFault",
            reason: "The hub nut was not tightened.",
          },
        ],
        letter: "We cannot credit this claim.",
        returnWaivedReason: "Nothing to examine.",
      });
    await adminQuery(
      `insert into claim_revisions (claim_id, seller_id, workshop_id, revision, facts, sha256, sent_by_id)
         select claim_id, seller_id, workshop_id, 2, facts, sha256, sent_by_id from claim_revisions where claim_id = $1`,
      [claim.id],
    );
    await adminQuery("update claims set revision = 2 where id = $1", [claim.id]);
    expect(await verdict(1)).toMatchObject({ code: "staleVersion" });
    expect(await verdict(0)).toMatchObject({ code: "staleVersion" });
    expect(await verdict(3)).toMatchObject({ code: "staleVersion" });
    expect(await verdict(2, colleague)).toMatchObject({ code: "moveNotOpen" });
    expect(oks(await Promise.all(Array.from({ length: TIMES }, () => verdict(2))))).toBe(1);
    const verdicts = await adminQuery("select 1 from verdicts where claim_id = $1", [claim.id]);
    expect(verdicts).toHaveLength(1);
  });
});
