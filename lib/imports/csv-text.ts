export type Encoding = "utf-8" | "windows-1252";

/** Little enough that no reader is busy with it for long, whatever stands in it. */
const PIECE_BYTES = 4_096;
const LINE_FEED = 10;
const CARRIAGE_RETURN = 13;

/** Whether a text runs over more lines than that, blank ones too: looked at first, for reading each of them costs. */
export function isLongerThan(bytes: Uint8Array, mostLines: number): boolean {
  let breaks = 0;
  for (let at = 0; at < bytes.length && breaks <= mostLines; at += 1) {
    const byte = bytes[at];
    if (byte === LINE_FEED || (byte === CARRIAGE_RETURN && bytes[at + 1] !== LINE_FEED)) breaks += 1;
  }
  return breaks > mostLines;
}

const withPlainBreaks = (text: string): string => text.replace(/\r\n?/gu, "\n");

/** A text from its beginning in short pieces, every line ended by a line feed alone. */
export function* textOf(bytes: Uint8Array, encoding: Encoding): Generator<string, void, undefined> {
  const decoder = new TextDecoder(encoding);
  let held = "";
  for (let at = 0; at < bytes.length; at += PIECE_BYTES) {
    const text = held + decoder.decode(bytes.subarray(at, at + PIECE_BYTES), { stream: true });
    // The end of a piece may cut a line's end in two.
    held = text.endsWith("\r") ? "\r" : "";
    yield withPlainBreaks(held ? text.slice(0, -1) : text);
  }
  yield withPlainBreaks(held + decoder.decode());
}
