"use client";

import { useActionState } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import { TextField } from "@/components/ui/text-field";
import type { FormAction } from "@/lib/kernel/action-result";

type SignInFormProps = {
  action: FormAction;
  texts: { email: string; password: string; submit: string };
};

/** Address and password. A refusal says one thing for every reason and keeps the address. */
export function SignInForm({ action, texts }: SignInFormProps) {
  const [state, submit] = useActionState(action, null);
  const refused = state && !state.ok ? state : null;
  return (
    <form action={submit} noValidate className="grid gap-4">
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
      />
      <TextField name="password" label={texts.password} type="password" autoComplete="current-password" />
      <SubmitButton wide>{texts.submit}</SubmitButton>
    </form>
  );
}
