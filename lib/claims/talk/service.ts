import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, undoing } from "@/lib/db/unit-of-work";
import { ok, refuse } from "@/lib/kernel/outcome";
import { Claim } from "@/models/claim";
import { seesClaim } from "../seeing";

type Said = { number: string; body: string; audience: "both" | "own" };

/** Says something on a claim: to both sides, or to one's own organisation alone. Refuses `notFound`. */
export const sayOnClaim = (actor: Actor, { number, body, audience }: Said) =>
  undoing(actor, async (work) => {
    const claim = await Claim.findOne({ where: { number }, transaction: work.transaction });
    if (!claim || !seesClaim(actor, claim)) return refuse("notFound" as const);
    if (claim.state === "draft" || claim.state === "discarded") return refuse("notFound" as const);
    await rows(
      work,
      `insert into claim_messages (claim_id, seller_id, workshop_id, author_id, author_name, author_organisation_id, audience, body)
       values ($1, $2, $3, $4, $5, $6, $7, $8)`,
      [
        claim.id,
        claim.sellerId,
        claim.workshopId,
        actor.userId,
        actor.name,
        actor.organisationId,
        audience,
        body,
      ],
    );
    return ok({ number });
  });
