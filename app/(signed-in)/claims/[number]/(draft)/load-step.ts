import { notFound, redirect } from "next/navigation";
import { checkDraft } from "@/lib/claims/filing/queries";
import { claimDigits } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { requireSession } from "@/lib/web/session";

export type StepProps = {
  params: Promise<{ number: string }>;
  searchParams: Promise<{ show?: string }>;
};

/** The draft a page of the flow is about; a claim that is out of the workshop's hands leads to its sheet. */
export async function loadStep({ params, searchParams }: StepProps) {
  const [session, { number }, { show }] = await Promise.all([requireSession(), params, searchParams]);
  const checked = await checkDraft(session.actor, claimDigits(number));
  if (!checked) notFound();
  const { state } = checked.claim;
  if (state !== "draft" && state !== "answerNeeded") redirect(claimPath(checked.claim));
  return { session, checked, showsAll: show === "all" };
}
