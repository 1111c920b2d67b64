/**
 * So many equal units (one unless `count` says more) whose observation ended at an age in days, by a failure or without
 * one. With an entry they are watched only at ages above it; without, from the start.
 */
export type Observation = {
  readonly entryDays?: number;
  readonly ageDays: number;
  readonly failed: boolean;
  readonly count?: number;
};

const isAge = (days: number): boolean => Number.isFinite(days) && days >= 0;

/** How many units a row stands for. Throws RangeError for an age, entry or count that no unit can have. */
export function countOf({ entryDays, ageDays, count = 1 }: Observation): number {
  if (!isAge(ageDays)) throw new RangeError(`No age in days: ${ageDays}`);
  if (!Number.isSafeInteger(count) || count < 0) throw new RangeError(`No count of units: ${count}`);
  if (entryDays === undefined) return count;
  if (!isAge(entryDays)) throw new RangeError(`No entry in days: ${entryDays}`);
  if (entryDays >= ageDays)
    throw new RangeError(`Entered at ${entryDays} days, not before its end at ${ageDays}`);
  return count;
}

/** A confidence as it was given. Throws RangeError unless it lies between 0 and 1. */
export function checkedConfidence(confidence: number): number {
  if (confidence > 0 && confidence < 1) return confidence;
  throw new RangeError(`No confidence between 0 and 1: ${confidence}`);
}
