"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type MatchButtonProps = {
  action: FormAction;
  fields: Readonly<Record<string, string>>;
  label: string;
  kind: "primary" | "secondary";
};

/** One press matches the parcel. What the server refuses is said beside the button. */
export function MatchButton({ action, fields, label, kind }: MatchButtonProps) {
  const [state, submit] = useActionState(action, null);
  return (
    <form action={submit} className="grid gap-2 sm:justify-items-start">
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SubmitButton kind={kind}>{label}</SubmitButton>
      {state && !state.ok && state.message ? (
        <Banner kind="refused" isLive>
          {state.message}
        </Banner>
      ) : null}
    </form>
  );
}
