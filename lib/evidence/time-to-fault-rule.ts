import { step, type Step } from "@/lib/kernel/explanation";
import { minutesAndSeconds } from "./duration";
import { median } from "./samples";

/** How long a bench run must last where the claim gives no time to fault, in seconds (common practice, no source). */
const DEFAULT_RUN_SECONDS = 45 * 60;

/** How long a replacement must run to prove the swap, in seconds (common practice, no source). */
const SWAP_RUN_SECONDS = 5 * 60;

export type RunLength = {
  readonly longEnough: boolean;
  readonly neededSeconds: number;
  /** Seconds still to run; zero where it is enough. */
  readonly missingSeconds: number;
  readonly step: Step;
};

/**
 * Whether goods-in ran a part long enough for "no fault found": at least as long as the claim's time to fault, and
 * 45 minutes where the claim states none. Zero is no time to fault: a fault at once is stated as a short run.
 */
export function runIsLongEnough(
  goodsInRunSeconds: number,
  claimTimeToFaultSeconds: number | null,
  defaultSeconds: number = DEFAULT_RUN_SECONDS,
): RunLength {
  const stated = claimTimeToFaultSeconds !== null && claimTimeToFaultSeconds > 0;
  const neededSeconds = stated ? claimTimeToFaultSeconds : defaultSeconds;
  const ranSeconds = Number.isFinite(goodsInRunSeconds) ? Math.max(0, goodsInRunSeconds) : 0;
  const missingSeconds = Math.max(0, neededSeconds - ranSeconds);
  const [needed, ran] = [minutesAndSeconds(neededSeconds), minutesAndSeconds(ranSeconds)];
  const input = {
    neededMinutes: needed.minutes,
    neededSeconds: needed.seconds,
    ranMinutes: ran.minutes,
    ranSeconds: ran.seconds,
  };
  const rule = stated ? "runNeededByClaim" : "runNeededByDefault";
  return {
    longEnough: missingSeconds === 0,
    neededSeconds,
    missingSeconds,
    step: step(rule, missingSeconds === 0 ? "yes" : "no", input),
  };
}

export type SwapFacts = {
  readonly sameVehicle: boolean;
  readonly runSeconds: number;
  readonly abnormalHeat: boolean;
  readonly faultShown: boolean;
  readonly testDriven: boolean;
};

export type SwapGap = "otherVehicle" | "runTooShort" | "abnormalHeat" | "faultShown" | "noTestDrive";

/**
 * Whether a swap proves the part: same vehicle, a good part, five minutes without abnormal heat or fault, then a test
 * drive (common practice, no source). `against` says that the swap speaks against the part: the good one failed too.
 */
export function swapProof(
  facts: SwapFacts,
  neededSeconds: number = SWAP_RUN_SECONDS,
): { readonly proven: boolean; readonly against: boolean; readonly gaps: readonly SwapGap[] } {
  const gaps: SwapGap[] = [
    ...(facts.sameVehicle ? [] : (["otherVehicle"] as const)),
    ...(facts.runSeconds >= neededSeconds ? [] : (["runTooShort"] as const)),
    ...(facts.abnormalHeat ? (["abnormalHeat"] as const) : []),
    ...(facts.faultShown ? (["faultShown"] as const) : []),
    ...(facts.testDriven ? [] : (["noTestDrive"] as const)),
  ];
  const against = facts.sameVehicle && (facts.faultShown || facts.abnormalHeat);
  return { proven: gaps.length === 0, against, gaps };
}

/** One run of a part: it failed after a time, or it ran so long without failing. */
export type RunOutcome = { readonly faultSeconds: number } | { readonly ranSeconds: number };

/**
 * Several runs of one part: median and range of the times to fault. A run without fault is right-censored, never
 * zero: it counts as longer than it lasted, and where that leaves the middle open the median is null.
 */
export function repeatedRuns(runs: readonly RunOutcome[]): {
  readonly runs: number;
  readonly faults: number;
  readonly medianSeconds: number | null;
  readonly rangeSeconds: readonly [number, number] | null;
} {
  const faults = runs.flatMap((run) => ("faultSeconds" in run ? [run.faultSeconds] : []));
  const censored = runs.flatMap((run) => ("ranSeconds" in run ? [run.ranSeconds] : []));
  const middle = median([...faults, ...censored.map(() => Number.POSITIVE_INFINITY)]);
  const known =
    middle !== null && Number.isFinite(middle) && censored.every((ranSeconds) => ranSeconds >= middle);
  return {
    runs: runs.length,
    faults: faults.length,
    medianSeconds: known ? middle : null,
    rangeSeconds: faults.length === 0 ? null : [Math.min(...faults), Math.max(...faults)],
  };
}
