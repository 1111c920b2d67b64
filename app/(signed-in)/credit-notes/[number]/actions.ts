"use server";

import { redirect } from "next/navigation";
import { allocateCredit, takeBackAllocation } from "@/lib/day-book/allocating/service";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { notePath } from "@/lib/day-book/paths";
import { allocateInput, counterInput, takeBackInput } from "@/lib/day-book/schema";
import type { ActionResult } from "@/lib/kernel/action-result";
import { action } from "@/lib/web/action";

const allocate = action(allocateInput, allocateCredit);
const takeBack = action(takeBackInput, takeBackAllocation);
const counter = action(counterInput, counterCredit);

// Each goes on to the note anew: a page that was drawn before would count the rows of before.
export async function allocateAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await allocate(previous, form);
  return result.ok ? redirect(notePath(result.value)) : result;
}

export async function takeBackAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await takeBack(previous, form);
  return result.ok ? redirect(notePath(result.value)) : result;
}

export async function counterAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await counter(previous, form);
  return result.ok ? redirect(notePath(result.value)) : result;
}
