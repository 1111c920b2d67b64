import type { BatchLine } from "./view";

type Rated = Pick<BatchLine, "grade" | "rate">;

/**
 * The right end of the dot plot's scale, in failures per 1,000 months. It goes by the batches with enough exposure to be
 * graded: one failure among a few young units would flatten every other dot. Intervals count as far as twice the highest
 * rate. What lies beyond is drawn with an arrow.
 */
export function rateScale(batches: readonly Rated[]): number {
  const known = batches.filter(({ grade, rate }) => rate !== null && grade !== "notYetKnown");
  const setting = known.length > 0 ? known : batches;
  const highest = Math.max(1, ...setting.flatMap(({ rate }) => (rate ? [rate.value] : [])));
  const uppers = setting.flatMap(({ rate }) => (rate?.upper ? [rate.upper] : []));
  return Math.ceil(Math.min(highest * 2, Math.max(highest, ...uppers)));
}
