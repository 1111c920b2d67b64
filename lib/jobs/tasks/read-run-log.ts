import type { Task } from "graphile-worker";
import { z } from "zod";
import { analyseRun } from "@/lib/evidence/run-analysis";
import { parseRunLog } from "@/lib/evidence/run-log-parser";
import { thinnedLog, type RunLogSummary } from "@/lib/evidence/run-log-summary";
import { LIMITS } from "@/lib/kernel/limits";
import { readAll } from "@/lib/storage/objects";

const payloadShape = z.object({ evidenceId: z.uuid() });
type FileRow = { object_key: string; coil_ohm: number | null };

function summaryOf(bytes: Buffer, coilOhm: number | null): RunLogSummary {
  const parsed = parseRunLog(bytes);
  if (!parsed.ok) return { shape: 1, isRead: false, code: parsed.code, detail: parsed.detail };
  const analysis = analyseRun(parsed.value, coilOhm === null ? {} : { coil: { ohmAt20: coilOhm } });
  return {
    shape: 1,
    isRead: true,
    log: thinnedLog(parsed.value),
    analysis,
    rowCount: parsed.value.timeS.length,
  };
}

/** Reads a run log once, so that every page draws it without reading the file again. */
export const readRunLog: Task = async (payload, { query }) => {
  const { evidenceId } = payloadShape.parse(payload);
  const { rows } = await query<FileRow>(
    `select e.object_key, null::float as coil_ohm from evidence_files e where e.id = $1 and e.summary is null`,
    [evidenceId],
  );
  const [file] = rows;
  if (!file) return;
  const summary = summaryOf(await readAll(file.object_key, LIMITS.runLogBytes), file.coil_ohm);
  await query("update evidence_files set summary = $2 where id = $1", [evidenceId, JSON.stringify(summary)]);
};
