import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { writeToAudit } from "@/lib/people/audit-service";
import { allows } from "@/lib/people/rights-queries";
import { Maker } from "@/models/maker";
import { Part } from "@/models/part";
import { listSuccessors } from "./catalogue-queries";
import { isFamilyCode } from "./families";
import type { ChangedPart, NewPart } from "./schema";
import { leadsBack } from "./supersession";

export type Kept = { readonly partNumber: string };

/** One catalogue is changed by one person at a time, so that no two changes close a ring of successors together. */
const lockCatalogue = (work: Work) =>
  rows(work, "select pg_advisory_xact_lock(hashtextextended('catalogue:' || $1, 0))", [
    work.actor.organisationId,
  ]);

/** A part of the actor's catalogue by its number. */
const findPart = ({ transaction, actor }: Work, partNumber: string): Promise<Part | null> =>
  Part.findOne({ where: { sellerId: actor.organisationId, partNumber }, transaction });

type SuccessorRefusal = "supersedingUnknown" | "supersedingRing";

/** The id of the part that takes another one's place; null where none does. */
async function successorIdOf(
  work: Work,
  { partNumber, supersededBy }: { partNumber: string; supersededBy: string },
): Promise<Outcome<string | null, SuccessorRefusal>> {
  if (supersededBy === "") return ok(null);
  const asked = { partNumber, successor: supersededBy };
  if (leadsBack(await listSuccessors(work), asked)) return refuse("supersedingRing", {}, "supersededBy");
  const part = await findPart(work, supersededBy);
  return part ? ok(part.id) : refuse("supersedingUnknown", { number: supersededBy }, "supersededBy");
}

/** The maker of that name in the actor's catalogue; one that is not there yet is entered. */
async function makerIdFor(work: Work, name: string): Promise<string> {
  const { transaction, actor } = work;
  const sameName =
    "select id from makers where seller_id = $1 and lower(name) = lower($2) order by name limit 1";
  const [known] = await rows<{ id: string }>(work, sameName, [actor.organisationId, name]);
  if (known) return known.id;
  const made = await Maker.create({ sellerId: actor.organisationId, name }, { transaction });
  return made.id;
}

type AddRefusal = "notAllowed" | "familyUnknown" | "partNumberTaken" | SuccessorRefusal;

/** Enters a part. Refuses a number that is taken, a family nobody knows, and a successor that is not there. */
export const addPart = (actor: Actor, input: NewPart): Promise<Outcome<Kept, AddRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Kept, AddRefusal>> => {
    if (!(await allows(work, "keepCatalogue"))) return refuse("notAllowed");
    if (!isFamilyCode(input.family)) return refuse("familyUnknown", {}, "family");
    await lockCatalogue(work);
    const { partNumber, name, family } = input;
    if (await findPart(work, partNumber))
      return refuse("partNumberTaken", { number: partNumber }, "partNumber");
    const successor = await successorIdOf(work, input);
    if (!successor.ok) return successor;
    await Part.create(
      {
        sellerId: actor.organisationId,
        makerId: await makerIdFor(work, input.maker),
        partNumber,
        name,
        family,
        serialTracked: input.tracking === "serial",
        supersededById: successor.value,
      },
      { transaction: work.transaction },
    );
    const { maker, tracking, supersededBy } = input;
    await writeToAudit(work, "part.added", { partNumber, name, family, maker, tracking, supersededBy });
    return ok({ partNumber });
  });

type ChangeRefusal = "notAllowed" | "notFound" | SuccessorRefusal;

/** Changes a part's name and what took its place. Its number, family and tracking stay: sold units rest on them. */
export const changePart = (actor: Actor, input: ChangedPart): Promise<Outcome<Kept, ChangeRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Kept, ChangeRefusal>> => {
    if (!(await allows(work, "keepCatalogue"))) return refuse("notAllowed");
    await lockCatalogue(work);
    const part = await findPart(work, input.partNumber);
    if (!part) return refuse("notFound");
    const successor = await successorIdOf(work, input);
    if (!successor.ok) return successor;
    await part.update(
      { name: input.name, supersededById: successor.value },
      { transaction: work.transaction },
    );
    await writeToAudit(work, "part.changed", { ...input });
    return ok({ partNumber: input.partNumber });
  });
