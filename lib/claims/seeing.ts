import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";

const EITHER = { sells: true, buys: true } as const;
const RIGHT = { own: "seeOwnClaims", received: "seeReceivedClaims" } as const;

/**
 * Whether one of a person's roles goes with a side of a claim. Row security knows organisations only: in a distributor
 * that also buys, its technicians have no business with the claims it received.
 */
export const seesSide = ({ roles }: Pick<Actor, "roles">, side: keyof typeof RIGHT): boolean =>
  hasRight(roles, RIGHT[side], EITHER);

/** The same for a claim, by the side on which the person's organisation stands in it. */
export const seesClaim = (
  actor: Pick<Actor, "organisationId" | "roles">,
  { workshopId }: { readonly workshopId: string },
): boolean => seesSide(actor, actor.organisationId === workshopId ? "own" : "received");
