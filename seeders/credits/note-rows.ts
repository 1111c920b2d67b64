import { idOf } from "../identity";
import { accountBetween } from "../story/organisations";
import { ACCOUNTANTS, PEOPLE } from "../story/people";
import { frozen } from "../frozen";
import { lineId } from "../claims/scene";
import type { Row, Tables } from "../tables";
import type { Document } from "./documents";
import type { Movement } from "./movements";

/** The id of a note or of its counter, from the verdict it is for. */
export const noteId = ({ note, what }: Pick<Movement, "note" | "what">): string =>
  idOf(what === "noteCountered" ? "counter note" : "credit note", note.verdictId);

export const allocationId = ({ note }: Pick<Movement, "note">): string => idOf("allocation", note.verdictId);

/** What an allocation sets against something: all of the note, or half of it. */
export function allocatedMinor({ note, scene }: Pick<Movement, "note" | "scene">): bigint {
  const total = scene.given?.credit.totalMinor ?? 0n;
  return note.allocation?.isWhole === false ? total / 2n : total;
}

/** Documents and their lines as rows. */
export const noteRows = (documents: readonly Document[]): Tables => ({
  creditNotes: documents.map(noteRow),
  creditNoteLines: documents.flatMap(lineRows),
});

function noteRow({ movement, document, year, sequence }: Document): Row {
  const { scene, note, what, at } = movement;
  const { one, life } = scene;
  const isCounter = what === "noteCountered";
  return {
    id: noteId(movement),
    ...life.parties,
    accountId: accountBetween(one.seller, one.workshop).id,
    claimId: life.claimId,
    verdictId: note.verdictId,
    kind: document.kind,
    year,
    sequence,
    number: document.number,
    issuedOn: document.issuedOn,
    currency: document.currency,
    netMinor: String(document.netMinor),
    taxMinor: String(document.taxMinor),
    totalMinor: String(document.totalMinor),
    document: frozen(document),
    countersId: isCounter ? noteId({ note, what: "noteIssued" }) : null,
    reason: isCounter ? document.reason : null,
    issuedById: PEOPLE[ACCOUNTANTS[one.seller]].id,
    issuedAt: at,
  };
}

const lineRows = ({ movement, document }: Document): Row[] =>
  document.lines.map((line) => ({
    noteId: noteId(movement),
    position: line.position,
    ...movement.scene.life.parties,
    lineId: lineId(movement.scene, line.lineNumber - 1),
    invoiceLineId: movement.scene.one.lines[line.lineNumber - 1]?.sale?.id ?? null,
    kind: line.kind,
    netMinor: String(line.netMinor),
    taxCategory: line.taxCategory,
    taxRate: line.taxRate,
    exemptionReason: line.exemptionReason,
  }));
