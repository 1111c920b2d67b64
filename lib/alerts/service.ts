import "server-only";
import { fn, Op } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { unitOfWork } from "@/lib/db/unit-of-work";
import { claimPath } from "@/lib/claims/paths";
import { ok, type Outcome } from "@/lib/kernel/outcome";
import { Alert } from "@/models/alert";
import type { ReadAll } from "./schema";

const mine = ({ organisationId, userId }: Actor) => ({ organisationId, userId });

/** Marks the actor's alerts as read, up to the instant the list was drawn. Answers how many were unread. */
export const markAllRead = (actor: Actor, { until }: ReadAll): Promise<Outcome<{ count: number }, never>> =>
  unitOfWork(actor, async (work) => {
    const [count] = await Alert.update(
      { readAt: fn("now") },
      { where: { ...mine(actor), readAt: null, at: { [Op.lte]: until } }, transaction: work.transaction },
    );
    return ok({ count });
  });

/**
 * Marks one alert as read, however often it is opened, and answers the path of its claim; null where the actor has no
 * such alert where they work now. `id` is a UUID.
 */
export const openAlert = (actor: Actor, id: string): Promise<`/claims/${string}` | null> =>
  unitOfWork(actor, async ({ transaction }) => {
    const alert = await Alert.findOne({ where: { ...mine(actor), id }, transaction });
    if (!alert) return null;
    await Alert.update({ readAt: fn("now") }, { where: { id, readAt: null }, transaction });
    return claimPath({ number: alert.claimNumber });
  });
