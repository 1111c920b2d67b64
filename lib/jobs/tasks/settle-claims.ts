import type { PoolClient } from "pg";
import { log } from "@/lib/web/log";
import type { Connections } from "../connections";

/** A claim on its own: asked again under its lock whether it still is due, because somebody may have contested it first. */
const settle = async (client: PoolClient, claimId: string): Promise<boolean> => {
  const { rows } = await client.query<{ settled: boolean }>("select guarded.settle_claim($1) as settled", [
    claimId,
  ]);
  return rows[0]?.settled ?? false;
};

/**
 * Settles claims whose every credit is closed and whose days to contest are over or given up. Each is a statement of its
 * own: one that fails keeps no other waiting and is tried again at the next round.
 */
export const settleClaims = async (_payload: unknown, { withPgClient }: Connections): Promise<void> => {
  const { rows } = await withPgClient((client) =>
    client.query<{ claim_id: string }>("select claim_id from guarded.due_to_settle()"),
  );
  for (const { claim_id: claimId } of rows) {
    try {
      const settled = await withPgClient((client) => settle(client, claimId));
      if (settled) log.info({ event: "claimSettled", claim: claimId });
    } catch (fault) {
      log.warn({ event: "settleFailed", claim: claimId, fault: String(fault) });
    }
  }
};
