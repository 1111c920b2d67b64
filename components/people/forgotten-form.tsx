"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { ErrorSummary } from "@/components/ui/error-summary";
import { SubmitButton } from "@/components/ui/submit-button";
import { TextField } from "@/components/ui/text-field";
import type { FormAction } from "@/lib/kernel/action-result";

type ForgottenFormProps = { action: FormAction; texts: { email: string; submit: string } };

/** Where the link for a new password should go. */
export function ForgottenForm({ action, texts }: ForgottenFormProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const error = refused?.fields.email;
  return (
    <form action={send} noValidate className="grid gap-4">
      {error ? <ErrorSummary problems={[{ fieldId: "email", text: error }]} /> : null}
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      <TextField
        name="email"
        label={texts.email}
        type="email"
        autoComplete="username"
        defaultValue={String(refused?.typed.email ?? "")}
        error={error}
      />
      <SubmitButton wide>{texts.submit}</SubmitButton>
    </form>
  );
}
