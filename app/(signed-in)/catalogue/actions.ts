"use server";

import type { ActionResult } from "@/lib/kernel/action-result";
import { changedPartInput, newPartInput } from "@/lib/parts/schema";
import { addPart, changePart } from "@/lib/parts/service";
import { action } from "@/lib/web/action";
import { goBack } from "../accounts/go-back";

const add = action(newPartInput, addPart);
const change = action(changedPartInput, changePart);

/** Enters a part and goes back to where it was missing. */
export async function addPartAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await add(previous, form);
  return result.ok ? goBack(form, "/catalogue", "partAdded") : result;
}

/** Keeps a changed name or successor and goes back to the catalogue. */
export async function changePartAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await change(previous, form);
  return result.ok ? goBack(form, "/catalogue", "partChanged") : result;
}
