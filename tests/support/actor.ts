import { randomUUID } from "node:crypto";
import type { Actor } from "@/lib/access/actor";
import type { Role } from "@/lib/access/roles";

type Person = { readonly id: string; readonly name?: string };

/** Someone at work for an organisation, as the session gate would have made them. */
export const actorAt = (
  organisation: { readonly id: string },
  person: Person,
  roles: readonly Role[],
): Actor =>
  ({
    userId: person.id,
    name: person.name ?? "Robin Vale",
    organisationId: organisation.id,
    roles: new Set(roles),
    locale: "en",
    timeZone: "Europe/Berlin",
    requestId: randomUUID(),
  }) as unknown as Actor;
