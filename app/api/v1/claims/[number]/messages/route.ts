import { z } from "zod";
import { listMessages } from "@/lib/claims/talk/queries";
import { claimDigits } from "@/lib/claims/number";
import { sayOnClaim } from "@/lib/claims/talk/service";
import { ok, refuse } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

const said = z.strictObject({ body: z.string().trim().min(1).max(4000), audience: z.enum(["both", "own"]) });
type Params = { number: string };

export const GET = route<Params>({ name: "GET /claims/{number}/messages" }, async ({ session, params }) => {
  const messages = await listMessages(session.actor, claimDigits(params.number));
  return messages ? ok({ messages }) : refuse("notFound");
});

export const POST = route<Params, typeof said>(
  { name: "POST /claims/{number}/messages", body: said },
  ({ session, params, body }) => sayOnClaim(session.actor, { number: claimDigits(params.number), ...body }),
);
