import "server-only";
import { fileTypeFromBuffer } from "file-type";
import type { FileKind } from "@/lib/kernel/limits";
import { refuse, ok, type Outcome } from "@/lib/kernel/outcome";

export type MediaType =
  "image/jpeg" | "image/png" | "image/webp" | "application/pdf" | "text/csv" | "text/plain";

/** Extensions a media type may come with: the name and the content must say the same. */
const EXTENSIONS: Readonly<Record<MediaType, readonly string[]>> = {
  "image/jpeg": ["jpg", "jpeg"],
  "image/png": ["png"],
  "image/webp": ["webp"],
  "application/pdf": ["pdf"],
  "text/csv": ["csv"],
  "text/plain": ["txt", "log"],
};

const OF_KIND: Readonly<Record<FileKind, readonly MediaType[]>> = {
  photo: ["image/jpeg", "image/png", "image/webp"],
  runLog: ["text/csv", "text/plain"],
  document: ["application/pdf"],
};

export type TypeRefusal = "fileTypeNotAllowed" | "fileTypeHeic" | "fileNameDisagrees" | "fileNotText";

const extensionOf = (name: string): string => /\.([a-z0-9]{1,8})$/iu.exec(name)?.[1]?.toLowerCase() ?? "";

const isMediaType = (text: string): text is MediaType => Object.hasOwn(EXTENSIONS, text);

/** How text says by its first bytes that it is written in pairs of bytes; null where it does not. */
function wideCoding(head: Buffer): "utf-16le" | "utf-16be" | null {
  if (head[0] === 0xff && head[1] === 0xfe) return "utf-16le";
  return head[0] === 0xfe && head[1] === 0xff ? "utf-16be" : null;
}

/** Text has no signature: it is what holds no NUL outside UTF-16 and begins like no mark-up. */
function textType(head: Buffer, name: string): Outcome<MediaType, TypeRefusal> {
  const wide = wideCoding(head);
  // Decoding drops a byte order mark: what stands behind it is what a reader would begin with.
  const text = new TextDecoder(wide ?? "utf-8").decode(head).trimStart();
  if ((!wide && head.includes(0)) || /^(<|%!|#!|MZ|PK)/u.test(text)) return refuse("fileNotText", { name });
  const extension = extensionOf(name);
  if (EXTENSIONS["text/csv"].includes(extension)) return ok("text/csv");
  return EXTENSIONS["text/plain"].includes(extension)
    ? ok("text/plain")
    : refuse("fileNameDisagrees", { name, found: "text" });
}

/**
 * The type of a file by its first bytes, never by what the sender calls it. The name's ending must agree. Refuses types
 * the kind does not take, and photos in HEIC by name, since a phone can send JPEG instead.
 */
export async function typeOf(
  head: Buffer,
  name: string,
  kind: FileKind,
): Promise<Outcome<MediaType, TypeRefusal>> {
  // The mark of UTF-16 would be taken for the first bytes of a sound.
  if (kind === "runLog" && wideCoding(head)) return textType(head, name);
  const found = await fileTypeFromBuffer(head).catch(() => undefined);
  if (found && ["image/heic", "image/heif", "image/avif"].includes(found.mime))
    return refuse("fileTypeHeic", { name });
  if (!found) return kind === "runLog" ? textType(head, name) : refuse("fileTypeNotAllowed", { name });
  if (!isMediaType(found.mime) || !OF_KIND[kind].includes(found.mime))
    return refuse("fileTypeNotAllowed", { name });
  if (!EXTENSIONS[found.mime].includes(extensionOf(name)))
    return refuse("fileNameDisagrees", { name, found: found.ext });
  return ok(found.mime);
}
