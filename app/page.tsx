import { redirect } from "next/navigation";
import { homeOf } from "@/lib/web/navigation";
import { may, requireSession } from "@/lib/web/session";

/** Everybody starts where their own work waits. */
export default async function HomePage() {
  const session = await requireSession();
  return redirect(homeOf(session.actor.roles, (right) => may(session, right)) ?? "/account");
}

export const dynamic = "force-dynamic";
