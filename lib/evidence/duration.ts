/** A duration in whole minutes and seconds, rounded once, for a sentence such as "9 min 20 s". */
export function minutesAndSeconds(totalSeconds: number): {
  readonly minutes: number;
  readonly seconds: number;
} {
  const rounded = Math.round(totalSeconds);
  return { minutes: Math.floor(rounded / 60), seconds: rounded - 60 * Math.floor(rounded / 60) };
}
