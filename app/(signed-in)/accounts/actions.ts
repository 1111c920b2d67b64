"use server";

import { newAccountInput } from "@/lib/accounts/schema";
import { openAccount } from "@/lib/accounts/service";
import type { ActionResult } from "@/lib/kernel/action-result";
import { action } from "@/lib/web/action";
import { goBack } from "./go-back";

const open = action(newAccountInput, openAccount);

/** Opens an account and goes back to where it was missing. */
export async function openAccountAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await open(previous, form);
  if (!result.ok) return result;
  return goBack(form, "/accounts", result.value.wasKnown ? "accountOpenedKnown" : "accountOpened");
}
