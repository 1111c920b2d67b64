"use client";

import { useTranslations } from "next-intl";
import type { ComponentProps, MouseEvent, ReactNode } from "react";
import { useFormStatus } from "react-dom";
import { buttonStyle, type ButtonLook } from "./button-style";
import { ButtonWords } from "./button-words";
import { useSlowPending } from "./slow-pending";

type NativeButton = Omit<ComponentProps<"button">, "type" | "className" | "disabled" | "onClick">;
export type SubmitButtonProps = NativeButton & ButtonLook & { pendingLabel?: string };

const takeBack = (event: MouseEvent) => event.preventDefault();

/**
 * The button that sends its form, with or without script. While the form is under way a second press does nothing;
 * after a second it says what it is busy with. Native on purpose: it costs a phone next to nothing.
 */
export function SubmitButton({
  kind = "primary",
  small,
  wide,
  children,
  pendingLabel,
  ...props
}: SubmitButtonProps) {
  const t = useTranslations("ui");
  const { pending } = useFormStatus();
  const isSlow = useSlowPending(pending);
  const busyWith = isSlow ? (pendingLabel ?? t("working")) : undefined;

  return (
    <>
      <button
        {...props}
        type="submit"
        aria-disabled={pending || undefined}
        onClick={pending ? takeBack : undefined}
        className={buttonStyle({ kind, small, wide })}
      >
        <ButtonWords busyWith={busyWith}>{children}</ButtonWords>
      </button>
      <span role="status" className="sr-only">
        {busyWith}
      </span>
    </>
  );
}

/** The foot of a form: as wide as the page for a thumb, as wide as its words at a desk. */
export const SubmitRow = ({ children }: { children: ReactNode }) => (
  <div className="grid gap-2 sm:flex sm:flex-wrap">{children}</div>
);
