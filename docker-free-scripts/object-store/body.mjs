import { chunkSignature } from "./signature.mjs";
import { Checksums, isChecksumHeader, isKnownChecksum } from "./checksum.mjs";

/** A refusal of the store: an S3 error code and its HTTP status. */
export class StoreError extends Error {
  constructor(code, status, detail = "") {
    super(detail || code);
    this.code = code;
    this.status = status;
  }
}

const MOST_HEADER_BYTES = 16_384;
const MOST_CHUNK_BYTES = 16 * 1024 * 1024;

/** Reads a stream piece by piece: a line, or exactly so many bytes. */
class Reader {
  rest = Buffer.alloc(0);
  constructor(source) {
    this.parts = source[Symbol.asyncIterator]();
  }
  async more() {
    const { value, done } = await this.parts.next();
    if (done) return false;
    this.rest = this.rest.length === 0 ? value : Buffer.concat([this.rest, value]);
    return true;
  }
  async line() {
    for (;;) {
      const end = this.rest.indexOf("\r\n");
      if (end >= 0) {
        const text = this.rest.subarray(0, end).toString("latin1");
        this.rest = this.rest.subarray(end + 2);
        return text;
      }
      if (this.rest.length > MOST_HEADER_BYTES || !(await this.more()))
        throw new StoreError("IncompleteBody", 400);
    }
  }
  async bytes(count) {
    while (this.rest.length < count) if (!(await this.more())) throw new StoreError("IncompleteBody", 400);
    const taken = this.rest.subarray(0, count);
    this.rest = this.rest.subarray(count);
    return taken;
  }
}

/** The content of an aws-chunked body, its chunk signatures verified where it is signed, its trailers collected. */
async function* decoded(source, signed, trailers) {
  const reader = new Reader(source);
  let previous = signed?.signature;
  for (;;) {
    const [size, ...extensions] = (await reader.line()).split(";");
    const length = Number.parseInt(size, 16);
    if (!Number.isInteger(length) || length < 0 || length > MOST_CHUNK_BYTES)
      throw new StoreError("InvalidRequest", 400);
    const data = await reader.bytes(length);
    if (signed) {
      const given = extensions
        .find((one) => one.startsWith("chunk-signature="))
        ?.slice("chunk-signature=".length);
      const expected = chunkSignature(signed, previous, data);
      if (given !== expected) throw new StoreError("SignatureDoesNotMatch", 403);
      previous = expected;
    }
    if (length === 0) break;
    yield data;
    await reader.bytes(2);
  }
  for (;;) {
    const line = await reader.line().catch(() => "");
    if (line === "") return;
    const at = line.indexOf(":");
    trailers.set(line.slice(0, at).trim().toLowerCase(), line.slice(at + 1).trim());
  }
}

const STREAMING = /^STREAMING-(UNSIGNED-PAYLOAD-TRAILER|AWS4-HMAC-SHA256-PAYLOAD(-TRAILER)?)$/;

/**
 * Receives a body into a sink and verifies everything that was said about it: payload hash, checksums in headers and
 * trailers, length. Throws StoreError; returns size, entity tag and checksums.
 */
export async function receive(request, headers, signature, sink) {
  const payload = headers["x-amz-content-sha256"] ?? "UNSIGNED-PAYLOAD";
  const streaming = STREAMING.exec(payload);
  const announced = (headers["x-amz-trailer"] ?? "")
    .split(",")
    .map((name) => name.trim().toLowerCase())
    .filter(Boolean);
  const names = [...Object.keys(headers).filter(isChecksumHeader), ...announced.filter(isChecksumHeader)];
  for (const name of names)
    if (!isKnownChecksum(name)) throw new StoreError("NotImplemented", 501, `checksum ${name}`);
  const trailers = new Map();
  const signed = streaming && payload.includes("AWS4-HMAC") ? signature : null;
  const source = streaming ? decoded(request, signed, trailers) : request;
  const sums = new Checksums([...new Set(names)]);
  let size = 0;
  for await (const data of source) {
    size += data.length;
    sums.update(data);
    await sink.write(data);
  }
  const digest = sums.digest();
  const expectedLength = headers[streaming ? "x-amz-decoded-content-length" : "content-length"];
  if (expectedLength !== undefined && Number(expectedLength) !== size)
    throw new StoreError("IncompleteBody", 400);
  if (!streaming && payload !== "UNSIGNED-PAYLOAD" && payload !== digest.sha256)
    throw new StoreError("XAmzContentSHA256Mismatch", 400);
  for (const [name, value] of digest.named) {
    const given = headers[name] ?? trailers.get(name);
    if (given !== value) throw new StoreError("BadDigest", 400, `${name} does not match`);
  }
  return {
    size,
    etag: digest.md5,
    sha256: digest.sha256,
    checksums: Object.fromEntries([...digest.named].filter(([name]) => name !== "content-md5")),
  };
}
