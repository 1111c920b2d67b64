import "server-only";
import type { Actor } from "@/lib/access/actor";
import { askToSettle } from "@/lib/claims/contesting/service";
import { todayOf } from "@/lib/access/today-queries";
import { appendToTimeline } from "@/lib/claims/timeline/service";
import { allocateNote, type AllocationRefusal, type AllocationWay } from "@/lib/credits/ledger";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { parseMoney, type Money } from "@/lib/kernel/money";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { allows } from "@/lib/people/rights-queries";
import { newestVerdict } from "../issuing/verdict-queries";
import { enterInLedger, entryOf } from "../ledger/service";
import { setLineStates } from "../notes/line-states-service";
import { holdNote, type AllocationRow, type HeldNote } from "../notes/standing-queries";
import type { AllocateInput, TakeBackInput } from "../schema";

type Refused =
  | AllocationRefusal
  | "notFound"
  | "notAllowed"
  | "allocatedAlready"
  | "noteReversed"
  | "amountNotReadable"
  | "amountTooFine"
  | "amountTooLarge";

export type Changed = { readonly number: string; readonly sellerId: string };
const changed = ({ document, sellerId }: HeldNote): Changed => ({ number: document.number, sellerId });

/** Whether the note is that of the newest verdict, or comes to the same sums: another one has to be countered. */
async function isOfVerdict(work: Work, note: HeldNote): Promise<boolean> {
  const verdict = await newestVerdict(work, note.claim.id);
  if (!verdict || verdict.id === note.verdictId) return true;
  const { netMinor, totalMinor } = note.document;
  return verdict.credit?.netMinor === netMinor && verdict.credit.totalMinor === totalMinor;
}

type ToKeep = Money & {
  readonly how: AllocationWay;
  readonly reference: string;
  readonly takesBackId: string | null;
};

async function keepAllocation(work: Work, note: HeldNote, kept: ToKeep): Promise<string> {
  const [row] = await rows<{ id: string }>(
    work,
    `insert into credit_allocations (note_id, seller_id, workshop_id, amount_minor, how, reference, allocated_on, takes_back_id,
       allocated_by_id) values ($1, $2, $3, $4, $5, $6, $7, $8, $9) returning id`,
    [
      note.id,
      note.claim.sellerId,
      note.claim.workshopId,
      String(kept.minor),
      kept.how,
      kept.reference,
      todayOf(work.actor),
      kept.takesBackId,
      work.actor.userId,
    ],
  );
  if (!row) throw new Error(`an allocation of ${note.document.number} was not kept`);
  return row.id;
}

/** Allocations that stand: not taken back, and not the taking back itself. */
const standing = (allocations: readonly AllocationRow[]): AllocationRow[] => {
  const taken = new Set(allocations.map(({ takesBackId }) => takesBackId));
  return allocations.filter(({ id, takesBackId }) => takesBackId === null && !taken.has(id));
};

async function allocate(
  work: Work,
  note: HeldNote,
  { amount, how, reference }: { amount: Money; how: AllocationWay; reference: string },
): Promise<Outcome<Changed, Refused>> {
  const { currency, minor } = amount;
  const decided = allocateNote(note.inLedger, { how, currency, amountMinor: minor });
  if (!decided.ok) return decided;
  const allocationId = await keepAllocation(work, note, { ...amount, how, reference, takesBackId: null });
  await enterInLedger(work, {
    movement: decided.value.movement,
    workshopId: note.claim.workshopId,
    enteredOn: todayOf(work.actor),
    noteId: note.id,
    allocationId,
    countersSequence: null,
  });
  await appendToTimeline(work, note.claim, {
    kind: "noteAllocated",
    detail: { note: note.document.number, reference },
  });
  if (decided.value.openMinor > 0n) return ok(changed(note));
  const isPaid = [...standing(note.allocations).map((one) => one.how), how].every((way) => way === "paidOut");
  await setLineStates(work, note.id, isPaid ? "paidOut" : "allocated");
  await askToSettle(work);
  return ok(changed(note));
}

/**
 * Sets a note, or a part of it, against an invoice of the workshop, or notes that it was paid out. Never more than is open.
 * `rowsBefore` is how many allocations the page showed: pressed twice, it is allocated once.
 */
export const allocateCredit = (actor: Actor, input: AllocateInput): Promise<Outcome<Changed, Refused>> =>
  undoing<Changed, Refused>(actor, async (work) => {
    if (!(await allows(work, "issueCredits"))) return refuse("notAllowed");
    const note = await holdNote(work, input.number);
    if (!note) return refuse("notFound");
    if (note.allocations.length !== input.rowsBefore) return refuse("allocatedAlready");
    if (!(await isOfVerdict(work, note))) return refuse("noteReversed");
    const amount = parseMoney(input.amount, note.inLedger.currency);
    if (!amount.ok) return { ...amount, field: "amount" };
    return allocate(work, note, { amount: amount.value, how: input.how, reference: input.reference });
  });

type TakeBackRefusal = "notFound" | "notAllowed" | "allocationGone" | "creditSettled";

/** Takes an allocation back whole, by a row and an entry of its own; the note is open again by that much. Not once the claim is settled. */
export const takeBackAllocation = (
  actor: Actor,
  { number, allocationId }: TakeBackInput,
): Promise<Outcome<Changed, TakeBackRefusal>> =>
  undoing<Changed, TakeBackRefusal>(actor, async (work) => {
    if (!(await allows(work, "issueCredits"))) return refuse("notAllowed");
    const note = await holdNote(work, number);
    if (!note) return refuse("notFound");
    if (note.claim.state === "settled") return refuse("creditSettled");
    const taken = standing(note.allocations).find(({ id }) => id === allocationId);
    if (!taken) return refuse("allocationGone");
    const { how, reference } = taken;
    const { currency } = note.inLedger;
    const amountMinor = BigInt(taken.amountMinor);
    const counterId = await keepAllocation(work, note, {
      minor: -amountMinor,
      currency,
      how,
      reference,
      takesBackId: allocationId,
    });
    await enterInLedger(work, {
      movement: { kind: "allocationTakenBack", how, currency, amountMinor },
      workshopId: note.claim.workshopId,
      enteredOn: todayOf(actor),
      noteId: note.id,
      allocationId: counterId,
      countersSequence: await entryOf(work, { noteId: note.id, allocationId }),
    });
    await reopenLines(work, note.id);
    await appendToTimeline(work, note.claim, {
      kind: "allocationTakenBack",
      detail: { note: note.document.number, reference },
    });
    return ok(changed(note));
  });

/** Lines that were closed by this note are open again; those of which a later verdict owes more stay due. */
const reopenLines = (work: Work, noteId: string) =>
  rows(
    work,
    `update claim_lines set credit_state = 'noteIssued' where credit_state in ('allocated', 'paidOut')
       and id in (select l.line_id from credit_note_lines l where l.note_id = $1) returning id`,
    [noteId],
  );
