"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type ImportButtonProps = { action: FormAction; importId: string; label: string; pendingLabel: string };

/** One press imports the whole file or nothing of it; what stands in the way is said above the button. */
export function ImportButton({ action, importId, label, pendingLabel }: ImportButtonProps) {
  const [state, submit] = useActionState(action, null);
  return (
    <form action={submit} className="grid justify-items-start gap-3">
      {state && !state.ok && state.message ? (
        <Banner kind="refused" isLive>
          {state.message}
        </Banner>
      ) : null}
      <input type="hidden" name="importId" value={importId} />
      <SubmitButton pendingLabel={pendingLabel}>{label}</SubmitButton>
    </form>
  );
}
