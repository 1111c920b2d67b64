import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { writeToAudit } from "@/lib/people/audit-service";
import { allows } from "@/lib/people/rights-queries";
import { listSuccessors } from "./catalogue-queries";
import { isFamilyCode } from "./families";
import type { ChangedPart, NewPart } from "./schema";
import { leadsBack } from "./supersession";

export type Kept = { readonly partNumber: string };
type Found = { id: string };

/** One catalogue is changed by one person at a time, so that no two changes close a ring of successors together. */
const lockCatalogue = (work: Work) =>
  rows(work, "select pg_advisory_xact_lock(hashtextextended('catalogue:' || $1, 0))", [
    work.actor.organisationId,
  ]);

const partIdOf = async (work: Work, partNumber: string): Promise<string | null> => {
  const [part] = await rows<Found>(work, "select id from parts where seller_id = $1 and part_number = $2", [
    work.actor.organisationId,
    partNumber,
  ]);
  return part?.id ?? null;
};

type SuccessorRefusal = "supersedingUnknown" | "supersedingRing";

/** The id of the part that takes another one's place; null where none does. */
async function successorIdOf(
  work: Work,
  { partNumber, supersededBy }: { partNumber: string; supersededBy: string },
): Promise<Outcome<string | null, SuccessorRefusal>> {
  if (supersededBy === "") return ok(null);
  const asked = { partNumber, successor: supersededBy };
  if (leadsBack(await listSuccessors(work), asked)) return refuse("supersedingRing", {}, "supersededBy");
  const id = await partIdOf(work, supersededBy);
  return id === null ? refuse("supersedingUnknown", { number: supersededBy }, "supersededBy") : ok(id);
}

/** The maker of that name in the actor's catalogue; one that is not there yet is entered. */
async function makerIdFor(work: Work, name: string): Promise<string | null> {
  const { organisationId } = work.actor;
  const sameName =
    "select id from makers where seller_id = $1 and lower(name) = lower($2) order by name limit 1";
  const [known] = await rows<Found>(work, sameName, [organisationId, name]);
  if (known) return known.id;
  const [made] = await rows<Found>(
    work,
    "insert into makers (seller_id, name) values ($1, $2) returning id",
    [organisationId, name],
  );
  return made?.id ?? null;
}

type AddRefusal = "notAllowed" | "familyUnknown" | "partNumberTaken" | SuccessorRefusal;

/** Enters a part. Refuses a number that is taken, a family nobody knows, and a successor that is not there. */
export const addPart = (actor: Actor, input: NewPart): Promise<Outcome<Kept, AddRefusal>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Kept, AddRefusal>> => {
    if (!(await allows(work, "keepCatalogue"))) return refuse("notAllowed");
    if (!isFamilyCode(input.family)) return refuse("familyUnknown", {}, "family");
    await lockCatalogue(work);
    const { partNumber, name, family } = input;
    if (await partIdOf(work, partNumber))
      return refuse("partNumberTaken", { number: partNumber }, "partNumber");
    const successor = await successorIdOf(work, input);
    if (!successor.ok) return successor;
    await rows(
      work,
      `insert into parts (seller_id, maker_id, part_number, name, family, serial_tracked, superseded_by_id)
       values ($1, $2, $3, $4, $5, $6, $7)`,
      [
        actor.organisationId,
        await makerIdFor(work, input.maker),
        partNumber,
        name,
        family,
        input.tracking === "serial",
        successor.value,
      ],
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
    const id = await partIdOf(work, input.partNumber);
    if (id === null) return refuse("notFound");
    const successor = await successorIdOf(work, input);
    if (!successor.ok) return successor;
    await rows(work, "update parts set name = $2, superseded_by_id = $3 where seller_id = $4 and id = $1", [
      id,
      input.name,
      successor.value,
      actor.organisationId,
    ]);
    await writeToAudit(work, "part.changed", { ...input });
    return ok({ partNumber: input.partNumber });
  });
