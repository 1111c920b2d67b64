"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { ErrorSummary } from "@/components/ui/error-summary";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";
import { PasswordField, type ShowTexts } from "./password-field";

type SetPasswordFormProps = {
  action: FormAction;
  token: string;
  purpose: string;
  /** Whose password it is, for the password manager that keeps it. */
  email: string;
  texts: ShowTexts & { password: string; hint: string; submit: string };
};

/** A new password, once, by a link. */
export function SetPasswordForm({ action, token, purpose, email, texts }: SetPasswordFormProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const error = refused?.fields.password;
  return (
    <form action={send} noValidate className="grid gap-4">
      {error ? <ErrorSummary problems={[{ fieldId: "password", text: error }]} /> : null}
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      <input type="hidden" name="token" value={token} />
      <input type="hidden" name="purpose" value={purpose} />
      <input type="email" name="username" autoComplete="username" defaultValue={email} readOnly hidden />
      <PasswordField
        name="password"
        label={texts.password}
        hint={texts.hint}
        autoComplete="new-password"
        texts={texts}
        error={error}
      />
      <SubmitButton wide>{texts.submit}</SubmitButton>
    </form>
  );
}
