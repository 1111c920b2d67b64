import { createHash } from "node:crypto";
import { canonicalText, type ClaimFacts } from "@/lib/claims/facts-shape";
import type { ClaimDraft } from "@/lib/claims/draft";
import { readDraft, type FoundLine } from "@/lib/claims/filing/read-draft";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { FAMILIES } from "@/lib/parts/families";
import { accountBetween, ORGANISATIONS } from "../story/organisations";
import type { Case, CaseLine } from "./case";
import type { RowsAsked } from "./rows-asked";

export type Sent = { readonly facts: ClaimFacts; readonly sha256: string };

/** What the records know about a line, as they would answer the workshop. */
const found = ({ part, unit, sale, installer, replacement }: CaseLine): FoundLine => ({
  part: { id: part.id, number: part.number, name: part.name },
  unit: unit && { id: unit.id, serial: unit.serial, batch: unit.batch.code },
  invoiceLine: sale && {
    id: sale.id,
    invoiceNumber: sale.invoiceNumber,
    lineNumber: sale.lineNumber,
    invoicedOn: sale.day,
    shippedOn: sale.day,
    unitPriceMinor: String(sale.unitPriceMinor),
    currency: sale.account.currency,
  },
  installer: installer && { id: installer.id, code: installer.code },
  replacementUnitId: replacement?.id ?? null,
});

type Sending = {
  readonly draft: ClaimDraft;
  readonly asked: RowsAsked;
  readonly sentOn: CalendarDay;
  readonly evidence: ClaimFacts["evidence"];
};

/** Reads a draft as the product does and freezes it. Throws where the product would not have let it be sent. */
export function factsSent(one: Case, { draft, asked, sentOn, evidence }: Sending): Sent {
  const { facts, problems } = readDraft(draft, {
    today: sentOn,
    filedOn: sentOn,
    locale: ORGANISATIONS[one.workshop].language,
    currency: accountBetween(one.seller, one.workshop).currency,
    family: FAMILIES[one.family],
    rows: asked.rows,
    evidenceListId: asked.listId,
    lines: one.lines.map(found),
    evidence,
  });
  if (!facts)
    throw new RangeError(
      `${one.number}: ${problems.map(({ field, code }) => `${field} ${code}`).join(", ")}`,
    );
  return { facts, sha256: createHash("sha256").update(canonicalText(facts)).digest("hex") };
}
