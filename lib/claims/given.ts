import type { EvidenceGiven } from "@/lib/evidence/completeness";
import type { ClaimFacts } from "./facts-shape";

/** The parts of a claim that answer rows of its Evidence list. */
export type Given = Pick<ClaimFacts, "readings" | "answers" | "cannotGet" | "evidence" | "ruledOut" | "swap">;

/**
 * What a claim holds, by row of its Evidence list. Two rows are answered by questions of their own on the page before:
 * what was ruled out, and the proof by swap.
 */
export function givenByRow({ readings, answers, cannotGet, evidence, ruledOut, swap }: Given): EvidenceGiven {
  const done = new Set([
    ...readings.map(({ rowId }) => rowId),
    ...answers.map(({ rowId }) => rowId),
    ...evidence.map(({ rowId }) => rowId),
    ...(ruledOut.length > 0 ? ["ruledOut"] : []),
    ...(swap ? ["swapProof"] : []),
  ]);
  const excused = cannotGet.filter(({ rowId }) => !done.has(rowId));
  return Object.fromEntries([
    ...[...done].map((rowId) => [rowId, { state: "done" }] as const),
    ...excused.map(({ rowId, reason }) => [rowId, { state: "cannotGet", reason }] as const),
  ]);
}
