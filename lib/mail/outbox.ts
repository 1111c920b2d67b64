import "server-only";
import type { ExplainedCredit } from "@/lib/credits/explained";
import { rows, type Work } from "@/lib/db/unit-of-work";

/**
 * Every mail the product sends, with what its text needs: codes, digits and days, never words, because the worker
 * writes the text in the recipient's language (`lib/mail/letter.ts`).
 */
export type MailParams = {
  passwordReset: { link: string; minutes: number };
  invitation: { link: string; organisation: string; inviter: string; days: number };
  claimFiled: { link: string; number: string; distributor: string; part: string; answerBy: string };
  queryAsked: {
    link: string;
    number: string;
    distributor: string;
    question: string;
    family: string;
    rowIds: string[];
    answerBy: string;
  };
  queryReminder: MailParams["queryAsked"];
  claimLapsed: { link: string; number: string; distributor: string; answerBy: string };
  queryAnswered: { link: string; number: string; workshop: string; revision: number };
  claimDecided: {
    link: string;
    number: string;
    distributor: string;
    outcome: string;
    letter: string;
    contestUntil: string;
    /** What is given, with its chain; null where nothing is. */
    credit: ExplainedCredit | null;
  };
  /** With the note as a PDF: the worker makes it from the frozen document. `amount` is such as "145.55 GBP". */
  creditNoteIssued: {
    link: string;
    number: string;
    noteId: string;
    noteNumber: string;
    distributor: string;
    amount: string;
  };
  creditNoteCountered: MailParams["creditNoteIssued"] & { counterNumber: string; reason: string };
  partCalledIn: {
    link: string;
    number: string;
    returnNumber: string;
    distributor: string;
    sendTo: string;
    instructions: string;
    sendBy: string;
  };
  partExamined: { link: string; number: string; finding: string; note: string };
};

export type MailKind = keyof MailParams;

type Letter<Kind extends MailKind> = {
  readonly kind: Kind;
  readonly params: MailParams[Kind];
  /** What makes this mail this mail: written twice, it is sent once. */
  readonly dedupeKey: string;
};

/**
 * Mails the people of a claim on one side: who started it and the managers (`workshop`), or who holds it (`holder`).
 * Their addresses stay in the database: one organisation never reads those of another.
 */
export const mailClaimPeople = <Kind extends MailKind>(
  work: Work,
  { claimId, to }: { claimId: string; to: "workshop" | "holder" },
  letter: Letter<Kind>,
): Promise<unknown> =>
  rows(work, "select guarded.mail_claim_people($1, $2, $3, $4, $5)", [
    claimId,
    to,
    letter.kind,
    JSON.stringify(letter.params),
    letter.dedupeKey,
  ]);
