export type Grade = "act" | "lookInto" | "quiet" | "notYetKnown";

export type GradeReason =
  "alone" | "expectedLow" | "tooYoung" | "strong" | "firstLook" | "fewFailures" | "raised" | "within";

/** What the grades hang on; versioned in the Rule book. */
export type GradeLimits = {
  /** Adjusted p up to which a batch is looked into, and up to which it is acted on. */
  readonly lookP: number;
  readonly actP: number;
  /** To act, the lower limit of the ratio lies above this, and the batch has so many failures. */
  readonly actRatio: number;
  readonly actFailures: number;
  /** Nothing is said of a batch of which less is expected. */
  readonly leastExpected: number;
};

export const GRADE_LIMITS: GradeLimits = {
  lookP: 0.1,
  actP: 0.01,
  actRatio: 1.5,
  actFailures: 3,
  leastExpected: 1,
};

type Strength = {
  readonly failures: number;
  readonly limits: readonly [number, number] | null;
  readonly adjustedP: number | null;
};

export type GradeFacts = Strength & {
  /**
   * The greater of what the others' rate and the rate of all let expect: others without a failure would else make every
   * batch unknown, however much it failed.
   */
  readonly mostExpected: number;
  readonly isAlone: boolean;
  readonly isYoung: boolean;
  readonly strongBefore: boolean;
};

/** Whether one look is strong enough to act on. */
export const isStrong = ({ failures, limits, adjustedP }: Strength, grade: GradeLimits): boolean =>
  adjustedP !== null &&
  limits !== null &&
  adjustedP <= grade.actP &&
  limits[0] > grade.actRatio &&
  failures >= grade.actFailures;

/**
 * The grade of a batch with its reason. To act takes two strong looks running. What is strong is known, however young the
 * batch is and however little was expected of it: only the absence of failures has to wait for age and numbers.
 */
export function gradeOf(
  facts: GradeFacts,
  limits: GradeLimits,
): { readonly grade: Grade; readonly reason: GradeReason } {
  const { adjustedP, failures } = facts;
  if (facts.isAlone) return { grade: "notYetKnown", reason: "alone" };
  if (isStrong(facts, limits))
    return facts.strongBefore
      ? { grade: "act", reason: "strong" }
      : { grade: "lookInto", reason: "firstLook" };
  if (adjustedP === null || facts.mostExpected < limits.leastExpected)
    return { grade: "notYetKnown", reason: "expectedLow" };
  if (facts.isYoung) return { grade: "notYetKnown", reason: "tooYoung" };
  if (adjustedP > limits.lookP) return { grade: "quiet", reason: "within" };
  const isFew = adjustedP <= limits.actP && failures < limits.actFailures;
  return { grade: "lookInto", reason: isFew ? "fewFailures" : "raised" };
}
