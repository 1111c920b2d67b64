import "server-only";
import type { CreditState } from "@/lib/claims/lifecycle";
import { rows, type Work } from "@/lib/db/unit-of-work";

/** Where the claim lines of a note stand now. */
export const setLineStates = (work: Work, noteId: string, state: CreditState): Promise<unknown> =>
  rows(
    work,
    `update claim_lines set credit_state = $2 where id in (select l.line_id from credit_note_lines l where l.note_id = $1)
     returning id`,
    [noteId, state],
  );
