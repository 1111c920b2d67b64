import "server-only";
import { thawedNote } from "@/lib/credits/note-shape";
import type { Locale } from "@/lib/kernel/locale";
import { creditNotePdf } from "./credit-note";

export type Attachment = {
  readonly filename: string;
  readonly content: Uint8Array;
  readonly contentType: string;
};

/** A note as the file a mail carries or a browser opens; its name is its number. */
export async function noteAttachment(kept: unknown, locale: Locale): Promise<Attachment> {
  const note = thawedNote(kept);
  return {
    filename: `${note.number}.pdf`,
    content: await creditNotePdf(note, locale),
    contentType: "application/pdf",
  };
}
