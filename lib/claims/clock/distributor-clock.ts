/** The distributor's clock on a claim's row: since when it stands, for how long it stood, and the day it runs to. */
export type DistributorClock = {
  readonly clockStoppedAt: Date | null;
  readonly clockStoppedMinutes: number;
  readonly answerDueAt: Date | null;
};

const MINUTE_MS = 60_000;

/** The clock made to stand from `now` on; one that stands already stands since it was stopped. */
export const clockStanding = (
  clock: DistributorClock,
  now: Date,
): Pick<DistributorClock, "clockStoppedAt"> => ({
  clockStoppedAt: clock.clockStoppedAt ?? now,
});

/** The clock made to run again: the answer is due later by as long as it stood. One that runs stays as it was. */
export function clockRunning(clock: DistributorClock, now: Date): DistributorClock {
  const { clockStoppedAt, clockStoppedMinutes, answerDueAt } = clock;
  if (clockStoppedAt === null) return { clockStoppedAt, clockStoppedMinutes, answerDueAt };
  const minutes = Math.max(0, Math.round((now.getTime() - clockStoppedAt.getTime()) / MINUTE_MS));
  return {
    clockStoppedAt: null,
    clockStoppedMinutes: clockStoppedMinutes + minutes,
    answerDueAt: answerDueAt && new Date(answerDueAt.getTime() + minutes * MINUTE_MS),
  };
}
