"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { usePathname } from "next/navigation";
import { useEffect, useRef } from "react";
import { fetchJson } from "@/components/live/fetch-json";

/** Under which the count is kept for all who show it. */
export const UNREAD_KEY = ["alerts"];
const REFRESH_MS = 30_000;
// Each question counts as use of the session: a page nobody touches must not keep it open for ever.
const ASKED_FOR_MS = 60 * 60_000;

const unreadIn = (answer: unknown): number | undefined =>
  typeof answer === "object" && answer !== null && "unread" in answer && typeof answer.unread === "number"
    ? answer.unread
    : undefined;

/** How many alerts are unread: what the server drew, then what it says every half minute and on each new page. */
export function useUnread(drawn: number): number {
  const client = useQueryClient();
  const pathname = usePathname();
  const openedAt = useRef(0);
  const { data } = useQuery({
    queryKey: UNREAD_KEY,
    queryFn: async () => unreadIn(await fetchJson("/api/v1/alerts")) ?? null,
    initialData: drawn,
    refetchInterval: () => (Date.now() - openedAt.current < ASKED_FOR_MS ? REFRESH_MS : false),
  });
  // A layout drawn anew knows better than what was asked before.
  useEffect(() => {
    client.setQueryData(UNREAD_KEY, drawn);
  }, [client, drawn]);
  useEffect(() => {
    const isFirst = openedAt.current === 0;
    openedAt.current = Date.now();
    if (!isFirst) void client.invalidateQueries({ queryKey: UNREAD_KEY });
  }, [client, pathname]);
  return data ?? drawn;
}
