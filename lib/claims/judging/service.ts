import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { addDays, type CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse } from "@/lib/kernel/outcome";
import { mailClaimPeople } from "@/lib/mail/outbox";
import { evidenceListOn, findRule } from "@/lib/rule-book/queries";
import { publicUrl } from "@/lib/web/settings";
import type { Claim } from "@/models/claim";
import { ClaimQuery } from "@/models/claim-query";
import { clockStanding } from "../clock/distributor-clock";
import { gaveTheVerdict } from "../lifecycle";
import { claimForChange, moveClaim } from "../moves/service";
import { printClaimNumber } from "../number";
import { claimPath } from "../paths";
import { appendToTimeline } from "../timeline/service";
import { nameOf } from "../parties/queries";

const HOLD_MINUTES = 10;
const holdFromNow = () => new Date(Date.now() + HOLD_MINUTES * 60_000);

/** Takes a claim from the list: from now on this assessor holds it, for ten minutes at a time. */
export const takeClaim = (actor: Actor, { number }: { number: string }) =>
  moveClaim<never>(actor, { number, move: "take" }, () =>
    ok({ changes: { holderId: actor.userId, heldUntil: holdFromNow() } }),
  );

/** Gives a claim back to the list, with a reason only the distributor reads. */
export const putBackClaim = (actor: Actor, { number, reason }: { number: string; reason: string }) =>
  moveClaim<never>(actor, { number, move: "putBack" }, () =>
    ok({
      changes: { holderId: null, heldUntil: null, parkedWithId: null, parkedQuestion: null },
      detail: { reason },
      isOwnOnly: true,
    }),
  );

type HolderChange = { number: string };

/** A change within "being judged": the state stays, the timeline says what happened, only the distributor sees it. */
const whileJudging = <Code extends string>(
  actor: Actor,
  number: string,
  change: (claim: Claim, work: Work) => Promise<{ kind: string; detail: Record<string, unknown> } | Code>,
) =>
  undoing<HolderChange, Code | "notFound" | "moveNotOpen">(actor, async (work) => {
    const claim = await claimForChange(work, number);
    if (!claim || claim.sellerId !== actor.organisationId) return refuse("notFound");
    if (claim.state !== "beingJudged" || !actor.roles.has("assessor")) return refuse("moveNotOpen");
    const made = await change(claim, work);
    if (typeof made === "string") return refuse(made);
    await appendToTimeline(work, claim, { ...made, onlyForId: claim.sellerId });
    return ok({ number });
  });

/** Takes over a claim a colleague holds: a deliberate step, and it is written down. */
export const takeOverClaim = (actor: Actor, { number }: { number: string }) =>
  whileJudging<"moveNotOpen">(actor, number, async (claim, { transaction }) => {
    if (gaveTheVerdict(actor, claim)) return "moveNotOpen" as const;
    await claim.update({ holderId: actor.userId, heldUntil: holdFromNow() }, { transaction });
    return { kind: "takenOver", detail: {} };
  });

/** Leaves a claim with a question to a colleague. It stays being judged; the clock of the distributor runs on. */
export const parkClaim = (actor: Actor, input: { number: string; colleagueId: string; question: string }) =>
  whileJudging<"notFound" | "moveNotOpen">(actor, input.number, async (claim, work) => {
    if (claim.holderId !== actor.userId) return "moveNotOpen" as const;
    const [colleague] = await rows<{ name: string }>(
      work,
      `select u.name from users u join membership_roles r on r.user_id = u.id and r.organisation_id = $2 and r.role = 'assessor'
         join memberships m on m.user_id = u.id and m.organisation_id = $2 and m.disabled_at is null
       where u.id = $1`,
      [input.colleagueId, actor.organisationId],
    );
    if (!colleague) return "notFound" as const;
    const parked = { parkedWithId: input.colleagueId, parkedQuestion: input.question };
    await claim.update(parked, { transaction: work.transaction });
    return { kind: "parked", detail: { colleague: colleague.name, question: input.question } };
  });

type Ask = { number: string; question: string; rowIds: readonly string[] };

/** Days the workshop has before a query lapses; the terms of the filing day say so, and 30 where there are none. */
const DAYS_TO_ANSWER = 30;

const nextRound = async ({ transaction }: Work, claimId: string): Promise<number> => {
  const last = await ClaimQuery.findOne({ where: { claimId }, order: [["round", "DESC"]], transaction });
  return (last?.round ?? 0) + 1;
};

/** Of the rows asked for, those of the claim's Evidence list: a row without a name would keep the mail from being written. */
async function rowsOnList(work: Work, claim: Claim, rowIds: readonly string[]): Promise<string[]> {
  const [sent] = await rows<{ filedOn: CalendarDay | null }>(
    work,
    `select facts ->> 'filedOn' as "filedOn" from claim_revisions where claim_id = $1 and revision = $2`,
    [claim.id, claim.revision],
  );
  const list = await evidenceListOn(work, {
    sellerId: claim.sellerId,
    family: claim.family ?? "",
    symptom: claim.symptom ?? "",
    on: sent?.filedOn ?? todayOf(work.actor),
  });
  return rowIds.filter((asked) => list.rows.some(({ id }) => id === asked));
}

/** Asks the workshop once for all that is missing. Its clock starts, the distributor's stops, a mail goes out. */
export const askWorkshop = (actor: Actor, { number, question, rowIds }: Ask) =>
  moveClaim<never>(actor, { number, move: "ask" }, async (claim, work) => {
    const round = await nextRound(work, claim.id);
    const wanted = await rowsOnList(work, claim, rowIds);
    const terms = await findRule(work, "terms", {
      sellerId: claim.sellerId,
      family: claim.family,
      on: todayOf(actor),
    });
    const lapsesOn = addDays(todayOf(actor), terms?.body.queryLapseDays ?? DAYS_TO_ANSWER);
    const { id: claimId, sellerId, workshopId } = claim;
    await ClaimQuery.create(
      { claimId, sellerId, workshopId, round, items: wanted, question, askedById: actor.userId },
      { transaction: work.transaction },
    );
    await mailClaimPeople(
      work,
      { claimId: claim.id, to: "workshop" },
      {
        kind: "queryAsked",
        dedupeKey: `queryAsked:${claim.id}:${round}`,
        params: {
          link: publicUrl(claimPath(claim)),
          number: printClaimNumber(number),
          distributor: await nameOf(work, claim.sellerId),
          question,
          family: claim.family ?? "",
          rowIds: wanted,
          answerBy: lapsesOn,
        },
      },
    );
    return ok({
      changes: { ...clockStanding(claim, new Date()), queryLapsesOn: lapsesOn },
      detail: { round, question, rowIds: wanted, answerBy: lapsesOn },
    });
  });
