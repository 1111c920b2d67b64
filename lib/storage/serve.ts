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
  /** What was asked for of how much; none where the whole is sent whatever was asked. */
  part?: { range: string | null; ofBytes: number };
};

// Whatever the bytes are, a browser runs none of them: no sniffing, an empty sandbox, and no other site may embed them.
const SHUT = {
  "content-security-policy": "sandbox; default-src 'none'",
  "x-content-type-options": "nosniff",
  "cross-origin-resource-policy": "same-origin",
  "cache-control": "private, no-store",
} as const;

type Range = { readonly first: number; readonly last: number };

/** The one part a `Range` header names (RFC 9110, 14.1.2); "whole" where it names none that can be read, "outside" past the end. */
function rangeIn(header: string | null, ofBytes: number): Range | "whole" | "outside" {
  const [, from = "", to = ""] = /^bytes=(\d*)-(\d*)$/u.exec(header ?? "") ?? [];
  if (from === "" && to === "") return "whole";
  const first = from === "" ? Math.max(0, ofBytes - Number(to)) : Number(from);
  const last = from === "" || to === "" ? ofBytes - 1 : Number(to);
  if (from !== "" && last < first && to !== "") return "whole";
  return first >= ofBytes ? "outside" : { first, last: Math.min(last, ofBytes - 1) };
}

/** Streams an object under a fixed type, whole or the part that was asked for; 416 where it has no such part. */
export async function serve({ key, contentType, name, kind, part }: Served): Promise<Response> {
  const range = part ? rangeIn(part.range, part.ofBytes) : "whole";
  if (range === "outside")
    return new Response(null, {
      status: 416,
      headers: { ...SHUT, "content-range": `bytes */${part?.ofBytes ?? 0}` },
    });
  const opened = await open(key, range === "whole" ? undefined : `bytes=${range.first}-${range.last}`);
  const bytes: unknown = Readable.toWeb(opened.body);
  if (!(bytes instanceof ReadableStream)) throw new Error(`no stream for the answer of ${key}`);
  return new Response(bytes, {
    status: opened.range ? 206 : 200,
    headers: {
      ...SHUT,
      "content-type": contentType,
      "content-length": String(opened.sizeBytes),
      "content-disposition": disposition(kind, name),
      ...(part ? { "accept-ranges": "bytes" } : {}),
      ...(opened.range ? { "content-range": opened.range } : {}),
    },
  });
}
