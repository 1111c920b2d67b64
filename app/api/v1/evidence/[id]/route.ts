import { findEvidence } from "@/lib/evidence-files/queries";
import { withdrawEvidence } from "@/lib/evidence-files/service";
import { refuse } from "@/lib/kernel/outcome";
import { serve } from "@/lib/storage/serve";
import { route } from "@/lib/web/route";

type Params = { id: string };

/** The original, byte for byte. */
export const GET = route<Params>({ name: "GET /evidence/{id}" }, async ({ session, params, request }) => {
  const file = await findEvidence(session.actor, params.id);
  if (!file) return refuse("notFound");
  const { objectKey: key, mediaType: contentType, originalName: name } = file;
  return serve({ key, contentType, name, kind: "attachment", range: request.headers.get("range") });
});

export const DELETE = route<Params>({ name: "DELETE /evidence/{id}" }, ({ session, params }) => withdrawEvidence(session.actor, params.id));
