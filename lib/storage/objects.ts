import "server-only";
import { Readable } from "node:stream";
import {
  CopyObjectCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3ServiceException,
} from "@aws-sdk/client-s3";
import { bucket, store } from "./client";

const isStatus = (fault: unknown, status: number): boolean =>
  fault instanceof S3ServiceException && fault.$metadata.httpStatusCode === status;

/** Copies an object to a key where nothing stands yet. False where it was there already: an original is never replaced. */
export async function copyOnce(from: string, to: string): Promise<boolean> {
  if (await exists(to)) return false;
  await store().send(new CopyObjectCommand({ Bucket: bucket(), Key: to, CopySource: `${bucket()}/${from}` }));
  return true;
}

async function exists(key: string): Promise<boolean> {
  try {
    await store().send(new HeadObjectCommand({ Bucket: bucket(), Key: key }));
    return true;
  } catch (fault) {
    if (isStatus(fault, 404)) return false;
    throw fault;
  }
}

/** Stores a whole small object, verified by its SHA-256 on arrival; false where the key is taken. */
export async function putOnce(
  key: string,
  body: Buffer,
  { sha256Base64, contentType }: { sha256Base64: string; contentType: string },
): Promise<boolean> {
  try {
    await store().send(
      new PutObjectCommand({
        Bucket: bucket(),
        Key: key,
        Body: body,
        ChecksumSHA256: sha256Base64,
        ContentType: contentType,
        IfNoneMatch: "*",
      }),
    );
    return true;
  } catch (fault) {
    if (isStatus(fault, 412)) return false;
    throw fault;
  }
}

export const remove = (key: string): Promise<unknown> =>
  store().send(new DeleteObjectCommand({ Bucket: bucket(), Key: key }));

export type Opened = {
  readonly body: Readable;
  readonly sizeBytes: number;
  readonly range: string | undefined;
};

/** Opens an object for reading, whole or the part a `Range` header names. */
export async function open(key: string, range?: string): Promise<Opened> {
  const answer = await store().send(new GetObjectCommand({ Bucket: bucket(), Key: key, Range: range }));
  if (!(answer.Body instanceof Readable)) throw new Error(`the store gave no stream for ${key}`);
  return { body: answer.Body, sizeBytes: answer.ContentLength ?? 0, range: answer.ContentRange };
}

/** The whole of an object of at most so many bytes. Throws where it is larger. */
export async function readAll(key: string, mostBytes: number): Promise<Buffer> {
  const { body } = await open(key);
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of body) {
    const data = Buffer.from(chunk);
    size += data.length;
    if (size > mostBytes) throw new RangeError(`${key} is larger than ${mostBytes} bytes`);
    chunks.push(data);
  }
  return Buffer.concat(chunks);
}
