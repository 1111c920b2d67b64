"use server";

import { redirect } from "next/navigation";
import type { ActionResult } from "@/lib/kernel/action-result";
import { callInParts, settleReturn } from "@/lib/returns/calling-service";
import { dispatchReturn } from "@/lib/returns/dispatch-service";
import { claimOfReturnPath } from "@/lib/returns/paths";
import { callInInput, dispatchInput, settleInput } from "@/lib/returns/schema";
import { action } from "@/lib/web/action";

const callIn = action(callInInput, callInParts, claimOfReturnPath);

export const dispatchAction = action(dispatchInput, dispatchReturn, claimOfReturnPath);
export const settleAction = action(settleInput, settleReturn, claimOfReturnPath);

/** Calls parts in and goes back to the sheet, where their number stands. */
export async function callInAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await callIn(previous, form);
  if (!result.ok) return result;
  return redirect(claimOfReturnPath(result.value));
}
