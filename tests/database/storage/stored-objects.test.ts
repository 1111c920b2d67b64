import { createHash, randomBytes, randomUUID } from "node:crypto";
import { Readable } from "node:stream";
import {
  CopyObjectCommand,
  CreateMultipartUploadCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { beforeAll, describe, expect, it } from "vitest";
import { bucket, store } from "@/lib/storage/client";
import { originalKey } from "@/lib/storage/keys";
import { copyOnce, putOnce, readAll, remove } from "@/lib/storage/objects";
import { PartUpload } from "@/lib/storage/part-upload";
import { keysIn, openUploads, useOwnBucket } from "./own-bucket";
import { answerOf, base64, clientWith, hex, put } from "./store-client";

beforeAll(useOwnBucket);

describe("an object that is there", () => {
  it("is not replaced by one that must be new", async () => {
    const key = `k/${randomUUID()}`;
    const [first, second] = [Buffer.from("first"), Buffer.from("second")];
    const text = { contentType: "text/plain" };
    expect(await putOnce(key, first, { sha256Base64: base64(first), ...text })).toBe(true);
    expect(await putOnce(key, second, { sha256Base64: base64(second), ...text })).toBe(false);
    expect(await put(store(), { Key: key, Body: second, IfNoneMatch: "*" })).toBe("412 PreconditionFailed");
    expect(String(await readAll(key, 100))).toBe("first");
  });

  it("was made by exactly one of thirty who tried at once", async () => {
    const key = `k/${randomUUID()}`;
    const tries = Array.from({ length: 30 }, (_one, at) => {
      const body = Buffer.from(`try ${at}`);
      return putOnce(key, body, { sha256Base64: base64(body), contentType: "text/plain" });
    });
    const made = await Promise.all(tries);
    expect(made.filter(Boolean)).toHaveLength(1);
    expect(String(await readAll(key, 100))).toBe(`try ${made.indexOf(true)}`);
  });

  it("is kept until its day where it has one", async () => {
    const key = `k/${randomUUID()}`;
    const until = { ObjectLockMode: "COMPLIANCE", ObjectLockRetainUntilDate: new Date(Date.now() + 60_000) };
    expect(
      await put(store(), {
        Key: key,
        ContentMD5: createHash("md5").update("bytes").digest("base64"),
        ...until,
      }),
    ).toBe("done");
    expect(await put(store(), { Key: key, Body: Buffer.from("other") })).toBe("403 AccessDenied");
    const gone = store().send(new DeleteObjectCommand({ Bucket: bucket(), Key: key }));
    expect(await answerOf(gone)).toBe("403 AccessDenied");
    expect(String(await readAll(key, 100))).toBe("bytes");
  });

  it("is never read beyond the limit its reader names", async () => {
    const key = `k/${randomUUID()}`;
    await put(store(), { Key: key, Body: Buffer.alloc(1000) });
    await expect(readAll(key, 999)).rejects.toThrow(RangeError);
    expect(await readAll(key, 1000)).toHaveLength(1000);
  });
});

describe("an object that is not there", () => {
  it("is said to be missing, and removing it is no fault", async () => {
    const Key = `k/${randomUUID()}`;
    expect(await answerOf(store().send(new GetObjectCommand({ Bucket: bucket(), Key })))).toBe(
      "404 NoSuchKey",
    );
    expect(await answerOf(store().send(new HeadObjectCommand({ Bucket: bucket(), Key })))).toMatch(/^404 /u);
    await expect(remove(Key)).resolves.toBeDefined();
  });

  it("cannot be reached by a key that climbs out of its bucket", async () => {
    const Key = "../../../../etc/passwd";
    const climbing = new CopyObjectCommand({
      Bucket: bucket(),
      Key: `k/${randomUUID()}`,
      CopySource: `${bucket()}/${encodeURIComponent(Key)}`,
    });
    expect(await answerOf(store().send(climbing))).toMatch(/^404 /u);
    expect(await answerOf(store().send(new GetObjectCommand({ Bucket: "..", Key: "passwd" })))).toMatch(
      /^4\d\d /u,
    );
  });
});

/** Sends bytes in pieces of an odd size, as they come from a network. */
async function sendInPieces(upload: PartUpload, bytes: Buffer) {
  for (let at = 0; at < bytes.length; at += 65_521) await upload.write(bytes.subarray(at, at + 65_521));
}

const PART = 5 * 1024 * 1024;

describe("bytes sent in parts", () => {
  it.each([1, PART - 1, PART, PART + 1, 2 * PART, 12_345_678])(
    "are one object under the hash of what is read back, %i bytes long",
    async (size) => {
      const bytes = randomBytes(size);
      const from = `quarantine/${randomUUID()}`;
      const upload = new PartUpload(from);
      await sendInPieces(upload, bytes);
      await upload.end();
      const to = originalKey(hex(bytes));
      expect(await copyOnce(from, to)).toBe(true);
      expect(await copyOnce(from, to)).toBe(false);
      await remove(from);
      const kept = await readAll(to, size);
      expect(to).toBe(`evidence/${hex(kept).slice(0, 2)}/${hex(kept)}`);
      expect(await openUploads()).toBe(0);
      expect(await keysIn(from)).toEqual([]);
    },
  );

  it.each([0, 1000, PART + 1, 12_000_000])("given up after %i bytes leave nothing", async (size) => {
    const key = `quarantine/${randomUUID()}`;
    const upload = new PartUpload(key);
    await sendInPieces(upload, randomBytes(size));
    await upload.abort();
    await expect(upload.end()).rejects.toThrow("given up");
    expect(await openUploads()).toBe(0);
    expect(await keysIn(key)).toEqual([]);
  });

  it("given up while a part is on its way leave nothing", async () => {
    for (let round = 0; round < 10; round += 1) {
      const upload = new PartUpload(`quarantine/${randomUUID()}`);
      const sending = sendInPieces(upload, randomBytes(11_000_000)).catch(() => undefined);
      await new Promise((resolve) => setTimeout(resolve, round * 4));
      await upload.abort();
      await sending;
    }
    expect(await openUploads()).toBe(0);
    expect(await keysIn("quarantine/")).toEqual([]);
  });

  it("cannot be added to an upload that nobody began, nor to one of another key", async () => {
    const part = { Bucket: bucket(), PartNumber: 1, Body: Buffer.from("x") };
    const unknown = store().send(new UploadPartCommand({ ...part, Key: "k/a", UploadId: randomUUID() }));
    expect(await answerOf(unknown)).toBe("404 NoSuchUpload");
    const { UploadId } = await store().send(
      new CreateMultipartUploadCommand({ Bucket: bucket(), Key: "k/a" }),
    );
    const other = store().send(new UploadPartCommand({ ...part, Key: "k/b", UploadId }));
    expect(await answerOf(other)).toBe("404 NoSuchUpload");
  });
});

describe("a body that breaks off", () => {
  it("is no object", async () => {
    const key = `k/${randomUUID()}`;
    const stalling = new Readable({ read: () => undefined });
    stalling.push(Buffer.alloc(100_000));
    const line = new AbortController();
    // The client says aloud that it cannot send such a body again; that is what happens here.
    const logger = { debug() {}, info() {}, warn() {}, error() {} };
    const sent = clientWith({ logger }).send(
      new PutObjectCommand({ Bucket: bucket(), Key: key, Body: stalling, ContentLength: 200_000 }),
      { abortSignal: line.signal },
    );
    setTimeout(() => line.abort(), 200);
    await expect(sent).rejects.toThrow(/abort/iu);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(await keysIn(key)).toEqual([]);
  });
});
