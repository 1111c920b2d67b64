import {
  gradeOf,
  GRADE_LIMITS,
  isStrong,
  type Grade,
  type GradeLimits,
  type GradeReason,
} from "./batch-grade";
import { benjaminiHochberg } from "./false-discovery";
import { gammaPrior, shrunkenRatio, type GammaPrior } from "./gamma-prior";
import { compareRates, type ExactLimits, type Rate } from "./rates";

/** A batch with its failures and its exposure: an expected number by the pooled hazard, or unit-days. */
export type BatchRow = Rate & {
  readonly id: string;
  /** Age in days of its oldest unit in service. */
  readonly oldestDays?: number;
  /** Whether the look before this one was strong too, or a running sum has signalled. */
  readonly strongBefore?: boolean;
};

export type BatchScreenOptions = {
  /** Of the limits of the ratio. */
  readonly confidence: number;
  /** Age in days at which the part usually begins to fail; a batch that is younger is not known yet. */
  readonly usualFirstFailureDays?: number;
  /** Batches already acted on: compared with the others, which are not compared with them. */
  readonly onAct?: readonly string[];
  /** From the Rule book; ours unless given. */
  readonly limits?: GradeLimits;
};

export type ScreenedBatch = {
  readonly id: string;
  readonly failures: number;
  /** Failures it would have had at the rate of the others; null where there are no others. */
  readonly expected: number | null;
  /** Failures over expected, with exact limits; null where nothing is expected. */
  readonly ratio: number | null;
  readonly limits: ExactLimits | null;
  /** Its ratio to the rate of all, drawn towards their mean; for ranking. */
  readonly shrunken: number | null;
  /** One-sided, exact: so many failures or more, if it failed like the others. */
  readonly p: number | null;
  readonly adjustedP: number | null;
  readonly grade: Grade;
  readonly reason: GradeReason;
  /** Strong enough to act on at the next look. */
  readonly isStrong: boolean;
};

export type BatchScreen = { readonly batches: readonly ScreenedBatch[]; readonly prior: GammaPrior | null };

type Sum = { readonly failures: number; readonly exposure: number };

const sumOf = (rows: readonly Sum[]): Sum => ({
  failures: rows.reduce((sum, { failures }) => sum + failures, 0),
  exposure: rows.reduce((sum, { exposure }) => sum + exposure, 0),
});

/**
 * Each batch against all the others pooled: ratio, exact one-sided p adjusted for the number of batches, grade. Throws
 * RangeError for counts or exposures that cannot be, and for an id given twice.
 */
export function batchScreen(rows: readonly BatchRow[], options: BatchScreenOptions): BatchScreen {
  checked(rows);
  const { onAct = [], limits = GRADE_LIMITS, usualFirstFailureDays = 0 } = options;
  const all = sumOf(rows);
  const pooledOf = ({ exposure }: Rate): number =>
    all.exposure > 0 ? (exposure * all.failures) / all.exposure : 0;
  const prior = gammaPrior(rows.map((row) => ({ failures: row.failures, expected: pooledOf(row) })));
  const compared = rows.map((row) => compare(row, rows, { onAct, confidence: options.confidence }));
  const adjusted = benjaminiHochberg(compared.flatMap((one) => (one === null ? [] : [one.p])));
  let next = 0;
  const batches = rows.map((row, at): ScreenedBatch => {
    const pooled = pooledOf(row);
    const found = compared[at] ?? null;
    const adjustedP = found === null ? null : adjusted[next++]!;
    const facts = { ...NOT_COMPARED, ...found, failures: row.failures, adjustedP };
    const known = {
      mostExpected: Math.max(facts.expected ?? 0, pooled),
      isAlone: rows.every(({ id }) => id === row.id || onAct.includes(id)),
      isYoung: (row.oldestDays ?? Infinity) < usualFirstFailureDays,
      strongBefore: row.strongBefore ?? false,
    };
    return {
      id: row.id,
      ...facts,
      shrunken: prior && shrunkenRatio(prior, { failures: row.failures, expected: pooled }),
      ...gradeOf({ ...facts, ...known }, limits),
      isStrong: isStrong(facts, limits),
    };
  });
  return { batches, prior };
}

function checked(rows: readonly BatchRow[]): void {
  if (new Set(rows.map(({ id }) => id)).size < rows.length) throw new RangeError("A batch is given twice");
  for (const { id, failures, exposure } of rows) {
    if (!Number.isSafeInteger(failures) || failures < 0)
      throw new RangeError(`No count for ${id}: ${failures}`);
    if (!Number.isFinite(exposure) || exposure < 0)
      throw new RangeError(`No exposure for ${id}: ${exposure}`);
  }
}

type Compared = Pick<ScreenedBatch, "expected" | "ratio" | "limits"> & { readonly p: number };

const NOT_COMPARED = { expected: null, ratio: null, limits: null, p: null };

/** Null where the batch or the others have no exposure. */
function compare(
  row: BatchRow,
  rows: readonly BatchRow[],
  { onAct, confidence }: { readonly onAct: readonly string[]; readonly confidence: number },
): Compared | null {
  const others = sumOf(rows.filter(({ id }) => id !== row.id && !onAct.includes(id)));
  if (row.exposure === 0 || others.exposure === 0) return null;
  const { ratio, limits, pGreater } = compareRates(row, others, confidence);
  const expected = (others.failures * row.exposure) / others.exposure;
  return { expected, ratio: expected === 0 ? null : ratio, limits, p: pGreater };
}
