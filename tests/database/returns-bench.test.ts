import { beforeAll, describe, expect, it } from "vitest";
import { receiveEvidence, withdrawEvidence } from "@/lib/evidence-files/service";
import { summariseRunLog } from "@/lib/evidence/run-log-summary";
import { letterFor } from "@/lib/mail/letter";
import { disposePart } from "@/lib/returns/bench-service";
import { findBench } from "@/lib/returns/bench-queries";
import { findReturn } from "@/lib/returns/card-queries";
import { loggedRunSeconds } from "@/lib/returns/bench-run";
import { buildFile } from "../support/build";
import { adminQuery, answerOf, asRole, NOT_ALLOWED } from "../support/database";
import {
  assessor,
  atTheBench,
  calledIn,
  find,
  goodsIn,
  heldClaim,
  kindsOf,
  mailsOf,
  openReturnWorld,
  otherTechnician,
  receive,
  stateOf,
  technician,
  world,
  type Held,
} from "./returned-parts";
import { bodyOf, form } from "./routes/multipart";
import { useOwnBucket } from "./storage/own-bucket";

beforeAll(async () => {
  await useOwnBucket();
  await openReturnWorld();
});

/** A log of a part that ran so many minutes under voltage and grew warm, a row a minute. */
const logOf = (minutes: number): Buffer => {
  const rows = Array.from({ length: minutes + 1 }, (_one, at) => `${at * 60},${20 + at},24.0,0.8`);
  return Buffer.from(["time_s,coil_C,voltage_V,current_A", ...rows, ""].join("\n"));
};

const addLog = (claim: Held, minutes: number, isRead = true) =>
  buildFile({ ...world.shops[0] }, claim, {
    row_id: "bench.runLog.1",
    kind: "runLog",
    media_type: "text/csv",
    original_name: "run.csv",
    view_state: "notNeeded",
    taken_by: "goodsIn",
    summary: isRead ? JSON.stringify(summariseRunLog(logOf(minutes))) : null,
  });

/** A claim whose workshop stated when the fault came; the row is on no list, so its reading is put into the revision. */
async function stated(minutes: number | null): Promise<{ claim: Held; number: string }> {
  const made = await atTheBench();
  if (minutes === null) return made;
  const reading = {
    rowId: "timeToFault",
    kind: "timeToFault",
    rawText: `${minutes} min`,
    unit: "min",
    canonicalValue: minutes,
    temperatureCelsius: null,
    instrument: "",
  };
  await adminQuery(
    `insert into claim_revisions (claim_id, seller_id, workshop_id, revision, facts, sha256, sent_by_id)
     select claim_id, seller_id, workshop_id, revision + 1, jsonb_set(facts, '{readings}', $2::jsonb), sha256, sent_by_id
     from claim_revisions where claim_id = $1`,
    [made.claim.id, JSON.stringify([reading])],
  );
  await adminQuery("update claims set revision = revision + 1 where id = $1", [made.claim.id]);
  return made;
}
const noFault = (number: string, over: object = {}) =>
  find(number, { kind: "noFaultFound", note: "It ran.", ...over });

describe("no fault found", () => {
  it("is refused below 45 minutes where the claim states no time, naming both figures at its field", async () => {
    const { number } = await stated(null);
    expect(await noFault(number, { runMinutes: "44.5" })).toMatchObject({
      code: "noFaultTooShort",
      field: "kind",
      detail: { ranMinutes: 44, ranSeconds: 30, neededMinutes: 45, neededSeconds: 0 },
    });
    expect(await noFault(number)).toMatchObject({ code: "noFaultTooShort" });
    expect(await noFault(number, { runMinutes: "45" })).toMatchObject({ ok: true });
  });

  it("is refused below the workshop's own time to the fault, and open from it on", async () => {
    for (const [minutes, tooShort, enough] of [
      [12, "11,9", "12"],
      [70, "69", "70 min"],
    ] as const) {
      const { number } = await stated(minutes);
      expect(await noFault(number, { runMinutes: tooShort })).toMatchObject({
        code: "noFaultTooShort",
        detail: { neededMinutes: minutes },
      });
      expect(await noFault(number, { runMinutes: enough })).toMatchObject({ ok: true });
    }
  });

  it("goes by the run log where one is given, whatever was typed, and waits until it is read", async () => {
    const short = await stated(30);
    await addLog(short.claim, 20);
    expect(await noFault(short.number, { runMinutes: "600" })).toMatchObject({
      code: "noFaultTooShort",
      detail: { ranMinutes: 20, neededMinutes: 30 },
    });
    const long = await stated(30);
    await addLog(long.claim, 31);
    expect(await noFault(long.number)).toMatchObject({ ok: true });
    const unread = await stated(30);
    await addLog(unread.claim, 31, false);
    expect(await noFault(unread.number, { runMinutes: "60" })).toMatchObject({ code: "runLogBeingRead" });
  });

  it("says beforehand how long the run must be and by which figure", async () => {
    const { claim, number } = await stated(30);
    await addLog(claim, 20);
    expect(await findBench(goodsIn(), { number, lineNumber: 1 })).toMatchObject({
      claimSeconds: 1800,
      neededSeconds: 1800,
      loggedSeconds: 1200,
    });
    const silent = await stated(null);
    expect(await findBench(goodsIn(), { number: silent.number, lineNumber: 1 })).toMatchObject({
      claimSeconds: null,
      neededSeconds: 2700,
    });
    expect(loggedRunSeconds(summariseRunLog(logOf(31)))).toBe(1860);
  });

  it("is closed for a part in quarantine, which is never run; other findings are open", async () => {
    const claim = await heldClaim({ symptom: "shortRange" }, "battery");
    const number = await calledIn(claim);
    await receive(number, claim, { looked: "yes", signs: "swollen" });
    expect(await noFault(number, { runMinutes: "90" })).toMatchObject({ code: "noFaultInQuarantine" });
    expect(await find(number, { kind: "notTestable", note: "The case is swollen." })).toMatchObject({
      ok: true,
    });
  });
});

describe("a finding", () => {
  it("keeps its readings as typed and in their unit, tells the holder, and both sides read it", async () => {
    const { claim, number } = await atTheBench();
    const readings = { coilResistance: { raw: "9,4", temperature: "21", instrument: "M-2" } };
    const looks = { frictionFace: "Oil on the face." };
    expect(await find(number, { readings, looks, runMinutes: "5" })).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("examined");
    for (const actor of [technician(), assessor(), goodsIn()])
      expect((await findReturn(actor, number))?.lines[0]?.finding).toMatchObject({
        kind: "faultConfirmed",
        runMinutes: 5,
        looks: [{ step: "frictionFace", text: "Oil on the face." }],
        readings: [
          { kind: "coilResistance", rawText: "9,4", unit: "ohm", value: 9.4, temperatureCelsius: 21 },
        ],
      });
    const signed = async (actor = goodsIn()) => (await findReturn(actor, number))?.lines[0]?.finding?.foundBy;
    expect(await signed()).toBe(goodsIn().name);
    expect(await signed(technician())).toBe((await findReturn(technician(), number))?.sellerName);
    expect(await findReturn(otherTechnician(), number)).toBeNull();
    const [mail] = await mailsOf(claim, "partExamined");
    expect(mail?.recipient).toBe(world.assessor.email);
    const written = await letterFor("partExamined", { ...mail?.params, name: "Robin" }, "en");
    expect(written.subject).toContain("fault confirmed");
  });

  it("is goods-in's alone, for a part that arrived, with readings that can be read", async () => {
    const { claim, number } = await atTheBench();
    for (const actor of [assessor(), technician()])
      expect(await find(number, {}, actor)).toMatchObject({ code: "moveNotOpen" });
    expect(await find(number, {}, otherTechnician())).toMatchObject({ code: "notFound" });
    expect(await find(number, { lineNumber: 2 })).toMatchObject({ code: "notFound" });
    const unread = { coilResistance: { raw: "nine", temperature: "", instrument: "" } };
    expect(await find(number, { readings: unread })).toMatchObject({
      code: "readingUnread",
      field: "readings.coilResistance.raw",
    });
    expect(await find(number, { runMinutes: "a while" })).toMatchObject({ field: "runMinutes" });
    expect(await stateOf(claim)).toBe("received");
    expect(await adminQuery("select 1 from findings where claim_id = $1", [claim.id])).toEqual([]);
    const awaited = await calledIn(await heldClaim());
    expect(await find(awaited)).toMatchObject({ code: "moveNotOpen" });
  });

  it("pressed twice is one; a second look is a second one, and the newest counts", async () => {
    const { claim, number } = await atTheBench();
    await Promise.all([find(number), find(number)]);
    expect(await adminQuery("select 1 from findings where claim_id = $1", [claim.id])).toHaveLength(1);
    expect(await kindsOf(claim)).toEqual(["partCalledIn", "partReceived", "partExamined"]);
    expect(await find(number, { kind: "otherFault", note: "The lead is chafed." })).toMatchObject({
      ok: true,
    });
    expect((await findReturn(goodsIn(), number))?.lines[0]?.finding).toMatchObject({ kind: "otherFault" });
    const org = { org: world.seller.id, actor: goodsIn().userId };
    const change = "update findings set note = 'x' where claim_id = $1";
    expect(await answerOf(asRole("web", org, change, [claim.id]))).toBe(NOT_ALLOWED);
  });
});

describe("where a part ends", () => {
  it("is noted after the finding, by goods-in, once", async () => {
    const { claim, number } = await atTheBench();
    const end = { number, lineNumber: 1, as: "sentToMaker" } as const;
    expect(await disposePart(goodsIn(), end)).toMatchObject({ code: "moveNotOpen" });
    await find(number);
    expect(await disposePart(assessor(), end)).toMatchObject({ code: "moveNotOpen" });
    expect(await disposePart(goodsIn(), end)).toMatchObject({ ok: true });
    expect(await disposePart(goodsIn(), end)).toMatchObject({ ok: true });
    expect(await stateOf(claim)).toBe("disposed");
    expect((await kindsOf(claim)).filter((kind) => kind === "partDisposed")).toHaveLength(1);
    expect(await findReturn(technician(), number)).toMatchObject({ lines: [{ disposedAs: "sentToMaker" }] });
    expect(await find(number, { note: "Again." })).toMatchObject({ code: "moveNotOpen" });
  });
});

describe("files of the bench", () => {
  const upload = (claim: Held, rowId: string, actor = goodsIn()) => {
    const sent = form({ claimId: claim.id, rowId, kind: "runLog" }, { name: "run.csv", content: logOf(3) });
    const request: RequestInit & { duplex: "half" } = {
      method: "POST",
      headers: { "content-type": sent.contentType },
      body: bodyOf(sent),
      duplex: "half",
    };
    return receiveEvidence(actor, new Request("http://127.0.0.1/api/v1/evidence", request));
  };

  it("are taken from goods-in while the part is there, into rows of its own", async () => {
    const { claim } = await atTheBench();
    expect(await upload(claim, "bench.runLog.1")).toMatchObject({ ok: true });
    expect(
      await adminQuery("select taken_by from evidence_files where claim_id = $1 and row_id like 'bench.%'", [
        claim.id,
      ]),
    ).toEqual([{ taken_by: "goodsIn" }]);
    expect(await upload(claim, "runLog")).toMatchObject({ code: "notAllowed" });
    for (const actor of [assessor(), technician()])
      expect(await upload(claim, "bench.runLog.1", actor)).toMatchObject({ code: "notAllowed" });
    expect(await upload(claim, "bench.other.1")).toMatchObject({ code: "notFound" });
    const early = await heldClaim();
    await calledIn(early);
    expect(await upload(early, "bench.runLog.1")).toMatchObject({ code: "moveNotOpen" });
  });

  it("are taken back by their own side alone, and by nobody once a finding rests on them", async () => {
    const { claim, number } = await atTheBench();
    const made = await upload(claim, "bench.runLog.1");
    const id = made.ok ? made.value.id : "";
    expect(await withdrawEvidence(technician(), id)).toMatchObject({ code: "notAllowed" });
    const theirs = await buildFile({ ...world.shops[0] }, claim);
    expect(await withdrawEvidence(goodsIn(), theirs.id)).toMatchObject({ code: "notAllowed" });
    await find(number);
    expect(await withdrawEvidence(goodsIn(), id)).toMatchObject({ code: "evidenceSent" });
    const second = await atTheBench();
    const free = await upload(second.claim, "bench.runLog.1");
    expect(await withdrawEvidence(goodsIn(), free.ok ? free.value.id : "")).toMatchObject({ ok: true });
  });
});
