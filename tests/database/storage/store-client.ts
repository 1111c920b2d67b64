import { createHash, randomUUID } from "node:crypto";
import { PutObjectCommand, S3Client, S3ServiceException, type S3ClientConfig } from "@aws-sdk/client-s3";
import { bucket } from "@/lib/storage/client";

const sha256 = (bytes: Uint8Array) => createHash("sha256").update(bytes);
export const hex = (bytes: Uint8Array): string => sha256(bytes).digest("hex");
export const base64 = (bytes: Uint8Array): string => sha256(bytes).digest("base64");

/** The same client as the product's, changed in one thing. */
export const clientWith = (over: S3ClientConfig): S3Client =>
  new S3Client({
    endpoint: process.env["STORE_ENDPOINT"] ?? "",
    region: process.env["STORE_REGION"] ?? "",
    forcePathStyle: true,
    maxAttempts: 1,
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
    credentials: {
      accessKeyId: process.env["STORE_ACCESS_KEY_ID"] ?? "",
      secretAccessKey: process.env["STORE_SECRET_ACCESS_KEY"] ?? "",
    },
    ...over,
  });

/** What the store answered: "done", or status and code of its refusal. */
export async function answerOf(sent: Promise<unknown>): Promise<string> {
  try {
    await sent;
    return "done";
  } catch (fault) {
    if (fault instanceof S3ServiceException) return `${fault.$metadata.httpStatusCode} ${fault.name}`;
    throw fault;
  }
}

export const put = (client: S3Client, over: Record<string, unknown> = {}): Promise<string> =>
  answerOf(
    client.send(
      new PutObjectCommand({
        Bucket: bucket(),
        Key: `k/${randomUUID()}`,
        Body: Buffer.from("bytes"),
        ...over,
      }),
    ),
  );
