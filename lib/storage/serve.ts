import "server-only";
import { Readable } from "node:stream";
import { open } from "./objects";

/** `attachment; filename=…` as RFC 6266 and RFC 8187 write it: a plain name for old clients, the real one beside it. */
const disposition = (kind: "attachment" | "inline", name: string): string => {
  const plain = name.replace(/[^\x20-\x7e]|["\\%]/gu, "_");
  const encoded = encodeURIComponent(name).replace(
    /['()*]/gu,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `${kind}; filename="${plain}"; filename*=UTF-8''${encoded}`;
};

type Served = {
  key: string;
  contentType: string;
  name: string;
  kind: "attachment" | "inline";
  range: string | null;
};

/**
 * Streams an object. Whatever the bytes are, a browser runs none of them: fixed type, no sniffing, an empty sandbox, and
 * no other site may embed it.
 */
export async function serve({ key, contentType, name, kind, range }: Served): Promise<Response> {
  const opened = await open(key, range && /^bytes=\d*-\d*$/u.test(range) ? range : undefined);
  const bytes: unknown = Readable.toWeb(opened.body);
  if (!(bytes instanceof ReadableStream)) throw new Error(`no stream for the answer of ${key}`);
  return new Response(bytes, {
    status: opened.range ? 206 : 200,
    headers: {
      "content-type": contentType,
      "content-length": String(opened.sizeBytes),
      "content-disposition": disposition(kind, name),
      "accept-ranges": "bytes",
      ...(opened.range ? { "content-range": opened.range } : {}),
      "content-security-policy": "sandbox; default-src 'none'",
      "x-content-type-options": "nosniff",
      "cross-origin-resource-policy": "same-origin",
      "cache-control": "private, no-store",
    },
  });
}
