"use client";

import clsx from "clsx";
import { useActionState, type ComponentProps } from "react";
import { Banner } from "@/components/ui/banner";
import { SubmitButton } from "@/components/ui/submit-button";
import type { FormAction } from "@/lib/kernel/action-result";

type ActionButtonProps = Pick<ComponentProps<typeof SubmitButton>, "kind" | "small"> & {
  action: FormAction;
  /** What the press is about; sent along unseen. */
  fields: Readonly<Record<string, string>>;
  label: string;
  isWideOnPhone?: boolean;
};

/** One press, one thing done. What the server refuses is said under the button. */
export function ActionButton({ action, fields, label, isWideOnPhone = false, ...look }: ActionButtonProps) {
  const [state, send] = useActionState(action, null);
  const message = state && !state.ok ? (state.message ?? Object.values(state.fields)[0]) : undefined;
  return (
    <form
      action={send}
      className={clsx("grid gap-2", isWideOnPhone ? "sm:justify-items-start" : "justify-items-start")}
    >
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SubmitButton {...look}>{label}</SubmitButton>
      {message ? (
        <Banner kind="refused" isLive>
          {message}
        </Banner>
      ) : null}
    </form>
  );
}
