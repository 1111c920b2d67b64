"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { buttonStyle } from "@/components/ui/button-style";
import { closeOnEscape } from "@/components/ui/close-on-escape";
import { Select } from "@/components/ui/select";
import { SubmitButton } from "@/components/ui/submit-button";
import { TextArea } from "@/components/ui/text-area";
import type { FormAction } from "@/lib/kernel/action-result";

type ReasonDrawerProps = {
  action: FormAction;
  number: string;
  trigger: string;
  label: string;
  field: "reason" | "question";
  submit: string;
  kind?: "secondary" | "quiet";
  choices?: { name: string; label: string; options: readonly { value: string; label: string }[] };
};

/** A move that needs words: they open under the button, without script too, and stay after a refusal. */
export function ReasonDrawer({
  action,
  number,
  trigger,
  label,
  field,
  submit,
  kind = "quiet",
  choices,
}: ReasonDrawerProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const typed = refused?.typed[field];
  return (
    <details className="group" open={refused !== null} onKeyDown={closeOnEscape}>
      <summary className={`${buttonStyle({ kind })} list-none [&::-webkit-details-marker]:hidden`}>
        {trigger}
      </summary>
      <form
        action={send}
        noValidate
        className="mt-2 grid w-80 max-w-full gap-3 rounded-sheet border border-rule bg-card p-4"
      >
        <input type="hidden" name="number" value={number} />
        {refused?.message ? (
          <Banner kind="refused" isLive>
            {refused.message}
          </Banner>
        ) : null}
        {choices ? (
          <Select
            name={choices.name}
            label={choices.label}
            options={choices.options}
            error={refused?.fields[choices.name]}
          />
        ) : null}
        <TextArea
          id={`${field}-${trigger}`}
          name={field}
          label={label}
          rows={3}
          limit={4000}
          defaultValue={typeof typed === "string" ? typed : ""}
          error={refused?.fields[field]}
        />
        <SubmitButton>{submit}</SubmitButton>
      </form>
    </details>
  );
}
