import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { presentPerson, type PersonRow, type PersonView } from "./present";

// Somebody who has not accepted is shown as they were invited; row security hides what else there is of them.
const PERSON = `
  select m.user_id as id, coalesce(u.name, m.invited_name) as name, coalesce(u.email, m.invited_email) as email,
    coalesce(m.disabled_at, u.disabled_at) as "disabledAt", m.accepted_at as "acceptedAt",
    array(select r.role from membership_roles r
      where r.organisation_id = m.organisation_id and r.user_id = m.user_id order by r.role) as roles,
    seen.last_seen_at as "lastSeenAt"
  from memberships m left join users u on u.id = m.user_id and m.accepted_at is not null
    left join guarded.people_seen() seen on seen.user_id = m.user_id
  where m.organisation_id = $1`;

/** Every member of the actor's organisation, switched off or not, by name. Only an administrator may ask. */
export const listPeople = (actor: Actor): Promise<PersonView[]> =>
  unitOfWork(actor, async (work) => (await peopleIn(work)).map(presentPerson));

/** The same inside a running unit of work. */
export const peopleIn = (work: Work): Promise<PersonRow[]> =>
  rows<PersonRow>(work, `${PERSON} order by name, id`, [work.actor.organisationId]);

/** One member, or null where the organisation has none of that id. */
export const findPerson = (actor: Actor, id: string): Promise<PersonView | null> =>
  unitOfWork(actor, async (work) => {
    const [person] = await rows<PersonRow>(work, `${PERSON} and m.user_id::text = $2`, [
      actor.organisationId,
      id,
    ]);
    return person ? presentPerson(person) : null;
  });
