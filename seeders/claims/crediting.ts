import type { CreditState } from "@/lib/claims/lifecycle";
import { idOf } from "../identity";
import { ACCOUNTANTS, CLAIMANTS, type PersonKey } from "../story/people";
import type { NoteMade, Scene } from "./scene";

const accountant = ({ one }: Scene): PersonKey => ACCOUNTANTS[one.seller];

/** Moves the credit of every line that has one. */
function creditLines({ lines }: Scene, from: CreditState, to: CreditState): void {
  for (const line of lines) if (line.creditState === from) line.creditState = to;
}

const isOwed = ({ lines }: Scene): boolean => lines.some(({ creditState }) => creditState === "due");

/** Issues the note of the verdict that stands. Where it gives nothing there is none. */
export function issueNote(scene: Scene): void {
  const { life } = scene;
  if (!isOwed(scene)) return;
  const detail = {};
  scene.note = {
    verdictId: idOf("verdict", life.claimId, scene.verdicts),
    issuedAt: life.lastAt,
    details: [detail],
    allocation: null,
    countered: null,
  };
  creditLines(scene, "due", "noteIssued");
  life.write({ kind: "noteIssued", by: accountant(scene), detail });
}

type Entry = { readonly note: NoteMade; readonly kind: string };

function tellOfNote(scene: Scene, { note, kind }: Entry, more: Record<string, unknown> = {}): void {
  const detail = { ...more };
  note.details.push(detail);
  scene.life.write({ kind, by: accountant(scene), detail });
}

/** Sets the note against the workshop's next invoice. */
export function allocate(scene: Scene): void {
  const { note, life } = scene;
  if (!note) return;
  note.allocation = { how: "invoice", at: life.lastAt, isWhole: true };
  creditLines(scene, "noteIssued", "allocated");
  tellOfNote(scene, { note, kind: "noteAllocated" });
}

/** Sets half of the note against an invoice: the rest stays open. */
export function allocatePart(scene: Scene): void {
  const { note, life } = scene;
  if (!note) return;
  note.allocation = { how: "invoice", at: life.lastAt, isWhole: false };
  tellOfNote(scene, { note, kind: "noteAllocated" });
}

export function payOut(scene: Scene): void {
  const { note, life } = scene;
  if (!note) return;
  note.allocation = { how: "paidOut", at: life.lastAt, isWhole: true };
  creditLines(scene, "noteIssued", "paidOut");
  tellOfNote(scene, { note, kind: "noteAllocated" });
}

/** A note with a mistake in it is countered whole by a document of its own. */
export function counter(scene: Scene): void {
  const { note, life, seller } = scene;
  if (!note) return;
  note.countered = { at: life.lastAt, reason: seller.counterReason };
  creditLines(scene, "noteIssued", "countered");
  tellOfNote(scene, { note, kind: "noteCountered" }, { reason: seller.counterReason });
}

/** A unit is sent in place of the failed one: nothing is credited. */
export function replace(scene: Scene): void {
  creditLines(scene, "due", "replaced");
}

/** The workshop accepts the verdict before its days to contest are over. */
export function waiveContest(scene: Scene): void {
  const { life, one } = scene;
  scene.fields["contestWaivedAt"] = life.lastAt;
  life.write({ kind: "accepted", by: CLAIMANTS[one.workshop].contests, detail: {} });
}
