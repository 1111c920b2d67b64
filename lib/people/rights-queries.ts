import "server-only";
import { hasRight, type Right } from "@/lib/access/rights";
import { isRole } from "@/lib/access/roles";
import { rows, type Work } from "@/lib/db/unit-of-work";

type Standing = { sells: boolean; buys: boolean; roles: string[] };

/**
 * Whether the actor carries a right where they work, by the roles they have now: a role that was taken a moment ago,
 * after their session was read, counts no more.
 */
export async function allows(work: Work, right: Right): Promise<boolean> {
  const { organisationId, userId } = work.actor;
  const [standing] = await rows<Standing>(
    work,
    `select o.sells, o.buys, array(select r.role from membership_roles r
       join memberships m on m.organisation_id = r.organisation_id and m.user_id = r.user_id
       where r.organisation_id = o.id and r.user_id = $2 and m.accepted_at is not null
         and m.disabled_at is null) as roles
     from organisations o where o.id = $1`,
    [organisationId, userId],
  );
  return standing !== undefined && hasRight(new Set(standing.roles.filter(isRole)), right, standing);
}
