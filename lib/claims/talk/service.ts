import "server-only";
import type { Actor } from "@/lib/access/actor";
import { undoing } from "@/lib/db/unit-of-work";
import { ok, refuse } from "@/lib/kernel/outcome";
import { Claim } from "@/models/claim";
import { ClaimMessage } from "@/models/claim-message";
import { seesClaim } from "../seeing";

type Said = { number: string; body: string; audience: "both" | "own" };

/** Says something on a claim: to both sides, or to one's own organisation alone. Refuses `notFound`. */
export const sayOnClaim = (actor: Actor, { number, body, audience }: Said) =>
  undoing(actor, async ({ transaction }) => {
    const claim = await Claim.findOne({ where: { number }, transaction });
    if (!claim || !seesClaim(actor, claim)) return refuse("notFound" as const);
    if (claim.state === "draft" || claim.state === "discarded") return refuse("notFound" as const);
    await ClaimMessage.create(
      {
        claimId: claim.id,
        sellerId: claim.sellerId,
        workshopId: claim.workshopId,
        authorId: actor.userId,
        authorName: actor.name,
        authorOrganisationId: actor.organisationId,
        audience,
        body,
      },
      { transaction },
    );
    return ok({ number });
  });
