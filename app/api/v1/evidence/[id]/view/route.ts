import { findEvidence } from "@/lib/evidence-files/queries";
import { refuse } from "@/lib/kernel/outcome";
import { serve } from "@/lib/storage/serve";
import { route } from "@/lib/web/route";

/** The copy people look at: made by us from the picture, without anything else the file held. */
export const GET = route<{ id: string }>({ name: "GET /evidence/{id}/view" }, async ({ session, params }) => {
  const file = await findEvidence(session.actor, params.id);
  if (!file?.viewKey || file.viewState !== "ready") return refuse("notFound");
  return serve({ key: file.viewKey, contentType: "image/jpeg", name: `${file.id}.jpg`, kind: "inline", range: null });
});
