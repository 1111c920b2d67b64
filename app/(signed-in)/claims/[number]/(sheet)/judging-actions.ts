"use server";

import { redirect } from "next/navigation";
import { decideInput } from "@/lib/claims/deciding/schema";
import { decideClaim } from "@/lib/claims/deciding/service";
import { askWorkshop } from "@/lib/claims/judging/service";
import { claimPath } from "@/lib/claims/paths";
import { askInput } from "@/lib/claims/schema";
import type { ActionResult } from "@/lib/kernel/action-result";
import { nestedFields } from "@/lib/kernel/nested-fields";
import { action } from "@/lib/web/action";

const ask = action(askInput, askWorkshop, claimPath);
const decide = action(decideInput, decideClaim, { toPath: claimPath, shapeFields: nestedFields });

/** Asks the workshop and goes back to the sheet. */
export async function askAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await ask(previous, form);
  if (!result.ok) return result;
  return redirect(claimPath(result.value));
}

/** Gives the verdict and goes on to the next claim on the list. */
export async function decideAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await decide(previous, form);
  if (!result.ok) return result;
  return redirect(claimPath(result.value));
}
