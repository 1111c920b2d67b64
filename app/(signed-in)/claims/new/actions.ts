"use server";

import { redirect } from "next/navigation";
import type { ActionResult } from "@/lib/kernel/action-result";
import { startClaim } from "@/lib/claims/filing/service";
import { draftStepPath } from "@/lib/claims/paths";
import { draftStartInput } from "@/lib/claims/schema";
import { action } from "@/lib/web/action";

const start = action(draftStartInput, startClaim);

/** Starts the draft and goes straight on to its first page. */
export async function startClaimAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await start(previous, form);
  if (!result.ok) return result;
  return redirect(draftStepPath(result.value, "part"));
}
