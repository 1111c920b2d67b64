import "server-only";
import type { Work } from "@/lib/db/unit-of-work";
import { Organisation } from "@/models/organisation";

const partyOf = ({ transaction }: Work, organisationId: string): Promise<Organisation | null> =>
  Organisation.findByPk(organisationId, { attributes: ["name", "timeZone"], transaction });

/** The short name of an organisation the actor belongs to or trades with. */
export const nameOf = async (work: Work, organisationId: string): Promise<string> =>
  (await partyOf(work, organisationId))?.name ?? "";

/** The IANA time zone such an organisation works in. */
export const zoneOf = async (work: Work, organisationId: string): Promise<string> =>
  (await partyOf(work, organisationId))?.timeZone ?? "UTC";
