import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";

/** Writes what an administrator did into the organisation's audit chain, in the transaction of the change itself. */
export const writeToAudit = (
  work: Work,
  action: string,
  detail: Readonly<Record<string, unknown>>,
): Promise<unknown> => rows(work, "select guarded.append_audit($1, $2)", [action, JSON.stringify(detail)]);
