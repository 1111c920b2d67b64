import { createHash } from "node:crypto";
import { createServer } from "node:http";
import { pipeline } from "node:stream/promises";
import { receive, StoreError } from "./body.mjs";
import { Disk } from "./disk.mjs";
import { verify } from "./signature.mjs";

const escape = (text) => String(text).replace(/[<>&'"]/g, (sign) => `&#${sign.charCodeAt(0)};`);
const xml = (body) => `<?xml version="1.0" encoding="UTF-8"?>\n${body}`;
const textOf = async (request) => {
  const chunks = [];
  let size = 0;
  for await (const chunk of request) {
    size += chunk.length;
    if (size > 1_048_576) throw new StoreError("EntityTooLarge", 413);
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString("utf8");
};

const send = (response, status, body = "", headers = {}) => {
  response.writeHead(status, {
    "content-type": "application/xml",
    "content-length": Buffer.byteLength(body),
    ...headers,
  });
  response.end(body);
};

const metaOf = (headers) => ({
  contentType: headers["content-type"] ?? "application/octet-stream",
  retainUntil: headers["x-amz-object-lock-retain-until-date"] ?? null,
  user: Object.fromEntries(Object.entries(headers).filter(([name]) => name.startsWith("x-amz-meta-"))),
});

async function store(disk, { request, headers, signature, bucket }, finish) {
  const sink = await disk.sink(bucket);
  try {
    const received = await receive(request, headers, signature, sink);
    await sink.flush();
    return await finish(sink.path, received);
  } catch (fault) {
    await sink.drop();
    throw fault;
  }
}

const putObject = (disk, asked, response) =>
  store(disk, asked, async (path, received) => {
    const meta = { ...metaOf(asked.headers), ...received, modifiedAt: new Date().toISOString() };
    await disk.keep(asked.bucket, asked.key, path, meta, asked.headers["if-none-match"] === "*");
    send(response, 200, "", { etag: `"${received.etag}"`, ...received.checksums });
  });

async function copyObject(disk, { headers, bucket, key }, response) {
  const source = decodeURIComponent(headers["x-amz-copy-source"]).replace(/^\//, "");
  const at = source.indexOf("/");
  const [fromBucket, fromKey] = [source.slice(0, at), source.slice(at + 1)];
  const meta = await disk.head(fromBucket, fromKey);
  const sink = await disk.sink(bucket);
  for await (const data of disk.read(fromBucket, fromKey)) await sink.write(data);
  await sink.flush();
  const modifiedAt = new Date().toISOString();
  try {
    await disk.keep(bucket, key, sink.path, { ...meta, modifiedAt }, headers["if-none-match"] === "*");
  } catch (fault) {
    await sink.drop();
    throw fault;
  }
  send(
    response,
    200,
    xml(
      `<CopyObjectResult><ETag>&quot;${meta.etag}&quot;</ETag><LastModified>${modifiedAt}</LastModified></CopyObjectResult>`,
    ),
  );
}

function rangeOf(header, size) {
  const parts = /^bytes=(\d*)-(\d*)$/.exec(header ?? "");
  if (!parts || (parts[1] === "" && parts[2] === "")) return null;
  const start = parts[1] === "" ? Math.max(0, size - Number(parts[2])) : Number(parts[1]);
  const end = parts[1] === "" || parts[2] === "" ? size - 1 : Math.min(Number(parts[2]), size - 1);
  if (start > end) throw new StoreError("InvalidRange", 416);
  return { start, end };
}

async function getObject(disk, { headers, params, bucket, key, method }, response) {
  const meta = await disk.head(bucket, key);
  const range = rangeOf(headers.range, meta.size);
  const answer = {
    etag: `"${meta.etag}"`,
    "last-modified": new Date(meta.modifiedAt).toUTCString(),
    "accept-ranges": "bytes",
    "content-type": params.get("response-content-type") ?? meta.contentType,
    "content-length": range ? range.end - range.start + 1 : meta.size,
    ...meta.user,
    ...(headers["x-amz-checksum-mode"] === "ENABLED" && !range ? meta.checksums : {}),
    ...(range ? { "content-range": `bytes ${range.start}-${range.end}/${meta.size}` } : {}),
    ...(params.get("response-content-disposition")
      ? { "content-disposition": params.get("response-content-disposition") }
      : {}),
  };
  response.writeHead(range ? 206 : 200, answer);
  if (method === "HEAD" || meta.size === 0) return response.end();
  return pipeline(disk.read(bucket, key, range), response);
}

async function listObjects(disk, { params, bucket }, response) {
  const prefix = params.get("prefix") ?? "";
  const most = Math.min(Number(params.get("max-keys") ?? 1000), 1000);
  const after = params.get("continuation-token") ?? params.get("start-after") ?? "";
  const keys = (await disk.list(bucket, prefix)).filter((key) => key > after);
  const page = keys.slice(0, most);
  const rows = await Promise.all(
    page.map(async (key) => {
      const meta = await disk.head(bucket, key);
      return `<Contents><Key>${escape(key)}</Key><Size>${meta.size}</Size><ETag>&quot;${meta.etag}&quot;</ETag><LastModified>${meta.modifiedAt}</LastModified></Contents>`;
    }),
  );
  const more = keys.length > page.length;
  send(
    response,
    200,
    xml(
      `<ListBucketResult><Name>${escape(bucket)}</Name><Prefix>${escape(prefix)}</Prefix><KeyCount>${page.length}</KeyCount><MaxKeys>${most}</MaxKeys><IsTruncated>${more}</IsTruncated>${more ? `<NextContinuationToken>${escape(page.at(-1))}</NextContinuationToken>` : ""}${rows.join("")}</ListBucketResult>`,
    ),
  );
}

async function deleteObjects(disk, { request, bucket }, response) {
  const keys = [...(await textOf(request)).matchAll(/<Key>([^<]*)<\/Key>/g)].map((found) =>
    found[1].replace(/&amp;/g, "&"),
  );
  for (const key of keys) await disk.remove(bucket, key);
  send(
    response,
    200,
    xml(
      `<DeleteResult>${keys.map((key) => `<Deleted><Key>${escape(key)}</Key></Deleted>`).join("")}</DeleteResult>`,
    ),
  );
}

async function completeUpload(disk, { request, params, headers, bucket, key }, response) {
  const upload = params.get("uploadId");
  const { meta } = await disk.upload(bucket, upload, key);
  const numbers = [...(await textOf(request)).matchAll(/<PartNumber>(\d+)<\/PartNumber>/g)].map((found) =>
    Number(found[1]),
  );
  if (numbers.length === 0 || numbers.some((number, place) => place > 0 && number <= numbers[place - 1]))
    throw new StoreError("InvalidPartOrder", 400);
  const sink = await disk.sink(bucket);
  const tags = createHash("md5");
  let size = 0;
  for (const number of numbers) {
    const part = await disk.partMeta(bucket, upload, number);
    tags.update(Buffer.from(part.etag, "hex"));
    size += part.size;
    for await (const data of disk.readPart(bucket, upload, number)) await sink.write(data);
  }
  await sink.flush();
  const etag = `${tags.digest("hex")}-${numbers.length}`;
  await disk.keep(
    bucket,
    key,
    sink.path,
    { ...meta, size, etag, checksums: {}, modifiedAt: new Date().toISOString() },
    headers["if-none-match"] === "*",
  );
  await disk.dropUpload(bucket, upload);
  send(
    response,
    200,
    xml(
      `<CompleteMultipartUploadResult><Bucket>${escape(bucket)}</Bucket><Key>${escape(key)}</Key><ETag>&quot;${etag}&quot;</ETag></CompleteMultipartUploadResult>`,
    ),
  );
}

async function startUpload(disk, { headers, bucket, key }, response) {
  const upload = await disk.startUpload(bucket, key, metaOf(headers));
  send(
    response,
    200,
    xml(
      `<InitiateMultipartUploadResult><Bucket>${escape(bucket)}</Bucket><Key>${escape(key)}</Key><UploadId>${upload}</UploadId></InitiateMultipartUploadResult>`,
    ),
  );
}

async function uploadPart(disk, asked, response) {
  const { params, bucket, key } = asked;
  const number = Number(params.get("partNumber"));
  if (!(number >= 1 && number <= 10_000)) throw new StoreError("InvalidArgument", 400);
  await disk.upload(bucket, params.get("uploadId"), key);
  await store(disk, asked, async (path, received) => {
    await disk.keepPart(bucket, params.get("uploadId"), number, path, received);
    send(response, 200, "", { etag: `"${received.etag}"`, ...received.checksums });
  });
}

async function bucketRequest(disk, asked, response) {
  const { method, params, bucket } = asked;
  if (method === "PUT") {
    await disk.makeBucket(bucket);
    return send(response, 200);
  }
  if (!(await disk.hasBucket(bucket))) throw new StoreError("NoSuchBucket", 404);
  if (method === "HEAD") return send(response, 200);
  if (method === "GET" && params.has("uploads")) {
    const uploads = await disk.listUploads(bucket);
    return send(
      response,
      200,
      xml(
        `<ListMultipartUploadsResult>${uploads.map((id) => `<Upload><UploadId>${id}</UploadId></Upload>`).join("")}</ListMultipartUploadsResult>`,
      ),
    );
  }
  if (method === "GET") return listObjects(disk, asked, response);
  if (method === "POST" && params.has("delete")) return deleteObjects(disk, asked, response);
  throw new StoreError("MethodNotAllowed", 405);
}

async function objectRequest(disk, asked, response) {
  const { method, params, headers, bucket, key } = asked;
  if (!(await disk.hasBucket(bucket))) throw new StoreError("NoSuchBucket", 404);
  if (method === "GET" || method === "HEAD") return getObject(disk, asked, response);
  if (method === "POST" && params.has("uploads")) return startUpload(disk, asked, response);
  if (method === "POST" && params.has("uploadId")) return completeUpload(disk, asked, response);
  if (method === "PUT" && params.has("partNumber")) return uploadPart(disk, asked, response);
  if (method === "PUT" && headers["x-amz-copy-source"]) return copyObject(disk, asked, response);
  if (method === "PUT") return putObject(disk, asked, response);
  if (method === "DELETE" && params.has("uploadId")) {
    await disk.upload(bucket, params.get("uploadId"), key);
    await disk.dropUpload(bucket, params.get("uploadId"));
    return send(response, 204);
  }
  if (method === "DELETE") {
    await disk.remove(bucket, key);
    return send(response, 204);
  }
  throw new StoreError("MethodNotAllowed", 405);
}

async function handle(disk, credentials, request, response) {
  const [rawPath, rawQuery = ""] = request.url.split("?");
  const params = new URLSearchParams(rawQuery);
  const { method, headers } = request;
  const signature = verify({ method, rawPath, params, headers }, credentials);
  if (typeof signature === "string") throw new StoreError(signature, 403);
  const [, bucket = "", ...rest] = rawPath.split("/");
  const key = rest.map(decodeURIComponent).join("/");
  const asked = { request, method, headers, params, bucket: decodeURIComponent(bucket), key, signature };
  return key === "" ? bucketRequest(disk, asked, response) : objectRequest(disk, asked, response);
}

/**
 * An S3-compatible store for this machine alone: path style, strict where a lenient one would hide a mistake. It verifies
 * every signature, payload hash and checksum, honours `If-None-Match: *` and retention days, and flushes before it answers.
 */
export function makeStore({ root, credentials }) {
  const disk = new Disk(root);
  return createServer({ requestTimeout: 0 }, (request, response) => {
    handle(disk, credentials, request, response).catch((fault) => {
      const { code, status } = fault instanceof StoreError ? fault : { code: "InternalError", status: 500 };
      if (
        !(fault instanceof StoreError) &&
        fault.code !== "ERR_STREAM_PREMATURE_CLOSE" &&
        fault.code !== "ECONNRESET"
      )
        process.stderr.write(`object store: ${fault.stack}\n`);
      if (response.headersSent) return response.destroy();
      // What is left of a refused body is not read: the connection ends instead.
      const body =
        request.method === "HEAD"
          ? ""
          : xml(`<Error><Code>${code}</Code><Message>${escape(fault.message)}</Message></Error>`);
      return send(response, status, body, request.complete ? {} : { connection: "close" });
    });
  });
}
