/**
 * How the observation of one unit ended. `confirmed` to `declined` are claims; `removed`, `coverEnded` and `running` are
 * units without one. The others were never at risk, or cannot be placed, and are told in words.
 */
export const OUTCOMES = [
  "confirmed",
  "otherCause",
  "undecided",
  "declined",
  "removed",
  "coverEnded",
  "running",
  "shelf",
  "beforeStart",
  "afterCover",
  "noShipment",
] as const;
export type UnitOutcome = (typeof OUTCOMES)[number];

/** Stands for the batch of units whose batch nobody knows. */
export const NO_BATCH = "00000000-0000-0000-0000-000000000000";

/** So many units of a batch whose observation ended alike at the same age. `ageDays` is null for units never at risk. */
export type AgeGroup = {
  readonly batchId: string;
  readonly ageDays: number | null;
  readonly outcome: UnitOutcome;
  /** Whether the start of service was estimated from the shipment day. */
  readonly assumed: boolean;
  /** Whether they were sold to the workshop with the most claims on this part. */
  readonly atLargest: boolean;
  readonly count: number;
};
