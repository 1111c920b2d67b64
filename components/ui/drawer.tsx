"use client";

import { Dialog as AriaDialog, Modal, ModalOverlay } from "react-aria-components/Modal";
import { veilStyle, WithTrigger, type ModalProps } from "./dialog";
import { ModalHead } from "./modal-head";

/** A side sheet that keeps the page in sight: details, talk, the claims behind a point of a chart. */
export function Drawer({ title, trigger, children, isOpen, onOpenChange }: ModalProps) {
  const steer = trigger ? {} : { isOpen, onOpenChange };
  return (
    <WithTrigger
      trigger={trigger}
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      panel={
        <ModalOverlay {...steer} isDismissable className={veilStyle}>
          <Modal className="absolute inset-y-0 right-0 w-full border-l border-edge bg-card shadow-panel transition duration-panel sm:w-[28rem] entering:translate-x-2 entering:opacity-0 exiting:opacity-0">
            <AriaDialog className="grid h-full grid-rows-[auto_1fr] outline-none">
              <div className="border-b border-rule p-4 sm:px-6">
                <ModalHead title={title} />
              </div>
              <div className="overflow-auto p-4 sm:p-6">{children}</div>
            </AriaDialog>
          </Modal>
        </ModalOverlay>
      }
    />
  );
}
