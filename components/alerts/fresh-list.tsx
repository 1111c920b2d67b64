"use client";

import { skipToken, useQuery } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { UNREAD_KEY } from "./use-unread";

/** Has the page drawn anew once the count in its head is another than the one it was drawn with: news, or the way back. */
export function FreshList({ drawn }: { drawn: number }) {
  const router = useRouter();
  const { data } = useQuery<number | null>({ queryKey: UNREAD_KEY, queryFn: skipToken });
  useEffect(() => {
    if (typeof data === "number" && data !== drawn) router.refresh();
  }, [data, drawn, router]);
  return null;
}
