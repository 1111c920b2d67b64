import "server-only";
import { randomInt } from "node:crypto";
import type { Actor } from "@/lib/access/actor";
import { clockStanding } from "@/lib/claims/clock/distributor-clock";
import { todayOf } from "@/lib/access/today-queries";
import { claimForChange } from "@/lib/claims/moves/service";
import { printClaimNumber } from "@/lib/claims/number";
import { nameOf } from "@/lib/claims/parties/queries";
import { claimPath } from "@/lib/claims/paths";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { isBefore, type CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { readTypedDay } from "@/lib/kernel/typed-day";
import { mailClaimPeople } from "@/lib/mail/outbox";
import { publicUrl } from "@/lib/web/settings";
import type { Claim } from "@/models/claim";
import { ClaimLine } from "@/models/claim-line";
import { ReturnLine } from "@/models/return-line";
import { changeReturn, isOpen, writeMove, type Changed } from "./change-service";
import { makesMove } from "./lifecycle";
import { printReturnNumber, RETURN_NUMBERS, returnNumberFrom } from "./number";
import type { CallInInput, SettleInput } from "./schema";

const DRAWS = 20;

type CallIn = Omit<CallInInput, "dueOn" | "number"> & { readonly dueOn: CalendarDay };

/** Inserts the return under a number nobody has yet; a clash is drawn again inside the same transaction. */
async function insertNumbered(
  work: Work,
  claim: Claim,
  call: CallIn,
): Promise<{ id: string; number: string }> {
  for (let draw = 0; draw < DRAWS; draw += 1) {
    const [made] = await rows<{ id: string; number: string }>(
      work,
      `insert into part_returns (number, claim_id, seller_id, workshop_id, send_to, instructions, due_on, called_in_by_id)
       values ($1, $2, $3, $4, $5, $6, $7, $8) on conflict (number) do nothing returning id, number`,
      [
        returnNumberFrom(randomInt(RETURN_NUMBERS)),
        claim.id,
        claim.sellerId,
        claim.workshopId,
        call.sendTo,
        call.instructions,
        call.dueOn,
        work.actor.userId,
      ],
    );
    if (made) return made;
  }
  throw new Error("no free return number in twenty draws");
}

/** The return this person opened for exactly these lines within the last minute: the button was pressed twice. */
async function justOpened(work: Work, claim: Claim, lineIds: readonly string[]): Promise<string | null> {
  const [made] = await rows<{ number: string }>(
    work,
    `select r.number from part_returns r where r.claim_id = $1 and r.called_in_by_id = $2
       and r.called_in_at > now() - interval '1 minute'
       and (select array_agg(x.line_id order by x.line_id) from return_lines x where x.return_id = r.id)
         = (select array_agg(a order by a) from unnest($3::uuid[]) a)
     order by r.called_in_at desc limit 1`,
    [claim.id, work.actor.userId, [...lineIds]],
  );
  return made?.number ?? null;
}

async function openReturn(
  work: Work,
  claim: Claim,
  call: CallIn & { lines: readonly ClaimLine[] },
): Promise<string> {
  const { id, number } = await insertNumbered(work, claim, call);
  const { sellerId, workshopId } = claim;
  await ReturnLine.bulkCreate(
    call.lineIds.map((lineId) => ({ returnId: id, lineId, sellerId, workshopId })),
    { transaction: work.transaction },
  );
  const lines = call.lines.map(({ lineNumber }) => lineNumber);
  const detail = { returnNumber: number, lines, dueOn: call.dueOn, instructions: call.instructions };
  await writeMove(work, { claim, move: "callIn" }, { lineIds: call.lineIds, detail });
  await claim.update(clockStanding(claim, new Date()), { transaction: work.transaction });
  await mailClaimPeople(
    work,
    { claimId: claim.id, to: "workshop" },
    {
      kind: "partCalledIn",
      dedupeKey: `partCalledIn:${id}`,
      params: {
        link: publicUrl(claimPath(claim)),
        number: printClaimNumber(claim.number),
        returnNumber: printReturnNumber(number),
        distributor: await nameOf(work, claim.sellerId),
        sendTo: call.sendTo,
        instructions: call.instructions,
        sendBy: call.dueOn,
      },
    },
  );
  return number;
}

type CallInRefusal = "notFound" | "moveNotOpen" | "dayUnread" | "dayPast";

/**
 * Calls parts of a claim in to be examined, while it is being judged by this assessor. The claim stays where it is; the
 * distributor's clock stands until the parts are on their way. Refuses a day that cannot be read or is over.
 */
export const callInParts = (actor: Actor, input: CallInInput): Promise<Outcome<Changed, CallInRefusal>> =>
  undoing<Changed, CallInRefusal>(actor, async (work) => {
    const claim = await claimForChange(work, input.number);
    if (!claim) return refuse("notFound");
    if (!makesMove(actor, claim, "callIn")) return refuse("moveNotOpen");
    const made = await justOpened(work, claim, input.lineIds);
    if (made !== null) return ok({ number: made, claimNumber: claim.number });

    const lines = await ClaimLine.findAll({
      where: { claimId: claim.id, id: [...input.lineIds] },
      order: ["lineNumber"],
      transaction: work.transaction,
    });
    if (lines.length !== new Set(input.lineIds).size) return refuse("notFound");
    if (!lines.every(({ returnState }) => isOpen(actor, claim, { move: "callIn", returnState, dueOn: null })))
      return refuse("moveNotOpen");
    const today = todayOf(actor);
    const dueOn = readTypedDay(input.dueOn, actor.locale, today);
    if (!dueOn) return refuse("dayUnread", {}, "dueOn");
    if (isBefore(dueOn, today)) return refuse("dayPast", {}, "dueOn");
    const lineIds = lines.map(({ id }) => id);
    const number = await openReturn(work, claim, { ...input, dueOn, lineIds, lines });
    return ok({ number, claimNumber: claim.number });
  });

/**
 * Says that a part which was called in does not come: it need not, it was not sent in time, or it was sent and never
 * arrived. The reason says what proof of dispatch there is; both sides read it.
 */
export const settleReturn = (actor: Actor, { number, move, why }: SettleInput) =>
  changeReturn<never>(actor, {
    number,
    move,
    decide: ({ lines }) =>
      Promise.resolve(
        ok({
          lineIds: lines.map(({ lineId }) => lineId),
          detail: { returnNumber: number, lines: lines.map(({ lineNumber }) => lineNumber), reason: why },
        }),
      ),
  });
