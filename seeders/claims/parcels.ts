import { instantOn, workingDayAgo } from "../days";
import { idOf } from "../identity";
import { ORGANISATIONS } from "../story/organisations";
import { PEOPLE } from "../story/people";
import type { World } from "../story/world";
import type { Tables } from "../tables";
import type { Scene } from "./scene";

const ARRIVED = ["10:20:00", "14:05:00"] as const;

/**
 * Two parcels of yesterday that nobody could match: one holds a part that is on its way, without its number; the other
 * carries a number nobody gave out.
 */
export function unmatchedParcels({ today }: World, scenes: readonly Scene[]): Tables {
  const day = workingDayAgo(today, 1);
  const expected = scenes.find(
    ({ one, lines }) => one.seller === "larkmoor" && lines.some(({ returnState }) => returnState === "sent"),
  );
  const [line] = expected?.one.lines ?? [];
  if (!expected || !line) throw new RangeError("No part of the story is on its way");
  const common = {
    sellerId: ORGANISATIONS.larkmoor.id,
    returnId: null,
    receivedById: PEOPLE.rosa.id,
    condition: "sound",
    matchedAt: null,
    matchedById: null,
  };
  const [first, second] = ARRIVED.map((time) => instantOn(day, time, ORGANISATIONS.larkmoor.timeZone));
  return {
    parcels: [
      {
        id: idOf("parcel", "without a number"),
        arrivedAt: first,
        numberWritten: "",
        senderWritten: ORGANISATIONS[expected.one.workshop].name,
        partWritten: line.part.number,
        serialWritten: line.serialTyped,
        note: "",
        ...common,
      },
      {
        id: idOf("parcel", "with a strange number"),
        arrivedAt: second,
        numberWritten: "2207 / 4",
        senderWritten: ORGANISATIONS.hollin.name,
        partWritten: "LMT-0502",
        serialWritten: "",
        note: "",
        ...common,
      },
    ],
  };
}
