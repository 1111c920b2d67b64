import { draftChange } from "@/lib/claims/draft-shape";
import { claimDigits } from "@/lib/claims/number";
import { saveDraft } from "@/lib/claims/filing/service";
import { route } from "@/lib/web/route";

/** Keeps what was typed. The same change twice is the same draft, so it may be sent again after a lost answer. */
export const PUT = route<{ number: string }, typeof draftChange>(
  { name: "PUT /claims/{number}/draft", body: draftChange },
  ({ session, params, body }) => saveDraft(session.actor, claimDigits(params.number), body),
);
