import { listEvidenceOfClaim } from "@/lib/evidence-files/queries";
import { claimDigits } from "@/lib/claims/number";
import { ok, refuse } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

export const GET = route<{ number: string }>(
  { name: "GET /claims/{number}/evidence" },
  async ({ session, params }) => {
    const files = await listEvidenceOfClaim(session.actor, claimDigits(params.number));
    return files ? ok({ files }) : refuse("notFound");
  },
);
