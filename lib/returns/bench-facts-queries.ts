import "server-only";
import { claimFacts, type ClaimFacts } from "@/lib/claims/facts-shape";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { benchRowId } from "@/lib/evidence/bench-rows";
import { timeToFaultSeconds } from "./bench-run";

export type BenchLog = { readonly id: string; readonly summary: unknown };

/** What the workshop sent, in the revision that counts; null for a claim that was never sent. */
export async function factsAsSent(work: Work, claimId: string): Promise<ClaimFacts | null> {
  const [sent] = await rows<{ facts: unknown }>(
    work,
    `select v.facts from claim_revisions v join claims c on c.id = v.claim_id and c.revision = v.revision
     where c.id = $1`,
    [claimId],
  );
  return sent ? claimFacts.parse(sent.facts) : null;
}

/** After how many seconds the fault came, by what the workshop sent; null where it says nothing of it. */
export async function claimTimeToFault(
  work: Work,
  claimId: string,
  facts: ClaimFacts | null,
): Promise<number | null> {
  const logs = await rows<{ summary: unknown }>(
    work,
    `select summary from evidence_files where claim_id = $1 and kind = 'runLog' and taken_by = 'workshop'
       and withdrawn_at is null`,
    [claimId],
  );
  return timeToFaultSeconds(
    facts ?? { readings: [] },
    logs.map(({ summary }) => summary),
  );
}

/** The newest run log of the bench for a line; null where it has none. */
export async function benchLogOf(
  work: Work,
  { claimId, lineNumber }: { claimId: string; lineNumber: number },
): Promise<BenchLog | null> {
  const [log] = await rows<BenchLog>(
    work,
    `select id, summary from evidence_files where claim_id = $1 and row_id = $2 and kind = 'runLog'
       and withdrawn_at is null order by received_at desc, id limit 1`,
    [claimId, benchRowId("runLog", lineNumber)],
  );
  return log ?? null;
}
