import "server-only";
import type { Actor } from "@/lib/access/actor";
import { isAfter } from "@/lib/kernel/calendar-day";
import { ok, refuse } from "@/lib/kernel/outcome";
import { answerDueAt } from "@/lib/rule-book/queries";
import { todayOf } from "../judging/service";
import { moveClaim } from "../moves/service";

/**
 * Objects to a verdict; an assessor who did not give it hears the claim again, within the usual time. Refuses
 * `contestOver` after the last day that the verdict named.
 */
export const contestVerdict = (actor: Actor, { number, reason }: { number: string; reason: string }) =>
  moveClaim<"contestOver">(actor, { number, move: "contest" }, async (claim, work) => {
    const { contestUntil } = claim;
    if (contestUntil && isAfter(todayOf(actor), contestUntil))
      return refuse("contestOver", { day: contestUntil });
    return ok({
      changes: { answerDueAt: await answerDueAt(work, claim.sellerId, new Date()) },
      detail: { reason },
    });
  });
