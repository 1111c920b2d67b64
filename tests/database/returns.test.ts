import { beforeAll, describe, expect, it } from "vitest";
import { findClaimSheet } from "@/lib/claims/reading/queries";
import { askWorkshop, putBackClaim } from "@/lib/claims/judging/service";
import { settleReturn } from "@/lib/returns/calling-service";
import { findCallIn } from "@/lib/returns/call-in-queries";
import { findReturn, listReturnsOfClaim } from "@/lib/returns/card-queries";
import { findForLabel } from "@/lib/returns/label-queries";
import { letterFor } from "@/lib/mail/letter";
import { actorAt } from "../support/actor";
import { buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import {
  assessor,
  callIn,
  calledIn,
  goodsIn,
  heldClaim,
  kindsOf,
  mailsOf,
  openReturnWorld,
  otherTechnician,
  receive,
  send,
  stateOf,
  technician,
  world,
} from "./returned-parts";

beforeAll(openReturnWorld);

const dayPast = (number: string) =>
  adminQuery("update part_returns set due_on = current_date - 3 where number = $1", [number]);
const clockOf = async (claimId: string) => {
  const [row] = await adminQuery<{ stopped: Date | null; minutes: number; due: Date; state: string }>(
    "select clock_stopped_at as stopped, clock_stopped_minutes as minutes, answer_due_at as due, state from claims where id = $1",
    [claimId],
  );
  if (!row) throw new Error("no such claim");
  return row;
};

describe("calling a part in", () => {
  it("writes the return, moves the line, tells the workshop, and leaves the claim being judged", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(number).toMatch(/^\d{9}$/);
    expect(await stateOf(claim)).toBe("awaited");
    expect(await kindsOf(claim)).toEqual(["partCalledIn"]);
    expect((await clockOf(claim.id)).state).toBe("beingJudged");
    const [view] = await listReturnsOfClaim(technician(), claim.number);
    expect(view).toMatchObject({
      number,
      side: "workshop",
      sendTo: "Goods-in, Harbour Road 12",
      sentAt: null,
    });
    expect(view?.lines[0]?.moves).toEqual(["dispatch"]);
    const [mail] = await mailsOf(claim, "partCalledIn");
    const written = await letterFor("partCalledIn", { ...mail?.params, name: "Robin" }, "de");
    expect(written.subject).toContain(`R${number.slice(0, 3)}-`);
    expect(written.text).toContain("Harbour Road 12");
    expect(written.text).toContain("15. Dezember 2099");
  });

  it("is open to who holds the claim alone, and to nobody of another organisation", async () => {
    const claim = await heldClaim();
    const colleague = actorAt(world.seller, await buildPerson(world.seller, ["assessor"]), ["assessor"]);
    expect(await findCallIn(assessor(), claim.number)).toMatchObject({ lines: [{ lineNumber: 1 }] });
    for (const actor of [colleague, goodsIn(), technician(), otherTechnician()])
      expect(await findCallIn(actor, claim.number)).toBeNull();
    expect(await putBackClaim(assessor(), { number: claim.number, reason: "Later." })).toMatchObject({
      ok: true,
    });
    expect(await callIn(claim)).toMatchObject({ ok: false, code: "moveNotOpen" });
  });

  it("refuses a day that is over or cannot be read, a line of another claim, and a line already called in", async () => {
    const claim = await heldClaim();
    const other = await heldClaim();
    expect(await callIn(claim, { dueOn: "yesterday" })).toMatchObject({ code: "dayPast", field: "dueOn" });
    expect(await callIn(claim, { dueOn: "soon" })).toMatchObject({ code: "dayUnread", field: "dueOn" });
    expect(await callIn(claim, { lineIds: other.lineIds })).toMatchObject({ code: "notFound" });
    expect(await stateOf(claim)).toBe("notNeeded");
    await calledIn(claim);
    await adminQuery("update part_returns set called_in_at = now() - interval '1 hour' where claim_id = $1", [
      claim.id,
    ]);
    expect(await callIn(claim)).toMatchObject({ code: "moveNotOpen" });
  });

  it("pressed twice, or twice at once, opens one return", async () => {
    const claim = await heldClaim();
    const answers = await Promise.all([callIn(claim), callIn(claim), callIn(claim)]);
    const numbers = new Set(answers.map((answer) => (answer.ok ? answer.value.number : answer.code)));
    expect(numbers.size).toBe(1);
    expect(await adminQuery("select 1 from part_returns where claim_id = $1", [claim.id])).toHaveLength(1);
    expect(await kindsOf(claim)).toEqual(["partCalledIn"]);
  });

  it("makes the distributor's clock stand until the part is sent, and the answer due later by as long", async () => {
    const claim = await heldClaim();
    await adminQuery("update claims set answer_due_at = '2099-01-01T12:00:00Z' where id = $1", [claim.id]);
    const number = await calledIn(claim);
    expect((await clockOf(claim.id)).stopped).not.toBeNull();
    await adminQuery("update claims set clock_stopped_at = now() - interval '90 minutes' where id = $1", [
      claim.id,
    ]);
    expect(await send(number)).toMatchObject({ ok: true });
    const after = await clockOf(claim.id);
    expect(after).toMatchObject({ stopped: null, minutes: 90 });
    expect(after.due).toEqual(new Date("2099-01-01T13:30:00Z"));
  });

  it("keeps the clock standing while a query is open, although the part is on its way", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    const asked = { number: claim.number, question: "Which gap?", rowIds: [] };
    expect(await askWorkshop(assessor(), asked)).toMatchObject({ ok: true });
    expect(await send(number)).toMatchObject({ ok: true });
    expect((await clockOf(claim.id)).stopped).not.toBeNull();
  });
});

describe("sending a part", () => {
  it("is noted by the workshop of the claim alone", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(await send(number, otherTechnician())).toMatchObject({ code: "notFound" });
    for (const actor of [assessor(), goodsIn()])
      expect(await send(number, actor)).toMatchObject({ code: "moveNotOpen" });
    expect(await send(number)).toMatchObject({ ok: true });
    expect(await findReturn(goodsIn(), number)).toMatchObject({
      carrier: "Northern Parcel",
      trackingNumber: "NP 1",
      lines: [{ state: "sent" }],
    });
  });

  it("pressed twice is one entry", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(await Promise.all([send(number), send(number)])).toMatchObject([{ ok: true }, { ok: true }]);
    expect(await kindsOf(claim)).toEqual(["partCalledIn", "partSent"]);
  });
});

describe("a part that does not come", () => {
  it("can be called off, and called in anew under another number", async () => {
    const claim = await heldClaim();
    const first = await calledIn(claim);
    const off = { number: first, move: "callOff", why: "The log is enough." } as const;
    expect(await settleReturn(technician(), off)).toMatchObject({ code: "moveNotOpen" });
    expect(await settleReturn(assessor(), off)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("notNeeded");
    expect((await clockOf(claim.id)).stopped).toBeNull();
    await adminQuery("update part_returns set called_in_at = now() - interval '1 hour' where claim_id = $1", [
      claim.id,
    ]);
    const second = await calledIn(claim);
    expect(second).not.toBe(first);
    expect((await listReturnsOfClaim(technician(), claim.number)).map(({ number }) => number)).toEqual([
      second,
    ]);
    expect(await send(first)).toMatchObject({ code: "notFound" });
  });

  it("counts as not sent in time only once its day is over", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    const close = { number, move: "closeUnsent", why: "Nothing came." } as const;
    expect(await settleReturn(assessor(), close)).toMatchObject({ code: "moveNotOpen" });
    await dayPast(number);
    expect(await settleReturn(assessor(), close)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("notSentInTime");
  });

  it("is missing only after it was sent, with a reason both sides read, and may still turn up", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    const lost = { number, move: "markMissing", why: "Proof of dispatch NP 1 shown." } as const;
    expect(await settleReturn(assessor(), lost)).toMatchObject({ code: "moveNotOpen" });
    await send(number);
    expect(await settleReturn(assessor(), lost)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("missing");
    const sheet = await findClaimSheet(technician(), claim.number);
    expect(sheet?.timeline.at(-1)).toMatchObject({ kind: "partMissing", detail: { reason: lost.why } });
    expect(await receive(number, claim)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("received");
  });
});

describe("a return label", () => {
  it("is for the two parties alone", async () => {
    const number = await calledIn(await heldClaim());
    for (const actor of [technician(), goodsIn()])
      expect(await findForLabel(actor, { number, cells: undefined })).toMatchObject({ ok: true });
    expect(await findForLabel(otherTechnician(), { number, cells: undefined })).toMatchObject({
      code: "notFound",
    });
    expect(await findForLabel(technician(), { number: "", cells: undefined })).toMatchObject({
      code: "notFound",
    });
  });

  it("of a battery is given once somebody looked, and never to one that is not sound", async () => {
    const number = await calledIn(await heldClaim({ symptom: "shortRange" }, "battery"));
    expect(await findForLabel(technician(), { number, cells: undefined })).toMatchObject({
      code: "labelNeedsAnswer",
    });
    expect(await findForLabel(technician(), { number, cells: "unsafe" })).toMatchObject({
      code: "labelRefused",
    });
    expect(await findForLabel(technician(), { number, cells: "sound" })).toMatchObject({ ok: true });
  });
});
