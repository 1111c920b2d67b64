import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";

type Parties = { readonly id: string; readonly sellerId: string; readonly workshopId: string };

type Entry = {
  readonly kind: string;
  readonly detail?: Readonly<Record<string, unknown>>;
  /** The only organisation that sees this entry; without it both do. */
  readonly onlyForId?: string;
};

/** Adds an entry nobody can change. Its number, its time and its place in the chain are the database's. */
export const appendToTimeline = (
  work: Work,
  claim: Parties,
  { kind, detail = {}, onlyForId }: Entry,
): Promise<unknown> =>
  rows(
    work,
    `insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_id, actor_name,
       actor_organisation_id, only_for_id, detail, prev_hash, hash)
     values ($1, 0, $2, $3, $4, $5, $6, $7, $8, $9, '', '')`,
    [
      claim.id,
      claim.sellerId,
      claim.workshopId,
      kind,
      work.actor.userId,
      work.actor.name,
      work.actor.organisationId,
      onlyForId ?? null,
      JSON.stringify(detail),
    ],
  );

/** Notes in the organisation's own chain who did what: sign-ins, permissions, exports, refusals worth keeping. */
export const appendToAudit = (
  work: Work,
  action: string,
  detail: Readonly<Record<string, unknown>> = {},
): Promise<unknown> => rows(work, "select guarded.append_audit($1, $2)", [action, JSON.stringify(detail)]);
