import { redirect } from "next/navigation";
import { PLACES } from "@/lib/web/navigation";
import { may, requireSession } from "@/lib/web/session";

/** Everybody starts where their work is: the first place their role opens, besides starting something new. */
export default async function HomePage() {
  const session = await requireSession();
  const place = PLACES.find(({ key, right }) => key !== "startClaim" && may(session, right));
  return redirect(place?.href ?? "/account");
}

export const dynamic = "force-dynamic";
