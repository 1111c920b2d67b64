"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type StartButtonProps = { start: FormAction; fields: Readonly<Record<string, string>>; label: string };

/** One press that starts the claim; the ids travel as hidden fields, so it works before any script has loaded. */
export function StartButton({ start, fields, label }: StartButtonProps) {
  const [state, submit] = useActionState(start, null);
  return (
    <form action={submit} className="grid gap-3">
      {state && !state.ok && state.message ? (
        <Banner kind="refused" isLive>
          {state.message}
        </Banner>
      ) : null}
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SubmitButton wide>{label}</SubmitButton>
    </form>
  );
}
