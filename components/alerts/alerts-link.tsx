"use client";

import { useTranslations } from "next-intl";
import { useState } from "react";
import { Glyph } from "@/components/ui/glyph";
import { LinkButton } from "@/components/ui/link-button";
import { LinkPending } from "@/components/ui/link-pending";
import { useUnread } from "./use-unread";

const MOST_SHOWN = 99;

/** The way to the alerts, with how many are unread. A plain link without script; with it, a new count is said once. */
export function AlertsLink({ unread }: { unread: number }) {
  const t = useTranslations("live.alerts");
  const count = useUnread(unread);
  // Empty until the count changes for the first time: what was drawn with the page is no news.
  const [told, setTold] = useState({ count: unread, words: "" });
  if (told.count !== count) setTold({ count, words: t("unread", { count }) });
  return (
    <span className="shrink-0">
      <LinkButton href="/alerts" kind="quiet" small>
        <Glyph name="bell" />
        <span className="max-sm:sr-only">{t("title")}</span>
        {count > 0 ? (
          <>
            <span
              aria-hidden="true"
              className="rounded-sheet bg-wanting-wash px-1.5 text-14 leading-5 text-wanting tabular-nums max-sm:absolute max-sm:top-0 max-sm:right-0 max-sm:px-1 max-sm:leading-4"
            >
              {count > MOST_SHOWN ? `${MOST_SHOWN}+` : count}
            </span>
            <span className="sr-only">{t("unread", { count })}</span>
          </>
        ) : null}
        <LinkPending />
      </LinkButton>
      <span role="status" className="sr-only">
        {told.words}
      </span>
    </span>
  );
}
