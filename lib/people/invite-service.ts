import "server-only";
import { createHash, randomBytes } from "node:crypto";
import type { Actor } from "@/lib/access/actor";
import type { Organisation } from "@/lib/access/rights";
import type { Role } from "@/lib/access/roles";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { publicUrl } from "@/lib/web/settings";
import { readAddress } from "./address";
import { writeToAudit } from "./audit-service";
import type { Invitation, MemberChange } from "./member-schema";
import { rolesOffered } from "./offered-roles";
import { peopleIn } from "./people-queries";
import { allows } from "./rights-queries";

/** How long an invitation can be taken up. */
export const INVITATION_DAYS = 7;
const MINUTES_A_DAY = 1440;

export type Member = { readonly personId: string };
type House = Organisation & { readonly name: string };

/** The actor's own organisation, for what it offers and how it signs. */
export async function houseOf(work: Work): Promise<House | null> {
  const [house] = await rows<House>(work, "select name, sells, buys from organisations where id = $1", [
    work.actor.organisationId,
  ]);
  return house ?? null;
}

const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");

/** A fresh link for this address, mailed to it in its owner's language; who invites never sees it. */
async function mailInvitation(work: Work, email: string, organisation: string): Promise<void> {
  const token = randomBytes(32).toString("base64url");
  await rows(work, "select * from guarded.make_link($1, 'invitation', $2, $3)", [
    email,
    sha256(token),
    INVITATION_DAYS * MINUTES_A_DAY,
  ]);
  const params = {
    link: publicUrl(`/invitation/${token}`),
    organisation,
    inviter: work.actor.name,
    days: INVITATION_DAYS,
  };
  await rows(work, "select guarded.mail_link_owner($1, 'invitation', $2, $3)", [
    sha256(token),
    JSON.stringify(params),
    work.actor.requestId,
  ]);
}

/** Gives a member roles they do not have yet. */
export const giveRoles = (work: Work, personId: string, roles: readonly Role[]): Promise<unknown> =>
  rows(
    work,
    `insert into membership_roles (organisation_id, user_id, role) select $1, $2, unnest($3::text[])
     on conflict do nothing`,
    [work.actor.organisationId, personId, roles],
  );

type InviteRefusal =
  "notAllowed" | "addressUnreadable" | "memberAlready" | "rolesMissing" | "roleOfOtherSide";

/**
 * Makes a person a member, with roles, and mails them a link to set their password. Whoever already has a password
 * elsewhere is told of the new organisation the same way: the page says the same either way.
 */
export const invitePerson = (actor: Actor, input: Invitation): Promise<Outcome<Member, InviteRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, InviteRefusal>> => {
    const house = await houseOf(work);
    if (!house || !(await allows(work, "keepPeople"))) return refuse("notAllowed");
    const email = readAddress(input.email);
    if (email === null) return refuse("addressUnreadable", {}, "email");
    if (input.roles.length === 0) return refuse("rolesMissing", {}, "roles");
    const offered = rolesOffered(house);
    if (!input.roles.every((role) => offered.includes(role))) return refuse("roleOfOtherSide", {}, "roles");
    const people = await peopleIn(work);
    if (people.some((person) => person.email === email)) return refuse("memberAlready", {}, "email");

    const [made] = await rows<{ id: string }>(work, "select guarded.invite_person($1, $2, $3) as id", [
      email,
      input.name,
      input.language,
    ]);
    if (!made) return refuse("notAllowed");
    await giveRoles(work, made.id, input.roles);
    await mailInvitation(work, email, house.name);
    await writeToAudit(work, "person.invited", { personId: made.id, roles: input.roles });
    return ok({ personId: made.id });
  });

type AgainRefusal = "notAllowed" | "notFound" | "invitationUsed";

/** Mails a fresh invitation to a member who has set no password yet; the older link ends. */
export const inviteAgain = (
  actor: Actor,
  { personId }: MemberChange,
): Promise<Outcome<Member, AgainRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, AgainRefusal>> => {
    const house = await houseOf(work);
    if (!house || !(await allows(work, "keepPeople"))) return refuse("notAllowed");
    const person = (await peopleIn(work)).find(({ id }) => id === personId);
    if (!person || person.disabledAt) return refuse("notFound");
    if (person.hasPassword) return refuse("invitationUsed");
    await mailInvitation(work, person.email, house.name);
    await writeToAudit(work, "person.invitedAgain", { personId });
    return ok({ personId });
  });
