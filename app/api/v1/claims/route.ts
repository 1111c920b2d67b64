import { z } from "zod";
import { startClaim } from "@/lib/claims/filing/service";
import { listOwnClaims, listReceivedClaims } from "@/lib/claims/lists/queries";
import { JUDGING_VIEWS, listQuery } from "@/lib/claims/lists/schema";
import { draftStartInput } from "@/lib/claims/schema";
import { ok } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

const side = z.enum(["received", "own"]).catch("own");

/** Claims of this organisation: those it received, or its own. The query is that of the list pages. */
export const GET = route({ name: "GET /claims" }, async ({ session, request }) => {
  const search = Object.fromEntries(new URL(request.url).searchParams);
  const query = listQuery.parse(search);
  const isReceived =
    side.parse(search.side ?? (JUDGING_VIEWS.some((view) => view === query.view) ? "received" : "own")) ===
    "received";
  return ok(await (isReceived ? listReceivedClaims : listOwnClaims)(session.actor, query));
});

/** Starts a draft once, however often the request is sent with the same key. */
export const POST = route(
  { name: "POST /claims", body: draftStartInput, idempotent: true },
  ({ session, body }) => startClaim(session.actor, body),
);
