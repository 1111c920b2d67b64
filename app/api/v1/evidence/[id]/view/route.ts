import { openViewCopy } from "@/lib/evidence-files/queries";
import { refuse } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

/** The copy people look at. */
export const GET = route<{ id: string }>(
  { name: "GET /evidence/{id}/view" },
  async ({ session, params }) => (await openViewCopy(session.actor, params.id)) ?? refuse("notFound"),
);
