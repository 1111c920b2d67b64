import { minutesAndSeconds } from "@/lib/evidence/duration";
import { isRunLogSummary } from "@/lib/evidence/run-log-summary";
import { runIsLongEnough } from "@/lib/evidence/time-to-fault-rule";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { FindingKind } from "./kinds";

type Said = {
  readonly readings: readonly { readonly kind: string; readonly canonicalValue: number | null }[];
};

const TIME_TO_FAULT = "timeToFault";
const SECONDS_A_MINUTE = 60;

/** Seconds under voltage in a run log as it was read once; null where it is not read, or was no log. */
export const loggedRunSeconds = (summary: unknown): number | null =>
  isRunLogSummary(summary) && summary.isRead ? summary.analysis.ranSeconds : null;

/** Seconds to the fault in such a log; null where it shows none. */
const loggedFaultSeconds = (summary: unknown): number | null =>
  isRunLogSummary(summary) && summary.isRead ? (summary.analysis.fault?.afterS ?? null) : null;

/**
 * After how many seconds the fault came, as the workshop sent it: the reading, or what its run logs show; the longest
 * where several say it. Null where the claim states none.
 */
export function timeToFaultSeconds(facts: Said, workshopLogs: readonly unknown[]): number | null {
  const typed = facts.readings.flatMap(({ kind, canonicalValue }) =>
    kind === TIME_TO_FAULT && canonicalValue !== null ? [canonicalValue * SECONDS_A_MINUTE] : [],
  );
  const logged = workshopLogs.flatMap((summary) => loggedFaultSeconds(summary) ?? []);
  const stated = [...typed, ...logged].filter((seconds) => seconds > 0);
  return stated.length === 0 ? null : Math.max(...stated);
}

/** How long the bench ran the part: what the log shows where one was given, else what was typed. */
export const benchRunSeconds = (run: { minutes: number | null; logSummary: unknown }): number =>
  loggedRunSeconds(run.logSummary) ?? (run.minutes ?? 0) * SECONDS_A_MINUTE;

/** How long the bench must run the part before it may say that it found no fault, in seconds. */
export const neededRunSeconds = (claimSeconds: number | null): number =>
  runIsLongEnough(0, claimSeconds).neededSeconds;

type Bench = {
  readonly kind: FindingKind;
  readonly run: { readonly minutes: number | null; readonly logSummary: unknown };
  readonly claimSeconds: number | null;
  readonly isQuarantined: boolean;
};

/**
 * Whether the bench may write this finding. Refuses `noFaultTooShort` with how long it ran and how long it must, and
 * `noFaultInQuarantine` for a part that may not go on a rig at all.
 */
export function findingAllowed({
  kind,
  run,
  claimSeconds,
  isQuarantined,
}: Bench): Outcome<true, "noFaultTooShort" | "noFaultInQuarantine"> {
  if (kind !== "noFaultFound") return ok(true);
  if (isQuarantined) return refuse("noFaultInQuarantine", {}, "kind");
  const ranSeconds = benchRunSeconds(run);
  const rule = runIsLongEnough(ranSeconds, claimSeconds);
  if (rule.longEnough) return ok(true);
  const [ran, needed] = [minutesAndSeconds(ranSeconds), minutesAndSeconds(rule.neededSeconds)];
  return refuse(
    "noFaultTooShort",
    {
      ranMinutes: ran.minutes,
      ranSeconds: ran.seconds,
      neededMinutes: needed.minutes,
      neededSeconds: needed.seconds,
    },
    "kind",
  );
}
