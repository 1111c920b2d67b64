import "server-only";
import { fn } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import type { Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { normaliseSerial } from "@/lib/labels/serial";
import { Parcel } from "@/models/parcel";
import { ReturnLine } from "@/models/return-line";
import { changeReturn, type Found, type PartRow } from "./change-service";
import { asksForDanger, conditionFrom } from "./danger";
import type { ParcelCondition } from "./kinds";
import { insertParcel } from "./parcel-service";
import type { ReceiveInput } from "./schema";

type Arrived = { readonly line: PartRow; readonly serialSeen: string };

/** The lines that were in the parcel, each with the serial read off the part. */
const arrivedLines = ({ lines }: ReceiveInput, open: readonly PartRow[]): Arrived[] =>
  lines.flatMap(({ lineId, isHere, serialSeen }) => {
    const line = isHere === "yes" ? open.find((one) => one.lineId === lineId) : undefined;
    return line ? [{ line, serialSeen }] : [];
  });

/** True where both serials are known and are not the same: a warning that is kept, never a reason to send it away. */
const isOtherSerial = ({ line, serialSeen }: Arrived): boolean =>
  serialSeen !== "" && line.serial !== null && normaliseSerial(serialSeen) !== normaliseSerial(line.serial);

type ParcelOf = { readonly id: string; readonly condition: ParcelCondition };

/** The parcel the parts came in: the one being unpacked, or a new one that belongs to this return. */
async function parcelOf(
  work: Work,
  { returned }: Found,
  { input, condition }: { input: ReceiveInput; condition: ParcelCondition },
): Promise<ParcelOf | null> {
  if (input.parcelId === "") {
    const written = { sender: "", part: "", serial: "", numberWritten: "", note: input.note, condition };
    return { id: await insertParcel(work, written, returned.id), condition };
  }
  return Parcel.findOne({
    where: { id: input.parcelId, sellerId: work.actor.organisationId },
    transaction: work.transaction,
  });
}

const writeArrival = (
  { transaction }: Work,
  { returned }: Found,
  { line, serialSeen, place, parcelId }: Arrived & { place: string; parcelId: string },
) =>
  ReturnLine.update(
    { parcelId, place, serialSeen: serialSeen === "" ? null : serialSeen, receivedAt: fn("now") },
    { where: { returnId: returned.id, lineId: line.lineId }, transaction },
  );

type Refused = "nothingReceived" | "signsUnanswered" | "notFound";

/** Whether the parts may come in as they are said to: at least one, and looked at where it can be dangerous. */
function checkArrival(input: ReceiveInput, arrived: readonly Arrived[]): Outcome<true, Refused> {
  if (arrived.length === 0) return refuse("nothingReceived");
  const isAsked = arrived.some(({ line }) => asksForDanger(line.family));
  return isAsked && input.looked !== "yes" ? refuse("signsUnanswered") : ok(true);
}

/**
 * Receives parts of a return: the parcel as it looked, the serial on each part, the place they were put. A different
 * serial is kept as a warning. Refuses `nothingReceived`, and `signsUnanswered` for a battery nobody looked at first.
 */
export const receiveReturn = (actor: Actor, input: ReceiveInput) =>
  changeReturn<Refused>(actor, {
    number: input.number,
    move: "receive",
    isDone: (_work, lines) => {
      const here = input.lines.filter(({ isHere }) => isHere === "yes").map(({ lineId }) => lineId);
      const states = lines
        .filter(({ lineId }) => here.includes(lineId))
        .map(({ returnState }) => returnState);
      return Promise.resolve(states.length > 0 && states.every((state) => state === "received"));
    },
    decide: async (found, work) => {
      const arrived = arrivedLines(input, found.lines);
      const checked = checkArrival(input, arrived);
      if (!checked.ok) return checked;
      const condition = conditionFrom(input.signs, input.condition);
      const parcel = await parcelOf(work, found, { input, condition });
      if (!parcel) return refuse("notFound");
      for (const one of arrived)
        await writeArrival(work, found, { ...one, place: input.place, parcelId: parcel.id });
      return ok({
        lineIds: arrived.map(({ line }) => line.lineId),
        detail: {
          returnNumber: input.number,
          lines: arrived.map(({ line }) => line.lineNumber),
          condition: parcel.condition,
          signs: input.signs,
          serials: arrived.filter(isOtherSerial).map(({ line, serialSeen }) => ({
            line: line.lineNumber,
            seen: serialSeen,
            claimed: line.serial,
          })),
        },
      });
    },
  });
