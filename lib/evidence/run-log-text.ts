import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { RunLogNote, RunLogRefusal } from "./run-log";
import { RUN_LOG_LIMITS } from "./run-log-limits";

type LogText = { readonly text: string; readonly note: RunLogNote | null };

/**
 * The text of a log file: UTF-8, UTF-16 with or without its mark, else Windows-1252 with a note. A text with NUL
 * characters is no text but another kind of file.
 */
export function logText(source: Uint8Array | string): Outcome<LogText, RunLogRefusal> {
  if (source.length > RUN_LOG_LIMITS.bytes)
    return refuse("runLogTooBig", {
      megabytes: Number((source.length / 1024 / 1024).toFixed(1)),
      limit: RUN_LOG_LIMITS.bytes / 1024 / 1024,
    });
  const decoded = typeof source === "string" ? { text: source, note: null } : decode(source);
  const text = decoded.text.replace(/^\uFEFF/u, "");
  if (text.trim() === "") return refuse("runLogEmpty");
  return text.includes("\0") ? refuse("runLogBinary") : ok({ text, note: decoded.note });
}

function decode(bytes: Uint8Array): LogText {
  const wide = wideEncoding(bytes);
  if (wide !== null) return { text: new TextDecoder(wide).decode(bytes), note: null };
  try {
    return { text: new TextDecoder("utf-8", { fatal: true }).decode(bytes), note: null };
  } catch {
    // Older loggers write the degree sign as the single byte B0.
    const text = new TextDecoder("windows-1252").decode(bytes);
    return { text, note: { code: "encodingAssumed", detail: { encoding: "Windows-1252" } } };
  }
}

// Without a mark, UTF-16 of western text shows as a NUL at every second byte, always on the same side.
function wideEncoding(bytes: Uint8Array): "utf-16le" | "utf-16be" | null {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "utf-16le";
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return "utf-16be";
  const head = bytes.subarray(0, 512);
  const zeros = [0, 1].map((side) => head.filter((byte, place) => place % 2 === side && byte === 0).length);
  const [even = 0, odd = 0] = zeros;
  if (head.length < 8 || Math.max(even, odd) < head.length * 0.4) return null;
  return even === 0 ? "utf-16le" : odd === 0 ? "utf-16be" : null;
}
