import "server-only";
import { fn, Op } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse } from "@/lib/kernel/outcome";
import { Parcel as ParcelRow } from "@/models/parcel";
import { PartReturn } from "@/models/part-return";
import type { ParcelCondition } from "./kinds";
import type { ParcelInput } from "./schema";

type Parcel = Omit<ParcelInput, "condition"> & { readonly condition: ParcelCondition };

/** Whether this person opens parcels for a distributor. */
export const receivesParts = ({ roles }: Actor): boolean =>
  hasRight(roles, "receiveParts", { sells: true, buys: false });

/** What was noted of a parcel, by whom, as columns of its row. */
const asWritten = ({ userId, organisationId }: Actor, parcel: Parcel) => ({
  sellerId: organisationId,
  receivedById: userId,
  numberWritten: parcel.numberWritten,
  senderWritten: parcel.sender,
  partWritten: parcel.part,
  serialWritten: parcel.serial,
  condition: parcel.condition,
  note: parcel.note,
});

/** Writes a parcel down as it arrived; with the return it belongs to where that is known. */
export async function insertParcel(work: Work, parcel: Parcel, returnId: string | null): Promise<string> {
  const { transaction, actor } = work;
  const matched = returnId === null ? {} : { returnId, matchedAt: new Date(), matchedById: actor.userId };
  const made = await ParcelRow.create({ ...asWritten(actor, parcel), ...matched }, { transaction });
  return made.id;
}

const MINUTE_MS = 60_000;

/** The same parcel written down by the same person within the last minute: the button was pressed twice. */
async function justNoted(work: Work, parcel: Parcel): Promise<string | null> {
  const { transaction, actor } = work;
  // Two presses at once wait for each other; nothing else waits for them.
  await rows(work, "select pg_advisory_xact_lock(hashtextextended($1, 0)) is null as locked", [
    `parcel:${actor.userId}`,
  ]);
  const same = await ParcelRow.findOne({
    where: { ...asWritten(actor, parcel), arrivedAt: { [Op.gt]: new Date(Date.now() - MINUTE_MS) } },
    order: [["arrivedAt", "DESC"]],
    transaction,
  });
  return same?.id ?? null;
}

/** Writes down a parcel that came without a number of ours. Refuses `parcelUnwritten` where nothing on it was noted. */
export const noteParcel = (actor: Actor, input: ParcelInput) =>
  undoing<{ id: string }, "notAllowed" | "parcelUnwritten">(actor, async (work) => {
    if (!receivesParts(actor)) return refuse("notAllowed");
    if ([input.sender, input.part, input.serial, input.numberWritten].every((text) => text === ""))
      return refuse("parcelUnwritten", {}, "sender");
    const id = (await justNoted(work, input)) ?? (await insertParcel(work, input, null));
    return ok({ id });
  });

/**
 * Matches a parcel to a return of this distributor; its parts are received in a step of their own. Refuses
 * `parcelMatched` where it belongs to another already.
 */
export const matchParcel = (actor: Actor, { parcelId, number }: { parcelId: string; number: string }) =>
  undoing<{ number: string; parcelId: string }, "notAllowed" | "notFound" | "parcelMatched">(
    actor,
    async ({ transaction }) => {
      if (!receivesParts(actor)) return refuse("notAllowed");
      const sellerId = actor.organisationId;
      const parcel = await ParcelRow.findOne({
        where: { id: parcelId, sellerId },
        transaction,
        lock: transaction.LOCK.UPDATE,
      });
      const returned = await PartReturn.findOne({ where: { number, sellerId }, transaction });
      if (!parcel || !returned) return refuse("notFound");
      if (parcel.returnId !== null && parcel.returnId !== returned.id) return refuse("parcelMatched");
      if (parcel.returnId === null)
        await parcel.update(
          { returnId: returned.id, matchedAt: fn("now"), matchedById: actor.userId },
          { transaction },
        );
      return ok({ number, parcelId });
    },
  );
