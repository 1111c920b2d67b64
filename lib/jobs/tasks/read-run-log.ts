import type { Task } from "graphile-worker";
import { z } from "zod";
import { summariseRunLog } from "@/lib/evidence/run-log-summary";
import { LIMITS } from "@/lib/kernel/limits";
import { readAll } from "@/lib/storage/objects";

const payloadShape = z.object({ evidenceId: z.uuid() });
type FileRow = { object_key: string };

/** Reads a run log once, so that every page draws it without reading the file again. */
export const readRunLog: Task = async (payload, { query }) => {
  const { evidenceId } = payloadShape.parse(payload);
  const { rows } = await query<FileRow>(
    "select object_key from evidence_files where id = $1 and summary is null",
    [evidenceId],
  );
  const [file] = rows;
  if (!file) return;
  const summary = summariseRunLog(await readAll(file.object_key, LIMITS.runLogBytes));
  await query("update evidence_files set summary = $2 where id = $1", [evidenceId, JSON.stringify(summary)]);
};
