import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { seriesOf, type RunLog } from "@/lib/evidence/run-log";
import { given } from "./outcome-value";

export const read = (source: Uint8Array | string): RunLog => given(parseRunLog(source));
/** Times, the first temperature and the first current: all that most of these tests look at. */
export const inShort = (log: RunLog) => ({
  timeS: log.timeS,
  celsius: seriesOf(log, "temperature")[0]?.values,
  ampere: seriesOf(log, "current")[0]?.values,
});
/** Why a file is no run log, or `read`. */
export const refusalOf = (source: Uint8Array | string) => {
  const outcome = parseRunLog(source);
  return outcome.ok ? "read" : outcome.code;
};
export const noteCodes = (log: RunLog) => log.notes.map((note) => note.code);
