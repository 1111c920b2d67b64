import { ListObjectsV2Command } from "@aws-sdk/client-s3";
import type { Task } from "graphile-worker";
import { bucket, store } from "@/lib/storage/client";
import { remove } from "@/lib/storage/objects";
import { log } from "@/lib/web/log";

const HOUR_MS = 3_600_000;

/** Clears what an upload that broke off has left in quarantine. An upload takes minutes; an hour is long enough. */
export const sweepUploads: Task = async () => {
  const listed = await store().send(new ListObjectsV2Command({ Bucket: bucket(), Prefix: "quarantine/" }));
  const old = (listed.Contents ?? []).filter(
    ({ LastModified }) => LastModified && Date.now() - LastModified.getTime() > HOUR_MS,
  );
  for (const { Key } of old) if (Key) await remove(Key);
  if (old.length > 0) log.info({ event: "quarantineSwept", count: old.length });
};
