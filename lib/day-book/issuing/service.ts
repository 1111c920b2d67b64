import "server-only";
import type { Actor } from "@/lib/access/actor";
import { creditRulesOn, lineNumbersOwed, standingNote } from "@/lib/claims/deciding/credit-service";
import { todayOf } from "@/lib/access/today-queries";
import { claimForChange } from "@/lib/claims/moves/service";
import { appendToTimeline } from "@/lib/claims/timeline/service";
import type { Credit } from "@/lib/credits/credit";
import { noteDocument, type NoteDocument } from "@/lib/credits/note-document";
import { undoing, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { allows } from "@/lib/people/rights-queries";
import type { Claim } from "@/models/claim";
import { enterInLedger } from "../ledger/service";
import { setLineStates } from "../notes/line-states-service";
import { mailNote } from "../notes/mail-service";
import type { IssueOne } from "../schema";
import type { IssueRefusal } from "../views";
import { keepNote } from "./note-service";
import { takeNoteNumber } from "./series-service";
import {
  countIssued,
  headOfNote,
  lineKeysOf,
  newestVerdict,
  givesBackTooMuch,
  type NewestVerdict,
} from "./verdict-queries";

export type Issued = { readonly noteNumber: string; readonly number: string };
type Ready = { readonly verdict: NewestVerdict; readonly credit: Credit };

/** Whether a note may be issued now, asked under the lock of the claim. */
async function readyToIssue(
  work: Work,
  claim: Claim,
  issuedBefore: number,
): Promise<Outcome<Ready, IssueRefusal>> {
  if (claim.state === "contested") return refuse("creditContested");
  if (claim.state !== "decided") return refuse("creditNotDecided");
  if ((await countIssued(work, claim.id)) !== issuedBefore) return refuse("creditIssuedAlready");
  const verdict = await newestVerdict(work, claim.id);
  const credit = verdict?.credit;
  if (!verdict || !credit) return refuse("creditNothing");
  const owed = lineNumbersOwed(credit);
  const isOwed = verdict.lines.some(
    ({ lineNumber, creditState }) =>
      owed.includes(lineNumber) && (creditState === "due" || creditState === "countered"),
  );
  if (!isOwed) return refuse("creditNothing");
  return (await standingNote(work, claim.id)) ? refuse("creditCounterFirst") : ok({ verdict, credit });
}

async function writeNote(
  work: Work,
  claim: Claim,
  { verdict, credit }: Ready,
): Promise<Outcome<{ noteId: string; document: NoteDocument }, IssueRefusal>> {
  const issuedOn = todayOf(work.actor);
  const { sellerId } = claim;
  const rules = await creditRulesOn(work, { sellerId, currency: credit.currency, on: issuedOn });
  const head = await headOfNote(work, claim, verdict);
  const taken = await takeNoteNumber(work, { issuedOn, prefix: rules.notePrefix });
  if (!taken.ok) return taken;
  const document = noteDocument({ ...head, credit, number: taken.value.number, issuedOn });
  const noteId = await keepNote(work, claim, {
    document,
    taken: taken.value,
    verdictId: verdict.id,
    countersId: null,
    lines: lineKeysOf(verdict),
  });
  // Under the lock of the series nobody else adds a note meanwhile.
  return (await givesBackTooMuch(work, noteId)) ? refuse("creditOverInvoice") : ok({ noteId, document });
}

/**
 * Issues the credit note of a claim's newest verdict: number, frozen document, lines, ledger entry, states, timeline and
 * mail in one transaction. `issuedBefore` is how many notes the claim had when the page was drawn: pressed twice, one is
 * issued. Refuses a contested claim, and one whose earlier note stands: that is countered first.
 */
export const issueCredit = (actor: Actor, input: IssueOne): Promise<Outcome<Issued, IssueRefusal>> =>
  undoing<Issued, IssueRefusal>(actor, async (work) => {
    if (!(await allows(work, "issueCredits"))) return refuse("notAllowed");
    const claim = await claimForChange(work, input.number);
    if (!claim || claim.sellerId !== actor.organisationId) return refuse("notFound");
    const ready = await readyToIssue(work, claim, input.issuedBefore);
    if (!ready.ok) return ready;
    const written = await writeNote(work, claim, ready.value);
    if (!written.ok) return written;

    const { noteId, document } = written.value;
    const { currency, netMinor, taxMinor } = document;
    await enterInLedger(work, {
      movement: { kind: "noteIssued", currency, netMinor, taxMinor },
      workshopId: claim.workshopId,
      enteredOn: document.issuedOn,
      noteId,
      allocationId: null,
      countersSequence: null,
    });
    await setLineStates(work, noteId, "noteIssued");
    await appendToTimeline(work, claim, { kind: "noteIssued", detail: { note: document.number } });
    await mailNote(work, { noteId, sellerId: claim.sellerId, document });
    return ok({ noteNumber: document.number, number: input.number });
  });

export type IssuedSeveral = {
  readonly issued: readonly Issued[];
  readonly refused: readonly { readonly number: string; readonly code: IssueRefusal }[];
};

/** Issues the notes of several claims, each in a transaction of its own: one that is refused keeps no other back. */
export async function issueCredits(
  actor: Actor,
  { claims }: { readonly claims: readonly IssueOne[] },
): Promise<Outcome<IssuedSeveral, IssueRefusal>> {
  const issued: Issued[] = [];
  const refused: { number: string; code: IssueRefusal }[] = [];
  let first: Outcome<never, IssueRefusal> | null = null;
  for (const claim of claims) {
    const outcome = await issueCredit(actor, claim);
    if (outcome.ok) issued.push(outcome.value);
    else {
      first ??= outcome;
      refused.push({ number: claim.number, code: outcome.code });
    }
  }
  return issued.length === 0 && first ? first : ok({ issued, refused });
}
