import { receiveEvidence } from "@/lib/evidence-files/service";
import { route } from "@/lib/web/route";

/** One file for a row of a claim's Evidence list, streamed. */
export const POST = route({ name: "POST /evidence" }, ({ session, request }) =>
  receiveEvidence(session.actor, request),
);

export const dynamic = "force-dynamic";
