import { PutObjectCommand, S3Client } from "@aws-sdk/client-s3";
import { z } from "zod";
import { originalKey, viewKey } from "@/lib/storage/keys";
import type { MadeFile } from "../evidence/made";

const settingsShape = z.object({
  STORE_ENDPOINT: z.url(),
  STORE_REGION: z.string().min(1),
  STORE_BUCKET: z.string().min(3),
  STORE_ACCESS_KEY_ID: z.string().min(1),
  STORE_SECRET_ACCESS_KEY: z.string().min(1),
});

type Settings = Readonly<Record<string, string | undefined>>;

const AT_ONCE = 6;

/** Puts every file and its view copy into the object store. Without a store in the settings nothing is put: returns how many were. */
export async function putFiles(files: readonly MadeFile[], settings: Settings): Promise<number> {
  if (!settings["STORE_ENDPOINT"]) return 0;
  const store = settingsShape.parse(settings);
  const client = new S3Client({
    endpoint: store.STORE_ENDPOINT,
    region: store.STORE_REGION,
    forcePathStyle: true,
    credentials: { accessKeyId: store.STORE_ACCESS_KEY_ID, secretAccessKey: store.STORE_SECRET_ACCESS_KEY },
  });
  const objects = files.flatMap(({ sha256, bytes, view, mediaType }) => [
    { Key: originalKey(sha256), Body: bytes, ContentType: mediaType },
    ...(view ? [{ Key: viewKey(sha256), Body: view, ContentType: "image/jpeg" }] : []),
  ]);
  try {
    for (let at = 0; at < objects.length; at += AT_ONCE) {
      const some = objects.slice(at, at + AT_ONCE);
      await Promise.all(
        some.map((object) => client.send(new PutObjectCommand({ Bucket: store.STORE_BUCKET, ...object }))),
      );
    }
  } finally {
    client.destroy();
  }
  return objects.length;
}
