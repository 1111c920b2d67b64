"use server";

import { redirect } from "next/navigation";
import { changeFromFields } from "@/lib/claims/draft";
import { claimDigits } from "@/lib/claims/number";
import { draftChange } from "@/lib/claims/draft-shape";
import { checkDraft } from "@/lib/claims/filing/queries";
import { isUnread } from "@/lib/claims/filing/problems";
import { addLine, discardDraft, removeLine, saveDraft } from "@/lib/claims/filing/service";
import { claimPath, draftStepPath, DRAFT_STEPS, isDraftStep } from "@/lib/claims/paths";
import { answerQuery, fileClaim } from "@/lib/claims/sending/service";
import { guardOrigin, told } from "@/lib/web/action";
import { formValues } from "@/lib/web/form-values";
import { requireActor } from "@/lib/web/session";

const digitsOf = (form: FormData): string => claimDigits(String(form.get("number") ?? ""));

/** Saves a page of the draft and goes on; where something typed cannot be read, the page comes back and says so. */
export async function saveStepAction(form: FormData): Promise<void> {
  const actor = await requireActor();
  await guardOrigin();
  const number = digitsOf(form);
  const step = String(form.get("step") ?? "");
  if (!isDraftStep(step)) redirect("/workshop-today");
  const change = draftChange.safeParse(changeFromFields(formValues(form)));
  if (!change.success) redirect(`${draftStepPath({ number }, step)}?show=all`);
  const saved = await told(actor, "saveDraft", () => saveDraft(actor, number, change.data));
  if (!saved.ok) redirect(claimPath({ number }));

  const checked = await checkDraft(actor, number);
  const unread =
    checked?.problems.some((problem) => problem.step === step && isUnread(problem.code)) ?? false;
  if (unread) redirect(`${draftStepPath({ number }, step)}?show=typed`);
  const next = form.get("go") === "check" ? "check" : (DRAFT_STEPS[DRAFT_STEPS.indexOf(step) + 1] ?? "check");
  redirect(draftStepPath({ number }, next));
}

/** Sends the claim, or the answer to a query. What is still missing brings the check page back. */
export async function sendAction(form: FormData): Promise<void> {
  const actor = await requireActor();
  await guardOrigin();
  const number = digitsOf(form);
  const send = form.get("as") === "answer" ? answerQuery : fileClaim;
  const sent = await told(actor, send.name, () => send(actor, { number }));
  redirect(sent.ok ? `${claimPath({ number })}?sent=1` : `${draftStepPath({ number }, "check")}?show=all`);
}

export async function discardAction(form: FormData): Promise<void> {
  const actor = await requireActor();
  await guardOrigin();
  await told(actor, "discardDraft", () => discardDraft(actor, { number: digitsOf(form) }));
  redirect("/workshop-today");
}

export async function addLineAction(form: FormData): Promise<void> {
  const actor = await requireActor();
  await guardOrigin();
  const number = digitsOf(form);
  const added = await told(actor, "addLine", () => addLine(actor, number, String(form.get("unitId") ?? "")));
  redirect(
    added.ok
      ? draftStepPath({ number }, "part")
      : `${draftStepPath({ number }, "part")}?refused=${added.code}`,
  );
}

export async function removeLineAction(form: FormData): Promise<void> {
  const actor = await requireActor();
  await guardOrigin();
  const number = digitsOf(form);
  await told(actor, "removeLine", () => removeLine(actor, number, Number(form.get("place"))));
  redirect(draftStepPath({ number }, "part"));
}
