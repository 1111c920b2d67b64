import "server-only";
import { frozenText } from "@/lib/credits/frozen-credit-shape";
import type { NoteDocument } from "@/lib/credits/note-document";
import type { NextNumber } from "@/lib/credits/note-number";
import { rows, type Work } from "@/lib/db/unit-of-work";
import type { Claim } from "@/models/claim";

/** A line of the claim, with the line of the original invoice where there is one. */
export type LineKeys = {
  readonly lineNumber: number;
  readonly lineId: string;
  readonly invoiceLineId: string | null;
};

type ToKeep = {
  readonly document: NoteDocument;
  readonly taken: NextNumber;
  readonly verdictId: string;
  readonly countersId: string | null;
  readonly lines: readonly LineKeys[];
};

/** Keeps a note with its lines, as frozen. Returns its id. */
export async function keepNote(
  work: Work,
  claim: Claim,
  { document, taken, verdictId, countersId, lines }: ToKeep,
): Promise<string> {
  const [note] = await rows<{ id: string }>(
    work,
    `insert into credit_notes (seller_id, workshop_id, account_id, claim_id, verdict_id, kind, year, sequence, number, issued_on,
       currency, net_minor, tax_minor, total_minor, document, counters_id, reason, issued_by_id)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18) returning id`,
    [
      claim.sellerId,
      claim.workshopId,
      claim.accountId,
      claim.id,
      verdictId,
      document.kind,
      taken.series.year,
      taken.sequence,
      document.number,
      document.issuedOn,
      document.currency,
      String(document.netMinor),
      String(document.taxMinor),
      String(document.totalMinor),
      frozenText(document),
      countersId,
      document.reason,
      work.actor.userId,
    ],
  );
  if (!note) throw new Error(`note ${document.number} was not kept`);
  for (const line of document.lines) {
    const keys = lines.find(({ lineNumber }) => lineNumber === line.lineNumber);
    if (!keys) throw new Error(`note ${document.number} has a line its claim does not have`);
    await rows(
      work,
      `insert into credit_note_lines (note_id, position, seller_id, workshop_id, line_id, invoice_line_id, kind, net_minor,
         tax_category, tax_rate, exemption_reason) values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11)`,
      [
        note.id,
        line.position,
        claim.sellerId,
        claim.workshopId,
        keys.lineId,
        keys.invoiceLineId,
        line.kind,
        String(line.netMinor),
        line.taxCategory,
        line.taxRate,
        line.exemptionReason,
      ],
    );
  }
  return note.id;
}
