"use server";

import { redirect } from "next/navigation";
import { issueCredits } from "@/lib/day-book/issuing/service";
import { issueInput } from "@/lib/day-book/schema";
import type { ActionResult } from "@/lib/kernel/action-result";
import { action } from "@/lib/web/action";

const issue = action(issueInput, issueCredits);

/** Issues the ticked notes and says on the page which were issued and which were refused. */
export async function issueAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await issue(previous, form);
  if (!result.ok) return result;
  const { issued, refused } = result.value;
  const search = new URLSearchParams({ done: issued.map(({ noteNumber }) => noteNumber).join(",") });
  if (refused.length > 0)
    search.set("refused", refused.map(({ number, code }) => `${number}.${code}`).join(","));
  return redirect(`/credits?${search.toString()}`);
}
