import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { normaliseSerial } from "@/lib/labels/serial";
import type { Claim } from "@/models/claim";
import type { ClaimFacts, FactLine } from "../facts-shape";

type Doubt = { readonly kind: string; readonly detail: Readonly<Record<string, string>> };

/** What the days of one line say that cannot all be true. Told to the distributor, decided by a person. */
function doubtsOfDays(line: FactLine, failedOn: string): Doubt[] {
  const shippedOn = line.invoiceLine?.shippedOn;
  const doubts: Doubt[] = [];
  if (shippedOn && shippedOn > failedOn)
    doubts.push({ kind: "shippedAfterFailure", detail: { shippedOn, failedOn } });
  if (shippedOn && line.fittedOn && line.fittedOn < shippedOn)
    doubts.push({ kind: "fittedBeforeShipment", detail: { shippedOn, fittedOn: line.fittedOn } });
  return doubts;
}

/**
 * Flags for the distributor alone: days that contradict each other, and a serial that is unknown or was sold to
 * somebody else. The workshop's answer is the same with and without them.
 */
export async function flagDoubts(work: Work, claim: Claim, facts: ClaimFacts): Promise<void> {
  for (const line of facts.lines) {
    for (const doubt of doubtsOfDays(line, facts.failedOn))
      await rows(work, "select guarded.flag_claim($1, $2, $3, $4)", [
        claim.id,
        line.lineNumber,
        doubt.kind,
        JSON.stringify(doubt.detail),
      ]);
    if (!line.unit && line.serialTyped)
      await rows(work, "select guarded.flag_serial($1, $2, $3)", [
        claim.id,
        line.lineNumber,
        normaliseSerial(line.serialTyped),
      ]);
  }
}
