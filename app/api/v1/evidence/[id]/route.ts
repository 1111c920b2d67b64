import { openOriginal } from "@/lib/evidence-files/queries";
import { withdrawEvidence } from "@/lib/evidence-files/service";
import { refuse } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

type Params = { id: string };

/** The original, byte for byte. */
export const GET = route<Params>(
  { name: "GET /evidence/{id}" },
  async ({ session, params, request }) =>
    (await openOriginal(session.actor, params.id, request.headers.get("range"))) ?? refuse("notFound"),
);

export const DELETE = route<Params>({ name: "DELETE /evidence/{id}" }, ({ session, params }) =>
  withdrawEvidence(session.actor, params.id),
);
