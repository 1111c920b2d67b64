import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";

export type Colleague = { id: string; name: string };

/** The other assessors of the actor's organisation, to leave a question with. */
export const listColleagues = (actor: Actor): Promise<Colleague[]> =>
  unitOfWork(actor, (work) =>
    rows<Colleague>(
      work,
      `select u.id, u.name from membership_roles r join memberships m on m.organisation_id = r.organisation_id and m.user_id = r.user_id
         join users u on u.id = r.user_id
       where r.organisation_id = $1 and r.role = 'assessor' and m.disabled_at is null and u.id <> $2 order by u.name`,
      [actor.organisationId, actor.userId],
    ),
  );
