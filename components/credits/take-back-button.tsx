"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type TakeBackProps = { action: FormAction; number: string; allocationId: string; label: string };

/** Takes one allocation back. What the server refuses is said beside the button. */
export function TakeBackButton({ action, number, allocationId, label }: TakeBackProps) {
  const [state, send] = useActionState(action, null);
  return (
    <form action={send} className="grid justify-items-start gap-2">
      <input type="hidden" name="number" value={number} />
      <input type="hidden" name="allocationId" value={allocationId} />
      <SubmitButton kind="quiet" small>
        {label}
      </SubmitButton>
      {state && !state.ok && state.message ? (
        <Banner kind="refused" isLive>
          {state.message}
        </Banner>
      ) : null}
    </form>
  );
}
