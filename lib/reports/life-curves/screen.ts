import type { Grade, GradeReason } from "@/lib/reliability/batch-grade";
import { batchScreen, type ScreenedBatch } from "@/lib/reliability/batch-screen";
import { expectedExposure } from "@/lib/reliability/expected-exposure";
import { MONTH_DAYS } from "@/lib/reliability/months";
import { garwood } from "@/lib/reliability/rates";
import { CONFIDENCE, estimateOf } from "./estimate";
import type { Observation } from "./observations";
import type { Estimate } from "./view";

/** A batch with what was observed of it: now, and as it was known a month before. */
export type Watched = { readonly id: string; readonly now: Observation; readonly before: Observation };

export type Judged = {
  readonly id: string;
  readonly expected: number | null;
  readonly ratio: Estimate | null;
  readonly shrunken: number | null;
  readonly adjustedP: number | null;
  readonly grade: Grade;
  readonly reason: GradeReason;
};

/** From the loudest on. */
const LOUDNESS: Readonly<Record<Grade, number>> = { act: 0, lookInto: 1, quiet: 2, notYetKnown: 3 };

type Look = { readonly id: string; readonly observed: Observation };
type Known = { readonly usual: number | null; readonly strongBefore: ReadonlySet<string> };

/** One look at all batches; those on Act are then left out of the comparison, so that they do not hide a second one. */
function lookAt(looks: readonly Look[], known: Known): readonly ScreenedBatch[] {
  const first = screened(looks, known, []);
  const onAct = first.filter(({ grade }) => grade === "act").map(({ id }) => id);
  return onAct.length === 0 || looks.length - onAct.length < 2 ? first : screened(looks, known, onAct);
}

function screened(
  looks: readonly Look[],
  { usual, strongBefore }: Known,
  onAct: readonly string[],
): readonly ScreenedBatch[] {
  const rows = looks.flatMap(({ id, observed }) => observed.rows.map((row) => ({ ...row, group: id })));
  const oldest = new Map(looks.map(({ id, observed }) => [id, observed.oldestDays]));
  const { batches } = batchScreen(
    expectedExposure(rows, { leftOut: onAct }).map((row) => ({
      ...row,
      oldestDays: oldest.get(row.id),
      strongBefore: strongBefore.has(row.id),
    })),
    { confidence: CONFIDENCE, onAct, ...(usual === null ? {} : { usualFirstFailureDays: usual }) },
  );
  return batches;
}

/** The age in days at which half of the batches with a failure had their first; null before any has one. */
function usualFirstFailure(observed: readonly Observation[]): number | null {
  const firsts = observed.flatMap(({ rows }) => {
    const first = rows.find(({ failed }) => failed);
    return first ? [first.ageDays] : [];
  });
  return firsts.toSorted((a, b) => a - b)[Math.floor((firsts.length - 1) / 2)] ?? null;
}

/** Every batch judged against the others of its part, in the order they came. */
export function judgeBatches(watched: readonly Watched[]): Judged[] {
  const usual = usualFirstFailure(watched.map(({ now }) => now));
  const before = lookAt(
    watched.map(({ id, before: observed }) => ({ id, observed })),
    { usual, strongBefore: new Set() },
  );
  const strongBefore = new Set(before.filter(({ isStrong }) => isStrong).map(({ id }) => id));
  const now = lookAt(
    watched.map(({ id, now: observed }) => ({ id, observed })),
    { usual, strongBefore },
  );
  const byId = new Map(now.map((batch) => [batch.id, batch]));
  const others = now.length;
  return watched.map(({ id }) => judgedOf(id, byId.get(id), others));
}

/** A batch none of whose ages ever saw a failure has no exposure: too little is expected, though others are there. */
function judgedOf(id: string, batch: ScreenedBatch | undefined, batches: number): Judged {
  if (!batch)
    return {
      id,
      expected: null,
      ratio: null,
      shrunken: null,
      adjustedP: null,
      grade: "notYetKnown",
      reason: "expectedLow",
    };
  const { expected, ratio, limits, shrunken, adjustedP, grade, reason } = batch;
  return {
    id,
    expected,
    ratio: ratio === null || limits === null ? null : estimateOf(ratio, limits),
    shrunken,
    adjustedP,
    grade,
    reason: reason === "alone" && batches > 1 ? "expectedLow" : reason,
  };
}

type Ranked = Pick<Judged, "grade" | "shrunken" | "ratio">;

/** The loudest first; within a grade the furthest above the others, by the ratio shrunken towards all. */
export const louder = (a: Ranked, b: Ranked): number =>
  LOUDNESS[a.grade] - LOUDNESS[b.grade] ||
  (b.shrunken ?? b.ratio?.value ?? 0) - (a.shrunken ?? a.ratio?.value ?? 0);

/** Failures per 1,000 months in service with exact limits; null without any. */
export function ratePerThousand(failed: number, unitDays: number): Estimate | null {
  if (unitDays <= 0) return null;
  const thousands = unitDays / MONTH_DAYS / 1000;
  return estimateOf(failed / thousands, garwood({ failures: failed, exposure: thousands }, CONFIDENCE));
}
