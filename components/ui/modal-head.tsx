"use client";

import { X } from "lucide-react";
import { useTranslations } from "next-intl";
import { Heading } from "react-aria-components/Dialog";
import { Button } from "./button";

/** Title and the way out, the same on every panel that covers the page. */
export function ModalHead({ title, canClose = true }: { title: string; canClose?: boolean }) {
  const t = useTranslations("ui");
  return (
    <div className="flex items-start justify-between gap-4">
      <Heading slot="title" className="text-20">
        {title}
      </Heading>
      {canClose ? (
        <span className="-my-1 -mr-2.5">
          <Button slot="close" kind="quiet" small>
            <X aria-hidden="true" className="size-5 stroke-[1.75]" />
            {t("close")}
          </Button>
        </span>
      ) : null}
    </div>
  );
}
