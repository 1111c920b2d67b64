import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { seesClaim } from "../seeing";
import type { MessageView } from "../sheet/view";

type Row = Omit<MessageView, "isOwnOnly" | "at"> & { audience: "both" | "own"; at: Date };

/** What was said on a claim, as far as the asking organisation may read it; null where it has no such claim. */
export const listMessages = (actor: Actor, number: string): Promise<MessageView[] | null> =>
  unitOfWork(actor, async (work) => {
    const [claim] = await rows<{ id: string; workshopId: string }>(
      work,
      `select id, workshop_id as "workshopId" from claims where number = $1`,
      [number],
    );
    if (!claim || !seesClaim(actor, claim)) return null;
    const said = await rows<Row>(
      work,
      `select m.id, m.author_name as "authorName", o.name as "authorOrganisation", m.audience, m.body, m.at
       from claim_messages m join organisations o on o.id = m.author_organisation_id where m.claim_id = $1 order by m.at, m.id`,
      [claim.id],
    );
    return said.map(({ audience, at, ...message }) => ({
      ...message,
      isOwnOnly: audience === "own",
      at: at.toISOString(),
    }));
  });
