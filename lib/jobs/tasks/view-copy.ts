import { createHash } from "node:crypto";
import type { Task } from "graphile-worker";
import { z } from "zod";
import { LIMITS } from "@/lib/kernel/limits";
import { viewKey } from "@/lib/storage/keys";
import { putOnce, readAll } from "@/lib/storage/objects";
import { viewCopyOf, type ViewCopy } from "@/lib/storage/pictures";
import { log } from "@/lib/web/log";

const payloadShape = z.object({ evidenceId: z.uuid() });
type FileRow = { sha256: string; object_key: string; view_state: string };

const made = async (original: Buffer): Promise<ViewCopy | null> => {
  try {
    return await viewCopyOf(original);
  } catch (fault) {
    log.warn({ event: "pictureUnreadable", fault: String(fault) });
    return null;
  }
};

/** Makes the copy of a photo that people look at. A file that is no picture stays as evidence and is said to be unreadable. */
export const viewCopy: Task = async (payload, { query }) => {
  const { evidenceId } = payloadShape.parse(payload);
  const { rows } = await query<FileRow>(
    "select sha256, object_key, view_state from evidence_files where id = $1",
    [evidenceId],
  );
  const [file] = rows;
  if (!file || file.view_state !== "waiting") return;
  const copy = await made(await readAll(file.object_key, LIMITS.photoBytes));
  if (!copy) {
    await query("update evidence_files set view_state = 'unreadable' where id = $1", [evidenceId]);
    return;
  }
  const key = viewKey(file.sha256);
  const sha256Base64 = createHash("sha256").update(copy.jpeg).digest("base64");
  await putOnce(key, copy.jpeg, { sha256Base64, contentType: "image/jpeg" });
  await query(
    "update evidence_files set view_state = 'ready', view_key = $2, width_px = $3, height_px = $4 where id = $1",
    [evidenceId, key, copy.widthPx, copy.heightPx],
  );
};
