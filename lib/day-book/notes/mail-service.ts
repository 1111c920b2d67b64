import "server-only";
import { amountText } from "@/lib/credits/amount-text";
import type { NoteDocument } from "@/lib/credits/note-document";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { MailParams } from "@/lib/mail/outbox";
import { publicUrl } from "@/lib/web/settings";
import { notePath } from "../paths";

type Sent = { readonly noteId: string; readonly sellerId: string; readonly document: NoteDocument };

const paramsOf = ({ noteId, sellerId, document }: Sent): MailParams["creditNoteIssued"] => ({
  link: publicUrl(notePath({ number: document.number, sellerId })),
  number: document.claim.number,
  noteId,
  noteNumber: document.counters?.number ?? document.number,
  distributor: document.seller.name,
  amount: amountText(document.totalMinor, document.currency),
});

type Mail = { readonly noteId: string; readonly kind: keyof MailParams; readonly params: object };

const send = (work: Work, { noteId, kind, params }: Mail) =>
  rows(work, "select guarded.mail_credit_note($1, $2, $3, $4)", [
    noteId,
    kind,
    JSON.stringify(params),
    `${kind}:${noteId}`,
  ]);

/** Mails a note to those who keep the workshop's books; the worker adds the document. Written twice, it is sent once. */
export const mailNote = (work: Work, sent: Sent): Promise<unknown> => {
  const { document, noteId } = sent;
  if (document.kind === "credit")
    return send(work, { noteId, kind: "creditNoteIssued", params: paramsOf(sent) });
  const params: MailParams["creditNoteCountered"] = {
    ...paramsOf(sent),
    counterNumber: document.number,
    reason: document.reason ?? "",
  };
  return send(work, { noteId, kind: "creditNoteCountered", params });
};
