import "server-only";
import type { Actor } from "@/lib/access/actor";
import { beforeSignIn, rows, unitOfWork } from "@/lib/db/unit-of-work";
import { findLinkOwner } from "../service";
import type { Administrator, LinkPurpose, OpenLink, OwnSession, Workplace } from "./view";

/** Whose link for this purpose it is, while it can be used. */
export async function findOpenLink(token: string, purpose: LinkPurpose): Promise<OpenLink | null> {
  const owner = await findLinkOwner(token);
  if (owner?.purpose !== purpose) return null;
  const { email, name, organisation, has_password: hasAccount } = owner;
  return { email, name, purpose, organisation, hasAccount };
}

/** Where a person is signed in, the latest used first. */
export const listOwnSessions = (actor: Actor): Promise<OwnSession[]> =>
  unitOfWork(actor, (work) =>
    rows<OwnSession>(
      work,
      `select s.id, s.device, s.started_at as "startedAt", s.last_seen_at as "lastSeenAt"
       from sessions s join users u on u.id = s.user_id and u.session_version = s.version
       where s.user_id = $1 and s.ended_at is null and s.expires_at > now()
         and s.last_seen_at > now() - make_interval(hours => s.idle_hours)
       order by s.last_seen_at desc, s.id`,
      [actor.userId],
    ),
  );

/** The administrators of the actor's own organisation: who to ask about roles, rules and accounts. */
export const listAdministrators = (actor: Actor): Promise<Administrator[]> =>
  unitOfWork(actor, (work) =>
    rows<Administrator>(
      work,
      `select u.id, u.name, u.email from membership_roles r
         join memberships m on m.organisation_id = r.organisation_id and m.user_id = r.user_id
           and m.accepted_at is not null and m.disabled_at is null
         join users u on u.id = r.user_id and u.disabled_at is null
       where r.organisation_id = $1 and r.role = 'administrator' order by u.name, u.id`,
      [actor.organisationId],
    ),
  );

/** Where the person of this session works: every organisation they have accepted and are not switched off in, by name. */
export const listWorkplaces = (sessionId: string): Promise<Workplace[]> =>
  beforeSignIn<Workplace>("select organisation_id as id, name, roles from guarded.organisations_of($1)", [
    sessionId,
  ]);
