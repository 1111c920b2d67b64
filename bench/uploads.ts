import { randomUUID } from "node:crypto";
import { PutObjectCommand } from "@aws-sdk/client-s3";
import { ok } from "@/lib/kernel/outcome";
import { bucket, store } from "@/lib/storage/client";
import { remove } from "@/lib/storage/objects";
import { receiveFile } from "@/lib/storage/receive";
import { against } from "./measure";
import { madeLog } from "./run-logs";
import type { Line } from "./table";

const formWith = (bytes: Uint8Array<ArrayBuffer>): Request => {
  const form = new FormData();
  form.set("rowId", "runLog");
  form.set("file", new File([bytes], "run.csv", { type: "text/csv" }));
  return new Request("http://bench.test/upload", { method: "POST", body: form });
};

async function receive(bytes: Uint8Array<ArrayBuffer>, keys: string[]): Promise<void> {
  const received = await receiveFile(formWith(bytes), () => Promise.resolve(ok("runLog")));
  if (!received.ok) throw new Error(`the upload was refused: ${received.code}`);
  keys.push(received.value.quarantine);
}

async function copy(bytes: Uint8Array<ArrayBuffer>, keys: string[]): Promise<void> {
  const key = `quarantine/${randomUUID()}`;
  await store().send(new PutObjectCommand({ Bucket: bucket(), Key: key, Body: bytes }));
  keys.push(key);
}

/** A file taken in as a form that streams, against the same bytes put into the store in one piece. */
export async function uploadLines(): Promise<Line[]> {
  const bytes = Uint8Array.from(madeLog(1600));
  const keys: string[] = [];
  const measured = await against(
    () => copy(bytes, keys),
    () => receive(bytes, keys),
    { rounds: 11, warmUp: 2 },
  );
  for (const key of keys) await remove(key);
  store().destroy();
  const perSecond = (ms: number) => (bytes.length / 1e3 / ms).toFixed(1);
  const note = `${perSecond(measured.medianMs)} MB/s against ${perSecond(measured.yardstickMs)} MB/s`;
  return [{ name: "upload received", measured, yardstick: "PutObject", note }];
}
