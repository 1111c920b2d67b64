import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { ReturnState } from "../lifecycle";

type LineReturn = { readonly lineNumber: number; readonly returnState: ReturnState };

/** Where the part of a line is when nobody will examine it: the verdict then says why it needs no finding. */
const WITHOUT_FINDING: readonly ReturnState[] = ["notNeeded", "missing", "notSentInTime", "scrapOnSite"];

/** Where it is when its finding is still to come. */
const ON_ITS_WAY: readonly ReturnState[] = ["awaited", "sent", "received"];

/** True where a verdict on the line rests on no finding and so needs its reason. */
export const restsOnNoFinding = (state: ReturnState): boolean => WITHOUT_FINDING.includes(state);

/** True where the verdict has to wait: the part was called in and goods-in has not examined it. */
export const waitsForFinding = (state: ReturnState): boolean => ON_ITS_WAY.includes(state);

/**
 * Whether a verdict may be given as the parts stand. Refuses `findingAwaited` with the line that is still on its way,
 * and `returnReasonMissing` at its field where a line has no finding and nobody says why.
 */
export function checkReturns(
  lines: readonly LineReturn[],
  reason: string,
): Outcome<true, "findingAwaited" | "returnReasonMissing"> {
  const waiting = lines.find(({ returnState }) => waitsForFinding(returnState));
  if (waiting) return refuse("findingAwaited", { line: waiting.lineNumber });
  if (reason === "" && lines.some(({ returnState }) => restsOnNoFinding(returnState)))
    return refuse("returnReasonMissing", {}, "returnWaivedReason");
  return ok(true);
}
