import "server-only";
import type { Actor } from "@/lib/access/actor";
import { creditNotePdf } from "@/lib/documents/credit-note";
import { findNote } from "./queries";

/** A note the actor may read, as the file a browser opens; null where there is none. */
export async function openNotePdf(
  actor: Actor,
  named: { readonly number: string; readonly of: string },
): Promise<Response | null> {
  const note = await findNote(actor, named);
  if (!note) return null;
  const pdf = await creditNotePdf(note.document, actor.locale);
  return new Response(Buffer.from(pdf), {
    headers: {
      "content-type": "application/pdf",
      // The number is of capitals, digits and dashes alone.
      "content-disposition": `inline; filename="${note.document.number}.pdf"`,
      "x-content-type-options": "nosniff",
    },
  });
}
