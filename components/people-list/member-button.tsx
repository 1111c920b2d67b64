"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type MemberButtonProps = { action: FormAction; personId: string; label: string; isGrave?: boolean };

/** One thing to do with a member; a refusal is said beside it. */
export function MemberButton({ action, personId, label, isGrave = false }: MemberButtonProps) {
  const [state, send] = useActionState(action, null);
  const message = state && !state.ok ? (state.message ?? Object.values(state.fields)[0]) : undefined;
  return (
    <form action={send} className="grid justify-items-start gap-3">
      <input type="hidden" name="personId" value={personId} />
      {message ? (
        <Banner kind="refused" isLive>
          {message}
        </Banner>
      ) : null}
      <SubmitButton kind={isGrave ? "danger" : "secondary"}>{label}</SubmitButton>
    </form>
  );
}
