import type { DestinationStream } from "pino";
import { vi } from "vitest";

// The log of the product, heard instead of printed; load this before anything that writes to it.
let kept = "";

vi.doMock("@/lib/web/log", async (importActual) => {
  const actual = await importActual<{ logTo: (stream: DestinationStream) => { level: string } }>();
  const log = actual.logTo({ write: (piece) => (kept += piece) });
  // Tests are quiet unless somebody listens.
  log.level = "info";
  return { ...actual, log };
});

/** What was logged so far, as it would stand in the file. */
export const heardText = (): string => kept;

export type HeardLine = Readonly<Record<string, unknown>>;

/** The same, line by line. Throws where a line is no JSON object. */
export const heardLines = (): HeardLine[] =>
  kept
    .split("\n")
    .filter(Boolean)
    .map((line) => ({ ...Object(JSON.parse(line)) }) as HeardLine);
