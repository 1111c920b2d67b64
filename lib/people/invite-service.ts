import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { Organisation } from "@/lib/access/rights";
import type { Role } from "@/lib/access/roles";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { publicUrl } from "@/lib/web/settings";
import { newToken, sha256Of } from "@/lib/web/sha256";
import { Membership } from "@/models/membership";
import { MembershipRole } from "@/models/membership-role";
import { Organisation as OrganisationRow } from "@/models/organisation";
import { readAddress } from "./address";
import { writeToAudit } from "./audit-service";
import type { Invitation, MemberChange } from "./member-schema";
import { rolesOffered } from "./offered-roles";
import { peopleIn } from "./people-queries";
import { allows } from "./rights-queries";

/** How long an invitation can be taken up. */
export const INVITATION_DAYS = 7;
const MINUTES_A_DAY = 1440;
/** How many letters one person may be sent in a day, the first included: more of them is no reminder. */
const LETTERS_A_DAY = 5;

export type Member = { readonly personId: string };
type House = Organisation & { readonly name: string };

/** The actor's own organisation, for what it offers and how it signs. */
export const houseOf = ({ transaction, actor }: Work): Promise<House | null> =>
  OrganisationRow.findByPk(actor.organisationId, { attributes: ["name", "sells", "buys"], transaction });

/** A fresh link for this address, mailed to it in its owner's language; who invites never sees it. */
async function mailInvitation(work: Work, email: string, organisation: string): Promise<void> {
  const token = newToken();
  await rows(work, "select guarded.make_link($1, 'invitation', $2, $3)", [
    email,
    sha256Of(token),
    INVITATION_DAYS * MINUTES_A_DAY,
  ]);
  const params = {
    link: publicUrl(`/invitation/${token}`),
    organisation,
    inviter: work.actor.name,
    days: INVITATION_DAYS,
  };
  await rows(work, "select guarded.mail_link_owner($1, 'invitation', $2, $3)", [
    sha256Of(token),
    JSON.stringify(params),
    work.actor.requestId,
  ]);
}

/** Gives a member roles they do not have yet. */
export const giveRoles = (
  { transaction, actor: { organisationId } }: Work,
  userId: string,
  roles: readonly Role[],
): Promise<unknown> =>
  MembershipRole.bulkCreate(
    roles.map((role) => ({ organisationId, userId, role })),
    { ignoreDuplicates: true, transaction },
  );

type InviteRefusal =
  "notAllowed" | "addressUnreadable" | "memberAlready" | "rolesMissing" | "roleOfOtherSide";

/**
 * Invites a person, with roles, and mails them a link to accept. Whoever has an account elsewhere is invited the same
 * way, and nothing they have there is shown here before they accept: who invites cannot tell the two apart.
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

/** Letters to one person in the last day; the person's row is held, so that two requests at once count each other. */
async function lettersToday(work: Work, personId: string): Promise<number> {
  const { transaction, actor } = work;
  const { organisationId } = actor;
  await Membership.findOne({
    attributes: ["userId"],
    where: { organisationId, userId: personId },
    lock: transaction.LOCK.UPDATE,
    transaction,
  });
  const [sent] = await rows<{ count: number }>(
    work,
    `select count(*)::integer as count from audit_log where organisation_id = $1 and detail ->> 'personId' = $2
       and action in ('person.invited', 'person.invitedAgain') and at > now() - interval '1 day'`,
    [organisationId, personId],
  );
  return sent?.count ?? 0;
}

type AgainRefusal = "notAllowed" | "notFound" | "invitationUsed" | "invitedOften";

/** Mails a fresh invitation to a member who has not accepted yet; the older link ends. */
export const inviteAgain = (
  actor: Actor,
  { personId }: MemberChange,
): Promise<Outcome<Member, AgainRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, AgainRefusal>> => {
    const house = await houseOf(work);
    if (!house || !(await allows(work, "keepPeople"))) return refuse("notAllowed");
    const letters = await lettersToday(work, personId);
    const person = (await peopleIn(work)).find(({ id }) => id === personId);
    if (!person || person.disabledAt) return refuse("notFound");
    if (person.acceptedAt) return refuse("invitationUsed");
    if (letters >= LETTERS_A_DAY) return refuse("invitedOften", { most: LETTERS_A_DAY });
    await mailInvitation(work, person.email, house.name);
    await writeToAudit(work, "person.invitedAgain", { personId });
    return ok({ personId });
  });
