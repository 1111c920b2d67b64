import "server-only";
import type { Actor } from "@/lib/access/actor";
import { clockRunning } from "@/lib/claims/clock/distributor-clock";
import type { ReturnState } from "@/lib/claims/lifecycle";
import { todayOf } from "@/lib/access/today-queries";
import { appendToTimeline } from "@/lib/claims/timeline/service";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { familyOf } from "@/lib/parts/families";
import type { PartFamily } from "@/lib/parts/family";
import { Claim } from "@/models/claim";
import { ClaimLine } from "@/models/claim-line";
import { PartReturn } from "@/models/part-return";
import { makesMove, PART_ENTRIES, PART_MOVES, partMovesOpenTo, type PartMove } from "./lifecycle";

export type PartRow = {
  readonly lineId: string;
  readonly lineNumber: number;
  readonly returnState: ReturnState;
  readonly serial: string | null;
  readonly family: PartFamily | null;
  readonly parcelId: string | null;
};

/** What a change works on: the claim, locked; the return; those of its lines that the move is open for. */
export type Found = {
  readonly claim: Claim;
  readonly returned: PartReturn;
  readonly lines: readonly PartRow[];
};

/** What a change writes besides the new state of its lines. */
export type Change = {
  readonly lineIds: readonly string[];
  readonly detail?: Readonly<Record<string, unknown>>;
};

/** The answer to every change of a return; the same where it was made a moment before. */
export type Changed = { readonly number: string; readonly claimNumber: string };

type Refused = "notFound" | "moveNotOpen";

// A line may have been called in before: it belongs to the newest return it is on.
const LINES = `select l.id as "lineId", l.line_number as "lineNumber", l.return_state as "returnState",
    coalesce(u.serial, l.serial_typed) as serial, p.family, x.parcel_id as "parcelId"
  from return_lines x join claim_lines l on l.id = x.line_id
    join parts p on p.seller_id = l.seller_id and p.id = l.part_id
    left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
  where x.return_id = $1 and not exists (select 1 from return_lines y join part_returns n on n.id = y.return_id
      join part_returns o on o.id = x.return_id
    where y.line_id = x.line_id and (n.called_in_at, n.id) > (o.called_in_at, o.id))
  order by l.line_number`;

type LineRow = Omit<PartRow, "family"> & { family: string };

/** The lines of a return, as they stand under the claim's lock. */
const linesOfReturn = async (work: Work, returnId: string): Promise<PartRow[]> =>
  (await rows<LineRow>(work, LINES, [returnId])).map((line) => ({ ...line, family: familyOf(line.family) }));

/** Lets the distributor's clock run again once nothing is awaited of the workshop any more. */
async function letClockRun(work: Work, claim: Claim): Promise<void> {
  if (claim.clockStoppedAt === null || claim.state === "answerNeeded") return;
  const { transaction } = work;
  const awaited = await ClaimLine.findOne({
    where: { claimId: claim.id, returnState: "awaited" },
    transaction,
  });
  if (!awaited) await claim.update(clockRunning(claim, new Date()), { transaction });
}

/** Writes the new state of some lines and the entry of the move, both parties reading it. */
export async function writeMove(
  work: Work,
  { claim, move }: { claim: Claim; move: PartMove },
  { lineIds, detail = {} }: Change,
): Promise<void> {
  await ClaimLine.update(
    { returnState: PART_MOVES[move].to },
    { where: { claimId: claim.id, id: [...lineIds] }, transaction: work.transaction },
  );
  await appendToTimeline(work, claim, { kind: PART_ENTRIES[move], detail });
}

type Asked<Code extends string> = {
  readonly number: string;
  readonly move: PartMove;
  /** Looks only at this line of the return. */
  readonly lineNumber?: number;
  /** True where the same was just done: it is then answered like the first time. */
  readonly isDone?: (work: Work, lines: readonly PartRow[]) => Promise<boolean>;
  readonly decide: (found: Found, work: Work) => Promise<Outcome<Change, Code>>;
};

/**
 * The one way the parts of a return move on: load, lock the claim, ask the table of moves, decide, write the lines and
 * the record together. A second press of the same button is answered like the first. Refuses `notFound`, `moveNotOpen`,
 * and whatever the decision refuses; then nothing is written.
 */
export const changeReturn = <Code extends string>(
  actor: Actor,
  asked: Asked<Code>,
): Promise<Outcome<Changed, Code | Refused>> =>
  undoing<Changed, Code | Refused>(actor, async (work) => {
    const { number, move } = asked;
    const { transaction } = work;
    const returned = await PartReturn.findOne({ where: { number }, transaction });
    const claim =
      returned && (await Claim.findByPk(returned.claimId, { transaction, lock: transaction.LOCK.UPDATE }));
    if (!claim) return refuse("notFound");
    if (!makesMove(actor, claim, move)) return refuse("moveNotOpen");

    const all = await linesOfReturn(work, returned.id);
    const lines = all.filter(
      (line) => asked.lineNumber === undefined || line.lineNumber === asked.lineNumber,
    );
    if (lines.length === 0) return refuse("notFound");
    const answer = { number, claimNumber: claim.number };
    const isDone = asked.isDone ?? isInState(PART_MOVES[move].to);
    if (await isDone(work, lines)) return ok(answer);
    const open = lines.filter(({ returnState }) =>
      isOpen(actor, claim, { move, returnState, dueOn: returned.dueOn }),
    );
    if (open.length === 0) return refuse("moveNotOpen");

    const decision = await asked.decide({ claim, returned, lines: open }, work);
    if (!decision.ok) return decision;
    await writeMove(work, { claim, move }, decision.value);
    await letClockRun(work, claim);
    return ok(answer);
  });

const isInState = (state: ReturnState) => (_work: Work, lines: readonly PartRow[]) =>
  Promise.resolve(lines.every(({ returnState }) => returnState === state));

type Standing = { move: PartMove; returnState: ReturnState; dueOn: CalendarDay | null };

/** Whether the move is open to this person for a part that stands so. */
export const isOpen = (actor: Actor, claim: Claim, { move, returnState, dueOn }: Standing): boolean => {
  const { sellerId, workshopId, state: claimState, holderId } = claim;
  const part = { sellerId, workshopId, claimState, holderId, returnState, dueOn };
  return partMovesOpenTo(actor, part, todayOf(actor)).includes(move);
};
