import type { Actor } from "@/lib/access/actor";
import { emptyDraft, emptyLine, type ClaimDraft, type DraftLine } from "@/lib/claims/draft";
import { checkDraft } from "@/lib/claims/filing/queries";
import { saveDraft } from "@/lib/claims/filing/service";
import { buildClaim, insertRow, type Between } from "../support/build";

type Draft = { readonly id: string; readonly number: string };

/** A stored draft that can be sent as it is, where the distributor has no Evidence list. */
export async function draftReady(
  between: Between,
  line: Partial<DraftLine>,
  over: Partial<ClaimDraft> = {},
): Promise<Draft> {
  const claim = await buildClaim(between);
  const body: ClaimDraft = {
    ...emptyDraft(),
    lines: [{ ...emptyLine(), fittedOn: "2026-02-03", ...line }],
    frameSerial: "FR 20417",
    symptom: "drags",
    failedOn: "2026-05-04",
    ...over,
  };
  await insertRow("claim_drafts", {
    claim_id: claim.id,
    seller_id: between.seller.id,
    workshop_id: between.workshop.id,
    body: JSON.stringify(body),
  });
  return claim;
}

/** Answers every row the Evidence list still wants with the reason why it cannot be got. */
export async function excuseMissingRows(actor: Actor, number: string): Promise<void> {
  const checked = await checkDraft(actor, number);
  const rows = (checked?.problems ?? []).flatMap(({ field }) =>
    field.startsWith("rows.") ? [[field.slice(5), "The vehicle has gone back to its owner."] as const] : [],
  );
  await saveDraft(actor, number, { cannotGet: Object.fromEntries(rows) });
}
