"use client";

import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Button as AriaButton, type ButtonProps as AriaButtonProps } from "react-aria-components/Button";
import { buttonStyle, type ButtonLook } from "./button-style";
import { ButtonWords } from "./button-words";
import { useSlowPending } from "./slow-pending";

export type ButtonProps = Omit<AriaButtonProps, "className" | "style" | "children" | "isDisabled"> &
  ButtonLook & { children: ReactNode; pendingLabel?: string };

/**
 * A button stays live while something is incomplete: pressing it explains what is missing. `isPending` takes a second
 * press away at once and shows itself after a second. Opens dialogs, drawers and menus as their `trigger`;
 * `slot="close"` closes them. The button that sends a form is SubmitButton.
 */
export function Button({
  kind,
  small,
  wide,
  children,
  pendingLabel,
  isPending = false,
  ...props
}: ButtonProps) {
  const t = useTranslations("ui");
  const isSlow = useSlowPending(isPending);

  return (
    <AriaButton {...props} isPending={isPending} className={buttonStyle({ kind, small, wide })}>
      <ButtonWords busyWith={isSlow ? (pendingLabel ?? t("working")) : undefined}>{children}</ButtonWords>
    </AriaButton>
  );
}
