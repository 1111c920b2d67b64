import "server-only";
import type { Actor } from "@/lib/access/actor";
import { undoing, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { Claim } from "@/models/claim";
import { movesOpenTo, MOVES, type ClaimMove } from "../lifecycle";
import { appendToTimeline } from "../timeline/service";

/** A claim by its eight digits, locked until the transaction ends; null where this organisation has no such claim. */
export const claimForChange = ({ transaction }: Work, number: string): Promise<Claim | null> =>
  Claim.findOne({ where: { number }, transaction, lock: transaction.LOCK.UPDATE });

/** What a move writes besides the new state. */
export type Decision = {
  readonly changes?: Partial<Claim["dataValues"]>;
  readonly detail?: Readonly<Record<string, unknown>>;
  /** Whether only the mover's organisation reads what is noted of it; the new state itself both sides see. */
  readonly isOwnOnly?: boolean;
};

type Decided<Code extends string> = Outcome<Decision, Code> | Promise<Outcome<Decision, Code>>;
export type Moved = { readonly number: string };

/**
 * The one place a claim changes state: load and lock, ask the table of moves, decide, then write row and timeline
 * together. Refuses `notFound`, `moveNotOpen`, and whatever the decision refuses; then nothing is written.
 */
export function moveClaim<Code extends string>(
  actor: Actor,
  { number, move }: { number: string; move: ClaimMove },
  decide: (claim: Claim, work: Work) => Decided<Code>,
): Promise<Outcome<Moved, Code | "notFound" | "moveNotOpen">> {
  return undoing<Moved, Code | "notFound" | "moveNotOpen">(actor, async (work) => {
    const claim = await claimForChange(work, number);
    if (!claim) return refuse("notFound");
    if (!movesOpenTo(actor, claim).includes(move)) return refuse("moveNotOpen");

    const decision = await decide(claim, work);
    if (!decision.ok) return decision;

    await claim.update(
      { ...decision.value.changes, state: MOVES[move].to },
      { transaction: work.transaction },
    );
    const { detail, isOwnOnly } = decision.value;
    await appendToTimeline(work, claim, {
      kind: move,
      ...(detail ? { detail } : {}),
      ...(isOwnOnly ? { onlyForId: actor.organisationId } : {}),
    });
    return ok({ number });
  });
}
