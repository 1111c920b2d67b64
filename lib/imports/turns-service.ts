import "server-only";

/** A file up to here is done with before anybody notices. */
const SMALL = { lines: 2_000, bytes: 512_000 } as const;

/** What is known of how large a file is. */
type Size = { readonly lineCount?: number; readonly sizeBytes?: number };

let last: Promise<unknown> = Promise.resolve();

/** One large file at a time: several at once would each take the others' memory and be done no sooner. Small ones go by. */
export function inTurn<T>({ lineCount = 0, sizeBytes = 0 }: Size, act: () => Promise<T>): Promise<T> {
  if (lineCount <= SMALL.lines && sizeBytes <= SMALL.bytes) return act();
  const mine = last.then(act);
  last = mine.catch(() => undefined);
  return mine;
}
