import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { isAfter } from "@/lib/kernel/calendar-day";
import { ok, refuse } from "@/lib/kernel/outcome";
import { answerDueAt } from "@/lib/rule-book/queries";
import { movesOpenTo } from "../lifecycle";
import { todayOf } from "@/lib/access/today-queries";
import { claimForChange, moveClaim, type Moved } from "../moves/service";
import { appendToTimeline } from "../timeline/service";
import { isContestOpen } from "./open";

/**
 * Objects to a verdict; an assessor who did not give it hears the claim again, within the usual time. Refuses
 * `contestOver` after the last day that the verdict named, and `contestWaived` once the verdict was accepted.
 */
export const contestVerdict = (actor: Actor, { number, reason }: { number: string; reason: string }) =>
  moveClaim<"contestOver" | "contestWaived">(actor, { number, move: "contest" }, async (claim, work) => {
    const { contestUntil, contestWaivedAt } = claim;
    if (contestWaivedAt) return refuse("contestWaived");
    if (contestUntil && isAfter(todayOf(actor), contestUntil))
      return refuse("contestOver", { day: contestUntil });
    return ok({
      changes: { answerDueAt: await answerDueAt(work, claim.sellerId, new Date()) },
      detail: { reason },
    });
  });

/** Asks the worker to look for claims nobody owes anything on any more; the hourly round would find them too. */
export const askToSettle = (work: Work): Promise<unknown> =>
  rows(work, "select graphile_worker.enqueue('settleClaims', '{}', 'settleClaims')");

/**
 * Accepts a verdict: the workshop gives up the days it had left to object, so that the claim can be settled. Who may
 * contest may accept; the state stays. Refuses `moveNotOpen` where there is nothing left to give up.
 */
export const acceptVerdict = (actor: Actor, { number }: { number: string }) =>
  undoing<Moved, "notFound" | "moveNotOpen">(actor, async (work) => {
    const claim = await claimForChange(work, number);
    if (!claim) return refuse("notFound");
    if (!movesOpenTo(actor, claim).includes("contest") || !isContestOpen(claim, todayOf(actor)))
      return refuse("moveNotOpen");
    await claim.update({ contestWaivedAt: new Date() }, { transaction: work.transaction });
    await appendToTimeline(work, claim, {
      kind: "accepted",
      ...(claim.contestUntil ? { detail: { contestUntil: claim.contestUntil } } : {}),
    });
    await askToSettle(work);
    return ok({ number });
  });

/** Opens a settled claim again, for a reason both sides read. Nobody holds it; whoever takes it over did not decide it. */
export const reopenClaim = (actor: Actor, { number, reason }: { number: string; reason: string }) =>
  moveClaim<never>(actor, { number, move: "reopen" }, async (claim, work) =>
    ok({
      changes: {
        holderId: null,
        heldUntil: null,
        contestWaivedAt: null,
        answerDueAt: await answerDueAt(work, claim.sellerId, new Date()),
      },
      detail: { reason },
    }),
  );
