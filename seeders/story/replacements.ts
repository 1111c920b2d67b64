import { idOf } from "../identity";
import type { Chance } from "../random";
import type { Fitting, Service } from "./service";
import type { Unit } from "./units";

/** How a failed unit was made good: the day it came out, and the shelf unit that went in, where the workshop had one. */
export type Repair = { readonly repairedDaysAgo: number; readonly replacement: Unit | null };

export type Repairs = {
  /** By the id of the fitting that failed. */
  readonly byFitting: ReadonlyMap<string, Repair>;
  /** The shelf units that went in: their life starts on the day of the repair. */
  readonly newFittings: readonly Fitting[];
};

const LONGEST_WAIT_DAYS = 5;

/** Repairs every failure from the workshop's own shelf, oldest failure and oldest unit first. */
export function repairsOf({ fittings, shelf }: Service, chance: Chance): Repairs {
  const draw = chance.fork("repairs");
  const left = [...shelf];
  const byFitting = new Map<string, Repair>();
  const newFittings: Fitting[] = [];
  for (const fitting of failuresOf(fittings)) {
    const repairedDaysAgo = Math.max(1, fitting.failedDaysAgo - draw.whole(0, LONGEST_WAIT_DAYS));
    const at = left.findIndex((unit) => replaces(unit, fitting, repairedDaysAgo));
    const [replacement = null] = at < 0 ? [] : left.splice(at, 1);
    byFitting.set(fitting.id, { repairedDaysAgo, replacement });
    if (replacement) newFittings.push(fittedInstead(fitting, replacement, repairedDaysAgo));
  }
  return { byFitting, newFittings };
}

export type Failure = Fitting & { readonly failedDaysAgo: number };

/** The fittings that ended in a failure, the oldest failure first. */
export const failuresOf = (fittings: readonly Fitting[]): Failure[] =>
  fittings
    .flatMap((fitting) =>
      fitting.failedDaysAgo === null ? [] : [{ ...fitting, failedDaysAgo: fitting.failedDaysAgo }],
    )
    .sort((a, b) => b.failedDaysAgo - a.failedDaysAgo || (a.id < b.id ? -1 : 1));

const replaces = (unit: Unit, failed: Fitting, repairedDaysAgo: number): boolean =>
  unit.account === failed.unit.account &&
  unit.shippedDaysAgo > repairedDaysAgo &&
  // A workshop that waits for a verdict does not fit another unit of the batch under suspicion.
  (unit.batch.role !== "bad" || failed.unit.batch.role === "bad") &&
  (unit.batch.part === failed.unit.batch.part ||
    unit.batch.part.number === failed.unit.batch.part.supersededBy);

const fittedInstead = (failed: Fitting, unit: Unit, fittedDaysAgo: number): Fitting => ({
  ...failed,
  id: idOf("fitting", unit.id),
  unit,
  fittedDaysAgo,
  failedDaysAgo: null,
  cause: "part",
});
