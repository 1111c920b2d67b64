"use client";

import { useLinkStatus } from "next/link";
import { useTranslations } from "next-intl";
import { useSlowPending } from "./slow-pending";

/** Stands in a link: once its page has been waited for a second, a bar under the words and "Loading" for who listens. */
export function LinkPending() {
  const t = useTranslations("ui");
  const { pending } = useLinkStatus();
  if (!useSlowPending(pending)) return null;
  return (
    <>
      <span aria-hidden="true" className="absolute inset-x-2 bottom-0 h-0.75 bg-petrol" />
      <span role="status" className="sr-only">
        {t("loading")}
      </span>
    </>
  );
}
