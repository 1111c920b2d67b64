import type { ReturnState } from "@/lib/claims/lifecycle";
import { clockRunning, clockStanding, type DistributorClock } from "@/lib/claims/clock/distributor-clock";
import { addDays, dayInZone } from "@/lib/kernel/calendar-day";
import type { Disposal, ParcelCondition } from "@/lib/returns/kinds";
import { PART_ENTRIES, PART_MOVES, type PartMove } from "@/lib/returns/lifecycle";
import { returnNumberFrom, RETURN_NUMBERS } from "@/lib/returns/number";
import { idOf } from "../identity";
import { ORGANISATIONS } from "../story/organisations";
import { ASSESSORS, CLAIMANTS, PEOPLE, type PersonKey } from "../story/people";
import { judgeOf } from "./deciding";
import { addRow, lineId, type LineState, type Returning, type Scene } from "./scene";

const DAYS_TO_SEND = 14;

/** Takes the part of every line a step on. Throws where the table of moves has no such step. */
function moveParts({ one, lines }: Scene, move: PartMove): void {
  const { from, to } = PART_MOVES[move];
  for (const line of lines) {
    const known: readonly ReturnState[] = from;
    if (!known.includes(line.returnState))
      throw new RangeError(`${one.number}: a part that is ${line.returnState} cannot ${move}`);
    line.returnState = to;
  }
}

/** Calls every part of the claim in, under one return number. */
export function callIn(scene: Scene): void {
  const { one, life, draw, seller } = scene;
  const judge = judgeOf(scene);
  const dueOn = addDays(life.lastOn, DAYS_TO_SEND);
  const number = returnNumberFrom(draw.fork("return number").whole(0, RETURN_NUMBERS - 1));
  const id = idOf("return", life.claimId);
  const house = ORGANISATIONS[one.seller];
  const row = {
    id,
    number,
    claimId: life.claimId,
    ...life.parties,
    sendTo: `${house.legalName}, ${seller.returns.department}, ${house.address}`,
    instructions: seller.returns.instructions[one.family] ?? "",
    dueOn,
    calledInById: PEOPLE[judge].id,
    calledInAt: life.lastAt,
    dispatchedAt: null,
    dispatchedById: null,
    carrier: null,
    trackingNumber: null,
  };
  const lines = scene.lines.map((_, place) => ({
    returnId: id,
    lineId: lineId(scene, place),
    ...life.parties,
    parcelId: null,
    place: null,
    serialSeen: null,
    receivedAt: null,
    disposedAs: null,
    disposedAt: null,
    disposedById: null,
  }));
  scene.returning = { row, lines };
  scene.dueOn = dueOn;
  addRow(scene, "partReturns", row);
  for (const line of lines) addRow(scene, "returnLines", line);
  Object.assign(scene.fields, clockStanding(clockOf(scene), life.lastAt));
  moveParts(scene, "callIn");
  tell(scene, { move: "callIn", by: judge }, { dueOn, instructions: row.instructions });
}

function clockOf({ fields }: Scene): DistributorClock {
  const { clockStoppedAt, clockStoppedMinutes, answerDueAt } = fields;
  return {
    clockStoppedAt: clockStoppedAt instanceof Date ? clockStoppedAt : null,
    clockStoppedMinutes: typeof clockStoppedMinutes === "number" ? clockStoppedMinutes : 0,
    answerDueAt: answerDueAt instanceof Date ? answerDueAt : null,
  };
}

/** Nothing is awaited of the workshop any more: the distributor's clock runs again. */
const letClockRun = (scene: Scene): void => {
  Object.assign(scene.fields, clockRunning(clockOf(scene), scene.life.lastAt));
};

function returningOf({ one, returning }: Scene): Returning {
  if (!returning) throw new RangeError(`${one.number}: nothing was called in`);
  return returning;
}

type Told = { readonly move: PartMove; readonly by: PersonKey };

/** The entry of a move in the record of the claim. */
export function tell(scene: Scene, { move, by }: Told, detail: Record<string, unknown> = {}): void {
  const returnNumber = returningOf(scene).row["number"];
  const lines = scene.lines.map((_, place) => place + 1);
  scene.life.write({ kind: PART_ENTRIES[move], by, detail: { returnNumber, lines, ...detail } });
}

/** The workshop packs the part and says how it went. */
export function dispatch(scene: Scene): void {
  const { life, draw, workshop, one } = scene;
  const by = CLAIMANTS[one.workshop].starts;
  const carrier = draw.pick(workshop.returns.carriers);
  const trackingNumber = trackingFrom(draw.fork("tracking").whole(10_000_000, 99_999_999));
  Object.assign(returningOf(scene).row, {
    dispatchedAt: life.lastAt,
    dispatchedById: PEOPLE[by].id,
    carrier,
    trackingNumber,
  });
  letClockRun(scene);
  moveParts(scene, "dispatch");
  const sentOn = dayInZone(life.lastAt, ORGANISATIONS[one.workshop].timeZone);
  tell(scene, { move: "dispatch", by }, { carrier, trackingNumber, sentOn });
}

const trackingFrom = (digits: number): string => `0041 ${String(digits).replace(/(\d{4})(?=\d)/gu, "$1 ")}`;

const CONDITIONS: readonly (readonly [ParcelCondition, number])[] = [
  ["sound", 12],
  ["damaged", 1],
];
const PLACES = ["A-01", "A-04", "A-07", "B-02", "B-03", "B-09", "C-05", "C-11"];

/** The parcel arrives: matched to its return, the serial looked at, and a place on the shelf. */
export function receive(scene: Scene): void {
  const { one, life, draw, seller } = scene;
  const bench = ASSESSORS[one.seller].bench;
  const parcelId = idOf("parcel", life.claimId);
  const { row, lines } = returningOf(scene);
  const isWet = one.twist === "parcelWet";
  const condition = isWet ? "wet" : draw.weighted(CONDITIONS);
  const hasNumber = draw.happens(SHARE_WITH_NUMBER);
  const [line] = one.lines;
  addRow(scene, "parcels", {
    id: parcelId,
    sellerId: life.parties.sellerId,
    returnId: row["id"],
    arrivedAt: life.lastAt,
    receivedById: PEOPLE[bench].id,
    numberWritten: hasNumber ? row["number"] : "",
    senderWritten: ORGANISATIONS[one.workshop].name,
    partWritten: hasNumber ? "" : line.part.number,
    serialWritten: hasNumber ? "" : line.serialTyped,
    condition,
    note: condition === "sound" ? "" : isWet ? seller.returns.wet : seller.returns.damaged,
    matchedAt: life.lastAt,
    matchedById: PEOPLE[bench].id,
  });
  lines.forEach((returned, place) => {
    const serialSeen =
      one.twist === "otherUnitSent" ? seller.returns.otherSerial : one.lines[place]?.serialTyped;
    Object.assign(returned, { parcelId, place: draw.pick(PLACES), serialSeen, receivedAt: life.lastAt });
  });
  moveParts(scene, "receive");
  const serials =
    one.twist === "otherUnitSent"
      ? [{ line: 1, seen: seller.returns.otherSerial, claimed: line.serialTyped }]
      : [];
  tell(scene, { move: "receive", by: bench }, { condition, signs: [], serials });
}

const SHARE_WITH_NUMBER = 0.85;

/** The day by which it was to be sent has passed, and the assessor closes the wait. */
export function missDeadline(scene: Scene): void {
  const by = judgeOf(scene);
  letClockRun(scene);
  moveParts(scene, "closeUnsent");
  tell(scene, { move: "closeUnsent", by }, { reason: scene.seller.returns.notSent });
}

/** Sent and never arrived. */
export function loseParcel(scene: Scene): void {
  const by = judgeOf(scene);
  moveParts(scene, "markMissing");
  tell(scene, { move: "markMissing", by }, { reason: scene.seller.returns.missing });
}

/** The part need not come: the workshop scraps it and shows that it did. */
export function scrapOnSite({ lines }: Scene): void {
  for (const line of lines) line.returnState = "scrapOnSite";
}

/** Where an examined part ends. Bad coils go to their maker, what was declined back to its owner. */
export function dispose(scene: Scene): void {
  const { one, life, draw } = scene;
  const bench = ASSESSORS[one.seller].bench;
  const disposedAs = scene.lines.map((line) => disposalOf(scene, line, draw.next()));
  returningOf(scene).lines.forEach((returned, place) =>
    Object.assign(returned, {
      disposedAs: disposedAs[place],
      disposedAt: life.lastAt,
      disposedById: PEOPLE[bench].id,
    }),
  );
  moveParts(scene, "dispose");
  tell(scene, { move: "dispose", by: bench }, { disposedAs: disposedAs[0] });
}

const SHARE_KEPT = 0.3;

function disposalOf({ one }: Scene, { verdict }: LineState, drawn: number): Disposal {
  if (verdict === "declined") return "sentBack";
  if (one.twist === "badCoil") return drawn < SHARE_KEPT ? "kept" : "sentToMaker";
  return drawn < SHARE_KEPT ? "sentToMaker" : "scrapped";
}
