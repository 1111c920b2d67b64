"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";
import { PasswordField, type ShowTexts } from "./password-field";

type AcceptFormProps = {
  action: FormAction;
  token: string;
  /** Whose account it is, for the password manager that knows it. */
  email: string;
  texts: ShowTexts & { password: string; submit: string };
};

/** One's own password, to sign in and accept an invitation in one go. */
export function AcceptForm({ action, token, email, texts }: AcceptFormProps) {
  const [state, send] = useActionState(action, null);
  const message = state && !state.ok ? state.message : undefined;
  return (
    <form action={send} noValidate className="grid gap-4">
      {message ? (
        <Banner kind="refused" isLive>
          {message}
        </Banner>
      ) : null}
      <input type="hidden" name="token" value={token} />
      <input type="email" name="username" autoComplete="username" defaultValue={email} readOnly hidden />
      <PasswordField name="password" label={texts.password} autoComplete="current-password" texts={texts} />
      <SubmitButton wide>{texts.submit}</SubmitButton>
    </form>
  );
}
