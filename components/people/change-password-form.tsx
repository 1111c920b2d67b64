"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { ErrorSummary } from "@/components/ui/error-summary";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";
import { PasswordField, type ShowTexts } from "./password-field";

type ChangePasswordFormProps = {
  action: FormAction;
  email: string;
  texts: ShowTexts & { current: string; password: string; hint: string; submit: string };
};

const FIELDS = ["current", "password"] as const;

/** The old password, then the new one. */
export function ChangePasswordForm({ action, email, texts }: ChangePasswordFormProps) {
  const [state, send] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  const problems = FIELDS.flatMap((fieldId) => {
    const text = refused?.fields[fieldId];
    return text ? [{ fieldId, text }] : [];
  });
  return (
    <form action={send} noValidate className="grid gap-4">
      <ErrorSummary problems={problems} />
      {refused?.message ? (
        <Banner kind="refused" isLive>
          {refused.message}
        </Banner>
      ) : null}
      <input type="email" name="username" autoComplete="username" defaultValue={email} readOnly hidden />
      <PasswordField
        name="current"
        label={texts.current}
        autoComplete="current-password"
        texts={texts}
        error={refused?.fields.current}
      />
      <PasswordField
        name="password"
        label={texts.password}
        hint={texts.hint}
        autoComplete="new-password"
        texts={texts}
        error={refused?.fields.password}
      />
      <div>
        <SubmitButton>{texts.submit}</SubmitButton>
      </div>
    </form>
  );
}
