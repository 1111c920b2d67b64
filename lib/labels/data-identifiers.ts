import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import type { LabelFault } from "./application-identifiers";

/** One field of an ISO/IEC 15434 message: its data identifier ("S", "1T", "1P") and its value. */
export type Field = { readonly di: string; readonly value: string };

export type Envelope = { readonly format: "05" | "06"; readonly body: string };

// "[)>", record separator, format, group separator. Seen damaged in the field: a ">" in front, the record separator
// gone or shown as "?", the group separator shown as "?".
const HEADER = /^>?\[\)>[\u001e?]?(05|06)([\u001d?])/;
const TRAILER = /[\u001e?]?(?:\u0004|EOT)$|[\u001e\u0004]+$/;

/** True where a text begins as an ISO/IEC 15434 message does, of whatever format. */
export const isEnvelope = (text: string): boolean => /^>?\[\)>/.test(text);

/** Opens an ISO/IEC 15434 message of format 05 (application identifiers) or 06 (data identifiers). */
export function openEnvelope(text: string): Outcome<Envelope, LabelFault> {
  const header = HEADER.exec(text);
  if (!header) return refuse("labelUnreadable");
  const body = text.slice(header[0].length).replace(TRAILER, "");
  const separated = header[2] === "?" ? body.replaceAll("?", "\u001d") : body;
  return ok({ format: header[1] === "05" ? "05" : "06", body: separated });
}

/** The fields of a format 06 body (ANSI MH10.8.2 data identifiers: up to three digits and a capital). */
export function parseFields(body: string): Outcome<readonly Field[], LabelFault> {
  const fields: Field[] = [];
  for (const part of body.split("\u001d").filter((text) => text !== "")) {
    const [, di, value] = /^(\d{0,3}[A-Z])(.+)$/.exec(part) ?? [];
    if (di === undefined || value === undefined) return refuse("labelUnreadable");
    fields.push({ di, value });
  }
  return fields.length === 0 ? refuse("labelUnreadable") : ok(fields);
}
