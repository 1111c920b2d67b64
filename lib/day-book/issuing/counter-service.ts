import "server-only";
import type { Actor } from "@/lib/access/actor";
import { creditRulesOn, lineNumbersOwed } from "@/lib/claims/deciding/credit-service";
import { todayOf } from "@/lib/access/today-queries";
import { appendToTimeline } from "@/lib/claims/timeline/service";
import { counterNote } from "@/lib/credits/ledger";
import { counterDocument, type NoteDocument } from "@/lib/credits/note-document";
import { rows, undoing, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { allows } from "@/lib/people/rights-queries";
import { enterInLedger, entryOf } from "../ledger/service";
import { setLineStates } from "../notes/line-states-service";
import { mailNote } from "../notes/mail-service";
import { holdNote, type HeldNote } from "../notes/standing-queries";
import type { CounterInput } from "../schema";
import { keepNote, type LineKeys } from "./note-service";
import { takeNoteNumber } from "./series-service";
import { newestVerdict } from "./verdict-queries";

type Refused =
  "notFound" | "notAllowed" | "noteCountered" | "noteAllocated" | "noteDayBeforeLast" | "creditSettled";
export type Countered = { readonly number: string; readonly sellerId: string };

const lineKeysOf = (work: Work, noteId: string): Promise<LineKeys[]> =>
  rows<LineKeys>(
    work,
    `select distinct on (c.line_number) c.line_number as "lineNumber", l.line_id as "lineId", l.invoice_line_id as "invoiceLineId"
     from credit_note_lines l join claim_lines c on c.id = l.line_id where l.note_id = $1 order by c.line_number`,
    [noteId],
  );

async function writeCounter(
  work: Work,
  note: HeldNote,
  reason: string,
): Promise<Outcome<{ noteId: string; document: NoteDocument }, "noteDayBeforeLast">> {
  const issuedOn = todayOf(work.actor);
  const { sellerId } = note.claim;
  const rules = await creditRulesOn(work, { sellerId, currency: note.document.currency, on: issuedOn });
  const taken = await takeNoteNumber(work, { issuedOn, prefix: rules.notePrefix });
  if (!taken.ok) return taken;
  const document = counterDocument(note.document, { number: taken.value.number, issuedOn, reason });
  const noteId = await keepNote(work, note.claim, {
    document,
    taken: taken.value,
    verdictId: note.verdictId,
    countersId: note.id,
    lines: await lineKeysOf(work, note.id),
  });
  return ok({ noteId, document });
}

/** After its counter note a line reads `countered`, unless a later verdict has said what is owed now. */
async function settleStates(work: Work, note: HeldNote): Promise<void> {
  const verdict = await newestVerdict(work, note.claim.id);
  if (!verdict || verdict.id === note.verdictId) {
    await setLineStates(work, note.id, "countered");
    return;
  }
  const owed = verdict.credit ? lineNumbersOwed(verdict.credit) : [];
  await rows(
    work,
    `update claim_lines set credit_state = case when line_number = any ($2::integer[]) then 'due' else 'none' end
     where claim_id = $1 and id in (select l.line_id from credit_note_lines l where l.note_id = $3) returning id`,
    [note.claim.id, owed, note.id],
  );
}

/**
 * Takes an issued note back by a counter note with a number of its own: the same amounts in the other direction. Refuses
 * a note of which anything stands allocated, and one that is countered already.
 */
export const counterCredit = (
  actor: Actor,
  { number, reason }: CounterInput,
): Promise<Outcome<Countered, Refused>> =>
  undoing<Countered, Refused>(actor, async (work) => {
    if (!(await allows(work, "issueCredits"))) return refuse("notAllowed");
    const note = await holdNote(work, number);
    if (!note) return refuse("notFound");
    if (note.claim.state === "settled") return refuse("creditSettled");
    const open = counterNote(note.inLedger);
    if (!open.ok) return open;
    const written = await writeCounter(work, note, reason);
    if (!written.ok) return written;

    const { noteId, document } = written.value;
    const { currency, netMinor, taxMinor, issuedOn } = document;
    await enterInLedger(work, {
      movement: { kind: "noteCountered", currency, netMinor, taxMinor },
      workshopId: note.claim.workshopId,
      enteredOn: issuedOn,
      noteId,
      allocationId: null,
      countersSequence: await entryOf(work, { noteId: note.id, allocationId: null }),
    });
    await settleStates(work, note);
    await appendToTimeline(work, note.claim, {
      kind: "noteCountered",
      detail: { note: note.document.number, counter: document.number, reason },
    });
    await mailNote(work, { noteId, sellerId: note.sellerId, document });
    return ok({ number: document.number, sellerId: note.sellerId });
  });
