"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type MoveButtonProps = { action: FormAction; number: string; label: string; kind?: "primary" | "secondary" };

/** One press, one move. What the server refuses is said beside the button. */
export function MoveButton({ action, number, label, kind = "primary" }: MoveButtonProps) {
  const [state, submit] = useActionState(action, null);
  return (
    <form action={submit} className="grid gap-2">
      <input type="hidden" name="number" value={number} />
      <SubmitButton kind={kind}>{label}</SubmitButton>
      {state && !state.ok && state.message ? (
        <Banner kind="refused" isLive>
          {state.message}
        </Banner>
      ) : null}
    </form>
  );
}
