import { createHash } from "node:crypto";
import { analyseRun } from "@/lib/evidence/run-analysis";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { DIALECTS, logFile } from "@/seeders/evidence/logs";
import { runOf } from "@/seeders/evidence/thermal";
import { chanceFrom } from "@/seeders/random";
import { against } from "./measure";
import type { Line } from "./table";

/** A run logged every second, as a logger writes it. */
export const madeLog = (minutes: number): Buffer =>
  logFile(
    runOf({
      seed: chanceFrom("bench"),
      ohmAt20: 60,
      faultAfterMinutes: null,
      minutes,
      stepS: 1,
      turns: false,
      words: { on: "on", fault: "fault", off: "off" },
    }),
    DIALECTS.plain,
  );

/** The same cells as JSON, as often as it takes to be about as many bytes. */
function asJson(log: Buffer): string {
  const rows = log
    .toString("utf8")
    .split("\n")
    .map((line) => line.split(",").map((cell) => (Number.isFinite(Number(cell)) ? Number(cell) : cell)));
  const all = JSON.stringify(rows);
  const share = Math.floor((rows.length * log.length) / all.length);
  return JSON.stringify(rows.slice(0, share));
}

function readLog(log: Buffer): void {
  const parsed = parseRunLog(log);
  if (!parsed.ok) throw new Error(`the made log was refused: ${parsed.code}`);
  analyseRun(parsed.value, { coil: { ohmAt20: 60 } });
}

const MINUTES = { short: 200, long: 800 } as const;

/** A run log read and analysed, against its own hash and against JSON of as many bytes. */
export async function runLogLines(): Promise<Line[]> {
  const [short, long] = [madeLog(MINUTES.short), madeLog(MINUTES.long)];
  const hashOf = (log: Buffer) => () => createHash("sha256").update(log).digest("hex");
  const json = asJson(long);
  const brief = await against(hashOf(short), () => readLog(short), { rounds: 9, warmUp: 3 });
  const full = await against(hashOf(long), () => readLog(long), { rounds: 5, warmUp: 1 });
  const beside = await against(
    () => void JSON.parse(json),
    () => readLog(long),
    { rounds: 5, warmUp: 1 },
  );
  const megabytes = (bytes: number) => (bytes / 1e6).toFixed(2);
  const perMb = full.medianMs / (long.length / 1e6);
  const perMbGrown = full.fromMs / long.length / (brief.fromMs / short.length);
  const note = `${megabytes(long.length)} MB, ${perMb.toFixed(0)} ms per MB, per MB long/short ${perMbGrown.toFixed(2)}`;
  return [
    { name: "run log read", measured: full, yardstick: "sha256", note },
    {
      name: "run log read",
      measured: beside,
      yardstick: "JSON.parse",
      note: `against ${megabytes(json.length)} MB of JSON`,
    },
  ];
}
