import "server-only";
import { fn, Op } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { MembershipRole } from "@/models/membership-role";
import { Membership } from "@/models/membership";
import { writeToAudit } from "./audit-service";
import { giveRoles, houseOf, type Member } from "./invite-service";
import { hasAnotherKeeper, type Keeper } from "./keepers";
import type { MemberChange, RolesChange } from "./member-schema";
import { rolesOffered } from "./offered-roles";
import { peopleIn } from "./people-queries";
import { presentPerson, type PersonRow } from "./present";
import { allows } from "./rights-queries";

/**
 * Whether the actor keeps these people. Two administrators who take each other's role at once wait for one another
 * here, and the second finds theirs gone: so one always stays.
 */
async function keepsPeople(work: Work): Promise<boolean> {
  const { transaction, actor } = work;
  await Membership.findAll({
    attributes: ["userId"],
    where: { organisationId: actor.organisationId },
    order: ["userId"],
    lock: transaction.LOCK.UPDATE,
    transaction,
  });
  return allows(work, "keepPeople");
}

const keeperOf = (row: PersonRow): Keeper => ({
  id: row.id,
  isAdministrator: row.roles.includes("administrator"),
  isAtWork: presentPerson(row).state === "active",
});

type Standing = { readonly person: PersonRow; readonly isLastKeeper: boolean };

/** A member of the actor's organisation, and whether it rests on them alone. */
async function standingOf(work: Work, personId: string): Promise<Standing | null> {
  const people = await peopleIn(work);
  const person = people.find(({ id }) => id === personId);
  if (!person) return null;
  const isLastKeeper = keeperOf(person).isAdministrator && !hasAnotherKeeper(people.map(keeperOf), personId);
  return { person, isLastKeeper };
}

type RolesRefusal = "notAllowed" | "notFound" | "rolesMissing" | "roleOfOtherSide" | "lastAdministrator";

/** Changes what a member may do. What they had open in this organisation ends, so that the new roles hold at once. */
export const changeRoles = (actor: Actor, input: RolesChange): Promise<Outcome<Member, RolesRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, RolesRefusal>> => {
    const house = await houseOf(work);
    if (!house || !(await keepsPeople(work))) return refuse("notAllowed");
    if (input.roles.length === 0) return refuse("rolesMissing", {}, "roles");
    const standing = await standingOf(work, input.personId);
    if (!standing) return refuse("notFound");
    const { person, isLastKeeper } = standing;
    const offered = rolesOffered(house);
    if (!input.roles.every((role) => offered.includes(role))) return refuse("roleOfOtherSide", {}, "roles");
    if (isLastKeeper && !input.roles.includes("administrator"))
      return refuse("lastAdministrator", {}, "roles");

    await MembershipRole.destroy({
      where: {
        organisationId: actor.organisationId,
        userId: person.id,
        role: { [Op.notIn]: input.roles },
      },
      transaction: work.transaction,
    });
    await giveRoles(work, person.id, input.roles);
    await writeToAudit(work, "person.rolesChanged", {
      personId: person.id,
      before: person.roles,
      after: input.roles,
    });
    return ok({ personId: person.id });
  });

const setDisabled = ({ transaction, actor }: Work, personId: string, isDisabled: boolean) =>
  Membership.update(
    { disabledAt: isDisabled ? fn("now") : null },
    { where: { organisationId: actor.organisationId, userId: personId }, transaction },
  );

type OffRefusal = "notAllowed" | "notFound" | "notYourself" | "lastAdministrator";

/** Ends a member's access to this organisation; what they have open ends with it. Their records stay. */
export const switchOff = (actor: Actor, { personId }: MemberChange): Promise<Outcome<Member, OffRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, OffRefusal>> => {
    if (!(await keepsPeople(work))) return refuse("notAllowed");
    if (personId === actor.userId) return refuse("notYourself");
    const standing = await standingOf(work, personId);
    if (!standing) return refuse("notFound");
    if (standing.isLastKeeper) return refuse("lastAdministrator");
    await setDisabled(work, personId, true);
    await writeToAudit(work, "person.switchedOff", { personId });
    return ok({ personId });
  });

type OnRefusal = "notAllowed" | "notFound";

/** Gives a member their access back, with the roles they had. */
export const switchOn = (actor: Actor, { personId }: MemberChange): Promise<Outcome<Member, OnRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Member, OnRefusal>> => {
    if (!(await keepsPeople(work))) return refuse("notAllowed");
    if (!(await standingOf(work, personId))) return refuse("notFound");
    await setDisabled(work, personId, false);
    await writeToAudit(work, "person.switchedOn", { personId });
    return ok({ personId });
  });
