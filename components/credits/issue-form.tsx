"use client";

import { useActionState, type ReactNode } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton, SubmitRow } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type IssueFormProps = { action: FormAction; submit: string; children: ReactNode };

/** The table of what is due with its boxes, and the one button under it. What was refused is said above. */
export function IssueForm({ action, submit, children }: IssueFormProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const words = refused?.message ?? Object.values(refused?.fields ?? {})[0];
  return (
    <form action={send} className="grid gap-4">
      {words ? (
        <Banner kind="refused" isLive>
          {words}
        </Banner>
      ) : null}
      {children}
      <SubmitRow>
        <SubmitButton>{submit}</SubmitButton>
      </SubmitRow>
    </form>
  );
}
