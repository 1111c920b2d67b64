import "server-only";
import { S3Client } from "@aws-sdk/client-s3";
import { setting } from "@/lib/web/settings";

let client: S3Client | undefined;

/** The object store of this installation. Checksums are ours (SHA-256), so the client adds none of its own. */
export const store = (): S3Client =>
  (client ??= new S3Client({
    endpoint: setting("STORE_ENDPOINT"),
    region: setting("STORE_REGION"),
    forcePathStyle: true,
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
    credentials: {
      accessKeyId: setting("STORE_ACCESS_KEY_ID"),
      secretAccessKey: setting("STORE_SECRET_ACCESS_KEY"),
    },
  }));

export const bucket = (): string => setting("STORE_BUCKET");
