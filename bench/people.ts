import type pg from "pg";
import type { Actor } from "@/lib/access/actor";
import { PEOPLE } from "@/seeders/story/people";
import { actorAt } from "@/tests/support/actor";

/** A person of the demo at work for their organisation. */
export async function seededActor(admin: pg.Client, key: keyof typeof PEOPLE): Promise<Actor> {
  const person = PEOPLE[key];
  const { rows } = await admin.query<{ id: string }>(
    "select organisation_id as id from memberships where user_id = $1",
    [person.id],
  );
  const [organisation] = rows;
  if (!organisation) throw new Error(`${person.name} is no member of any organisation`);
  return actorAt(organisation, person, person.roles);
}
