import { CreateBucketCommand, ListMultipartUploadsCommand, ListObjectsV2Command } from "@aws-sdk/client-s3";
import { randomUUID } from "node:crypto";
import { bucket, store } from "@/lib/storage/client";

/** A bucket for one test file alone, so that what lies in it was put there by this file. */
export async function useOwnBucket(): Promise<void> {
  process.env["STORE_BUCKET"] = `test-${randomUUID()}`;
  await store().send(new CreateBucketCommand({ Bucket: bucket() }));
}

/** The keys that begin so, in order. */
export async function keysIn(prefix = ""): Promise<string[]> {
  const { Contents } = await store().send(new ListObjectsV2Command({ Bucket: bucket(), Prefix: prefix }));
  return (Contents ?? []).flatMap(({ Key }) => (Key === undefined ? [] : [Key]));
}

/** Uploads in parts that nobody has ended. */
export async function openUploads(): Promise<number> {
  const { Uploads } = await store().send(new ListMultipartUploadsCommand({ Bucket: bucket() }));
  return (Uploads ?? []).length;
}
