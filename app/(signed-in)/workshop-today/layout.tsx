import { notFound } from "next/navigation";
import type { ReactNode } from "react";
import { may, requireSession } from "@/lib/web/session";

/** Asked above the loading page: once that has been sent, an answer of 404 comes too late. */
export default async function WorkshopTodayLayout({ children }: { children: ReactNode }) {
  if (!may(await requireSession(), "seeOwnClaims")) notFound();
  return children;
}
