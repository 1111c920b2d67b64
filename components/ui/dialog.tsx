"use client";

import type { ReactElement, ReactNode } from "react";
import { Dialog as AriaDialog, DialogTrigger, Modal, ModalOverlay } from "react-aria-components/Modal";
import { ModalHead } from "./modal-head";

export type ModalProps = {
  title: string;
  /** The button that opens it; leave out and steer with `isOpen`. */
  trigger?: ReactElement;
  children: ReactNode;
  isOpen?: boolean;
  onOpenChange?: (isOpen: boolean) => void;
};

/** The ground that dims the page behind a panel. */
export const veilStyle =
  "fixed inset-0 z-40 bg-[rgb(20_24_27/0.45)] transition-opacity duration-panel entering:opacity-0 exiting:opacity-0";

/** A trigger and its panel, or a panel alone that its owner opens and closes. */
export function WithTrigger({
  trigger,
  isOpen,
  onOpenChange,
  panel,
}: Omit<ModalProps, "title" | "children"> & { panel: ReactNode }) {
  if (!trigger) return panel;
  return (
    <DialogTrigger isOpen={isOpen} onOpenChange={onOpenChange}>
      {trigger}
      {panel}
    </DialogTrigger>
  );
}

/**
 * A question that has to be answered before going on. A `Button slot="close"` inside closes it.
 * `mustAnswer` takes away Escape, the press outside and the close button: only its own buttons lead out.
 */
export function Dialog({
  title,
  trigger,
  children,
  isOpen,
  onOpenChange,
  mustAnswer = false,
}: ModalProps & { mustAnswer?: boolean }) {
  const steer = trigger ? {} : { isOpen, onOpenChange };
  return (
    <WithTrigger
      trigger={trigger}
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      panel={
        <ModalOverlay
          {...steer}
          isDismissable={!mustAnswer}
          isKeyboardDismissDisabled={mustAnswer}
          className={`${veilStyle} grid place-items-end p-0 sm:place-items-center sm:p-6`}
        >
          <Modal className="max-h-full w-full overflow-auto rounded-sheet border border-t-4 border-edge border-t-petrol bg-card shadow-panel transition duration-panel sm:max-w-xl entering:translate-y-2 entering:opacity-0 exiting:opacity-0">
            <AriaDialog
              role={mustAnswer ? "alertdialog" : "dialog"}
              className="grid gap-4 p-4 outline-none sm:p-6"
            >
              <ModalHead title={title} canClose={!mustAnswer} />
              {children}
            </AriaDialog>
          </Modal>
        </ModalOverlay>
      }
    />
  );
}

/** The buttons at the foot of a dialog: the outcome first, the way back after it. */
export function DialogActions({ children }: { children: ReactNode }) {
  return <div className="flex flex-wrap gap-2 border-t border-rule pt-4">{children}</div>;
}
