import "server-only";
import { randomUUID } from "node:crypto";
import { QueryTypes, type Transaction } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import type { Outcome, Refusal } from "@/lib/kernel/outcome";
import { sequelize } from "./sequelize";

/** What every query needs: pass it as the options of a model's call, so that it runs inside the transaction. */
export type Work = { readonly transaction: Transaction; readonly actor: Actor };

const SERIALIZATION_FAULTS = new Set(["40001", "40P01"]);
const TRIES = 5;

const sqlState = (fault: unknown): string | undefined => {
  if (typeof fault !== "object" || fault === null) return undefined;
  if ("original" in fault && typeof fault.original === "object" && fault.original && "code" in fault.original)
    return String(fault.original.code);
  return undefined;
};

const setContext = (transaction: Transaction, { userId, organisationId, requestId }: Actor) =>
  sequelize.query(
    `select set_config('app.actor_id', $1, true), set_config('app.organisation_id', $2, true), set_config('app.request_id', $3, true)`,
    { bind: [userId, organisationId, requestId], transaction, type: QueryTypes.SELECT },
  );

/**
 * One intention of one person: a transaction that carries who asks and for which organisation, so that row security
 * answers for them. A query outside of it sees nothing. A clash of two transactions is tried again as a whole;
 * nothing slow or external belongs inside.
 */
export async function unitOfWork<T>(actor: Actor, act: (work: Work) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await sequelize.transaction(async (transaction) => {
        await setContext(transaction, actor);
        return act({ transaction, actor });
      });
    } catch (fault) {
      if (attempt >= TRIES || !SERIALIZATION_FAULTS.has(sqlState(fault) ?? "")) throw fault;
      await new Promise((resolve) => setTimeout(resolve, 10 * 2 ** attempt * (0.5 + Math.random())));
    }
  }
}

/** Thrown to take back what was written before a refusal was found; `undoing` then answers with that refusal. */
class Undone extends Error {
  constructor(code: string) {
    super(`refused: ${code}`);
  }
}

/** A unit of work whose refusal undoes everything it wrote. */
export async function undoing<T, Code extends string>(
  actor: Actor,
  act: (work: Work) => Promise<Outcome<T, Code>>,
): Promise<Outcome<T, Code>> {
  const found: { refusal?: Refusal<Code> } = {};
  try {
    return await unitOfWork(actor, async (work) => {
      const outcome = await act(work);
      if (outcome.ok) return outcome;
      found.refusal = outcome;
      throw new Undone(outcome.code);
    });
  } catch (fault) {
    if (fault instanceof Undone && found.refusal) return found.refusal;
    throw fault;
  }
}

/** The few statements before anybody is known: signing in, single-use links. They may call `guarded` functions only. */
export const beforeSignIn = <Row extends object>(sql: string, bind: unknown[]): Promise<Row[]> =>
  sequelize.query<Row>(sql, { bind, type: QueryTypes.SELECT });

/** Rows of a statement written by hand, inside the transaction, with values bound and never pasted. */
export const rows = <Row extends object>(work: Work, sql: string, bind: unknown[] = []): Promise<Row[]> =>
  sequelize.query<Row>(sql, { bind, transaction: work.transaction, type: QueryTypes.SELECT });

export const newRequestId = (): string => randomUUID();
