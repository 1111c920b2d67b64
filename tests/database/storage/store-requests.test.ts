import { createHash, randomUUID } from "node:crypto";
import { Readable } from "node:stream";
import type { S3Client } from "@aws-sdk/client-s3";
import { beforeAll, describe, expect, it } from "vitest";
import { bucket, store } from "@/lib/storage/client";
import { putOnce, readAll } from "@/lib/storage/objects";
import { keysIn, useOwnBucket } from "./own-bucket";
import { base64, clientWith, hex, put } from "./store-client";

beforeAll(useOwnBucket);

type Signed = { headers: Record<string, string>; path: string; method: string; body?: unknown };
const isSigned = (request: unknown): request is Signed =>
  typeof request === "object" && request !== null && "headers" in request && "path" in request;

/** A client whose requests are changed on their way, after they were signed. */
function tampering(change: (request: Signed) => void): S3Client {
  const client = clientWith({});
  client.middlewareStack.add(
    (next) => (args) => {
      if (isSigned(args.request)) change(args.request);
      return next(args);
    },
    { step: "finalizeRequest", priority: "low", name: "tampering" },
  );
  return client;
}

describe("a request to the store", () => {
  it("signed with the right key is taken", async () => {
    expect(await put(clientWith({}))).toBe("done");
    expect(await put(tampering(() => undefined))).toBe("done");
  });

  it("signed with another secret, or for a key nobody has, is refused", async () => {
    const accessKeyId = process.env["STORE_ACCESS_KEY_ID"] ?? "";
    const secretAccessKey = process.env["STORE_SECRET_ACCESS_KEY"] ?? "";
    const other = clientWith({ credentials: { accessKeyId, secretAccessKey: `${secretAccessKey}x` } });
    expect(await put(other)).toBe("403 SignatureDoesNotMatch");
    const unknown = clientWith({ credentials: { accessKeyId: "nobody", secretAccessKey } });
    expect(await put(unknown)).toBe("403 InvalidAccessKeyId");
  });

  it("unsigned is refused, whatever it asks for", async () => {
    const key = `k/${randomUUID()}`;
    await putOnce(key, Buffer.from("x"), {
      sha256Base64: base64(Buffer.from("x")),
      contentType: "text/plain",
    });
    const base = `${process.env["STORE_ENDPOINT"] ?? ""}/${bucket()}`;
    for (const [method, url] of [
      ["GET", `${base}/${key}`],
      ["HEAD", `${base}/${key}`],
      ["PUT", `${base}/${key}`],
      ["DELETE", `${base}/${key}`],
      ["GET", base],
      ["GET", `${base}/${key}?X-Amz-Signature=00&X-Amz-Expires=99999`],
    ] as const) {
      const answer = await fetch(url, { method, ...(method === "PUT" ? { body: "y" } : {}) });
      expect(answer.status, `${method} ${url}`).toBe(403);
      expect(await answer.text()).not.toContain("<Key>");
    }
    expect(String(await readAll(key, 10))).toBe("x");
  });

  it.each<[string, (request: Signed) => void]>([
    ["a signed header", ({ headers }) => (headers["content-type"] = "text/html")],
    ["its date", ({ headers }) => (headers["x-amz-date"] = "20200101T000000Z")],
    ["the hash of its body", ({ headers }) => (headers["x-amz-content-sha256"] = hex(Buffer.from("other")))],
    ["its path", (request) => (request.path = request.path.replace("/k/", "/evidence/"))],
    ["its method", (request) => (request.method = "DELETE")],
    ["its host", ({ headers }) => (headers["host"] = "elsewhere.example")],
  ])("with %s changed after it was signed is refused", async (_what, change) => {
    const before = await keysIn();
    expect(await put(tampering(change), { ContentType: "text/plain" })).toMatch(/^403 /u);
    expect(await keysIn()).toEqual(before);
  });

  it("with its body changed after it was signed is refused", async () => {
    const changed = tampering((request) => (request.body = Buffer.from("other")));
    expect(await put(changed)).toMatch(/^400 /u);
  });
});

describe("a checksum", () => {
  const bytes = Buffer.from("bytes");
  it.each([
    ["SHA-256", { ChecksumSHA256: base64(Buffer.from("other")) }],
    ["CRC-32", { ChecksumCRC32: "AAAAAA==" }],
    ["MD5", { ContentMD5: createHash("md5").update("other").digest("base64") }],
  ])("in %s that is not that of the bytes refuses them, and nothing is kept", async (_name, wrong) => {
    const key = `k/${randomUUID()}`;
    expect(await put(store(), { Key: key, Body: bytes, ...wrong })).toBe("400 BadDigest");
    expect(await keysIn(key)).toEqual([]);
  });

  it("of a kind the store does not know is refused, never taken on trust", async () => {
    expect(await put(clientWith({}), { Body: bytes, ChecksumCRC64NVME: "AAAAAAAAAAA=" })).toMatch(/^501 /u);
  });

  it("that the client adds by itself, before or behind the bytes, is verified as well", async () => {
    const eager = clientWith({ requestChecksumCalculation: "WHEN_SUPPORTED" });
    expect(await put(eager)).toBe("done");
    expect(await put(eager, { Body: Readable.from([bytes]), ContentLength: bytes.length })).toBe("done");
  });
});
