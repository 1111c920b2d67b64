import { beforeAll, describe, expect, it } from "vitest";
import { findReturn } from "@/lib/returns/card-queries";
import { goodsInLists } from "@/lib/returns/lists-queries";
import { matchParcel, noteParcel } from "@/lib/returns/parcel-service";
import { findParcel, findPlace } from "@/lib/returns/search-queries";
import { claimNumberFrom } from "@/lib/labels/check-digit";
import { printReturnNumber } from "@/lib/returns/number";
import type { ParcelInput } from "@/lib/returns/schema";
import { actorAt } from "../support/actor";
import { buildDistributor, buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import {
  assessor,
  calledIn,
  goodsIn,
  heldClaim,
  kindsOf,
  openReturnWorld,
  otherTechnician,
  receive,
  send,
  stateOf,
  technician,
  world,
} from "./returned-parts";

beforeAll(openReturnWorld);

const WRITTEN: ParcelInput = {
  sender: "A workshop",
  part: "",
  serial: "",
  numberWritten: "",
  condition: "sound",
  note: "",
};
async function noted(over: Partial<ParcelInput>): Promise<string> {
  const made = await noteParcel(goodsIn(), { ...WRITTEN, ...over });
  if (!made.ok) throw new Error(made.code);
  return made.value.id;
}
async function elsewhere() {
  const seller = await buildDistributor();
  return actorAt(seller, await buildPerson(seller, ["goodsIn"]), ["goodsIn"]);
}

describe("receiving by number", () => {
  it("keeps the parcel, the serial seen and the place, whether or not the workshop said it was sent", async () => {
    for (const isAnnounced of [true, false]) {
      const claim = await heldClaim();
      const number = await calledIn(claim);
      if (isAnnounced) await send(number);
      expect(await receive(number, claim, { condition: "damaged" })).toMatchObject({ ok: true });
      expect(await findReturn(goodsIn(), number)).toMatchObject({
        lines: [{ state: "received", place: "A-12", condition: "damaged", isOtherSerial: false }],
      });
      const [clock] = await adminQuery("select clock_stopped_at from claims where id = $1", [claim.id]);
      expect(clock).toEqual({ clock_stopped_at: null });
    }
  });

  it("takes a part with another serial and keeps the warning for both sides", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    const lines = { 0: { lineId: claim.lineIds[0], isHere: "yes", serialSeen: "XX-999" } };
    expect(await receive(number, claim, { lines })).toMatchObject({ ok: true });
    for (const actor of [goodsIn(), technician()])
      expect(await findReturn(actor, number)).toMatchObject({
        lines: [{ isOtherSerial: true, serialSeen: "XX-999", serial: claim.serial }],
      });
    const [entry] = await adminQuery<{ detail: object }>(
      "select detail from timeline_entries where claim_id = $1 and kind = 'partReceived'",
      [claim.id],
    );
    expect(entry?.detail).toMatchObject({ serials: [{ line: 1, seen: "XX-999", claimed: claim.serial }] });
  });

  it("shows the workshop neither the place nor how the parcel looked", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    await receive(number, claim, { condition: "wet" });
    expect(await findReturn(technician(), number)).toMatchObject({
      lines: [{ place: null, condition: null, parcelId: null }],
    });
  });

  it("is goods-in's alone, and refuses a parcel in which nothing was", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(await receive(number, claim, {}, assessor())).toMatchObject({ code: "moveNotOpen" });
    expect(await receive(number, claim, {}, technician())).toMatchObject({ code: "moveNotOpen" });
    expect(await receive(number, claim, {}, otherTechnician())).toMatchObject({ code: "notFound" });
    expect(await receive(number, claim, {}, await elsewhere())).toMatchObject({ code: "notFound" });
    const lines = { 0: { lineId: claim.lineIds[0], isHere: "no", serialSeen: "" } };
    expect(await receive(number, claim, { lines })).toMatchObject({ code: "nothingReceived" });
    expect(
      await adminQuery(
        "select 1 from parcels k join part_returns r on r.id = k.return_id where r.number = $1",
        [number],
      ),
    ).toEqual([]);
  });

  it("pressed twice is one parcel and one entry", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    expect(await Promise.all([receive(number, claim), receive(number, claim)])).toMatchObject([
      { ok: true },
      { ok: true },
    ]);
    expect(await kindsOf(claim)).toEqual(["partCalledIn", "partReceived"]);
    expect(
      await adminQuery(
        "select 1 from parcels k join part_returns r on r.id = k.return_id where r.number = $1",
        [number],
      ),
    ).toHaveLength(1);
  });

  it("of a battery asks for signs of danger first, and puts one that shows any in quarantine", async () => {
    const claim = await heldClaim({ symptom: "shortRange" }, "battery");
    const number = await calledIn(claim);
    expect(await receive(number, claim)).toMatchObject({ code: "signsUnanswered" });
    expect(await stateOf(claim)).toBe("awaited");
    expect(await receive(number, claim, { looked: "yes", signs: "swollen,hot", place: "Q-1" })).toMatchObject(
      {
        ok: true,
      },
    );
    expect(await findReturn(goodsIn(), number)).toMatchObject({
      lines: [{ isQuarantined: true, condition: "damaged", place: "Q-1" }],
    });
    const lists = await goodsInLists(goodsIn());
    expect(lists?.toExamine.find((item) => item.number === number)).toMatchObject({ isQuarantined: true });
  });

  it("takes parts of several returns out of one parcel", async () => {
    const [first, second] = [await heldClaim(), await heldClaim()];
    const [one, two] = [await calledIn(first), await calledIn(second)];
    await receive(one, first);
    const parcelId = (await findReturn(goodsIn(), one))?.lines[0]?.parcelId;
    expect(await receive(two, second, { parcelId })).toMatchObject({ ok: true });
    expect((await findReturn(goodsIn(), two))?.lines[0]?.parcelId).toBe(parcelId);
    const foreign = await elsewhere();
    const other = await heldClaim();
    const third = await calledIn(other);
    const theirs = await noteParcel(foreign, WRITTEN);
    const theirId = theirs.ok ? theirs.value.id : "";
    expect(await receive(third, other, { parcelId: theirId })).toMatchObject({ code: "notFound" });
  });
});

describe("a parcel without a number", () => {
  it("is kept for later, on the list of its own distributor and on no other", async () => {
    const id = await noted({ sender: "Somebody unknown" });
    const lists = await goodsInLists(goodsIn());
    expect(lists?.unmatched.map((parcel) => parcel.id)).toContain(id);
    const foreign = await elsewhere();
    expect((await goodsInLists(foreign))?.unmatched).toEqual([]);
    expect(await findParcel(foreign, id)).toBeNull();
    const number = await calledIn(await heldClaim());
    expect(await matchParcel(foreign, { parcelId: id, number })).toMatchObject({ code: "notFound" });
    for (const actor of [assessor(), technician()]) {
      expect(await goodsInLists(actor)).toBeNull();
      expect(await findParcel(actor, id)).toBeNull();
      expect(await noteParcel(actor, WRITTEN)).toMatchObject({ code: "notAllowed" });
      expect(await matchParcel(actor, { parcelId: id, number })).toMatchObject({ code: "notAllowed" });
    }
  });

  it("needs something that stands on it, and is one parcel when pressed twice", async () => {
    expect(await noteParcel(goodsIn(), { ...WRITTEN, sender: "" })).toMatchObject({
      code: "parcelUnwritten",
    });
    const twice = { ...WRITTEN, sender: "Pressed twice" };
    await Promise.all([noteParcel(goodsIn(), twice), noteParcel(goodsIn(), twice)]);
    expect(await adminQuery("select 1 from parcels where sender_written = 'Pressed twice'")).toHaveLength(1);
  });

  it("is matched to the return of the same serial first, then received", async () => {
    const claim = await heldClaim();
    await calledIn(await heldClaim());
    const number = await calledIn(claim);
    const id = await noted({ sender: "no idea", serial: claim.serial.toLowerCase() });
    const found = await findParcel(goodsIn(), id);
    expect(found?.matches[0]).toMatchObject({ number, reasons: ["sameSerial"] });
    expect(await matchParcel(goodsIn(), { parcelId: id, number })).toMatchObject({ ok: true });
    expect(await matchParcel(goodsIn(), { parcelId: id, number })).toMatchObject({ ok: true });
    const other = await calledIn(await heldClaim());
    expect(await matchParcel(goodsIn(), { parcelId: id, number: other })).toMatchObject({
      code: "parcelMatched",
    });
    expect(await findParcel(goodsIn(), id)).toBeNull();
    expect(await receive(number, claim, { parcelId: id })).toMatchObject({ ok: true });
  });
});

describe("the one field of goods-in", () => {
  it("leads from a return number, a claim number, a serial and the code of a label to the return", async () => {
    const claim = await heldClaim();
    const number = await calledIn(claim);
    const place = `/goods-in/returns/${number}`;
    const printed = `${claim.number.slice(0, 4)}-${claim.number.slice(4)}`;
    for (const text of [
      number,
      printReturnNumber(number),
      `r ${number.slice(0, 3)} ${number.slice(3)}`,
      printed,
      claim.number,
      claim.serial,
      `(01)04012345000009(21)${claim.serial}`,
      `R${number}/${claim.number}`,
    ])
      expect(await findPlace(goodsIn(), text), text).toBe(place);
  });

  it("leads to the sheet of a claim without a return, and nowhere for what is not ours", async () => {
    const claim = await heldClaim();
    expect(await findPlace(goodsIn(), claim.number)).toBe(
      `/claims/${claim.number.slice(0, 4)}-${claim.number.slice(4)}`,
    );
    const number = await calledIn(claim);
    expect(await findPlace(await elsewhere(), number)).toBeNull();
    expect(await findPlace(technician(), number)).toBeNull();
    expect(await findPlace(goodsIn(), claimNumberFrom(9_999_999))).toBeNull();
    expect(await findPlace(goodsIn(), "nothing at all ' -- ")).toBeNull();
  });
});

describe("the lists of goods-in", () => {
  it("count what they hold, and mark what is overdue", async () => {
    const seller = world.seller.id;
    const number = await calledIn(await heldClaim());
    await adminQuery("update part_returns set due_on = current_date - 9 where number = $1", [number]);
    const lists = await goodsInLists(goodsIn());
    const [real] = await adminQuery<{ due: number; bench: number; parcels: number }>(
      `select (select count(*)::int from claim_lines where seller_id = $1 and return_state in ('awaited', 'sent')) as due,
         (select count(*)::int from claim_lines where seller_id = $1 and return_state = 'received') as bench,
         (select count(*)::int from parcels where seller_id = $1 and return_id is null) as parcels`,
      [seller],
    );
    expect(lists?.counts).toMatchObject({
      due: real?.due,
      toExamine: real?.bench,
      unmatched: real?.parcels,
      overdue: 1,
    });
    expect(lists?.due[0]).toMatchObject({ number, daysOver: 9 });
  });
});
