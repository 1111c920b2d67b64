import type { RunLog } from "./run-log";

/** A block of rows that stands in the log twice, by its lines. */
export type CopiedBlock = { readonly rows: number; readonly firstLine: number; readonly secondLine: number };

const SHORTEST_BLOCK = 8;

/**
 * The first block of rows whose every measured figure repeats later in the log. How long a block must be to mean
 * something follows from the log itself: where figures repeat by nature (a settled temperature, few digits) a long
 * block is needed, so that chance would show one in fewer than a thousand such logs.
 */
export function copiedBlockIn(log: RunLog): CopiedBlock | null {
  const kinds = rowKinds(log);
  const length = blockLengthFor(kinds);
  if (length === null) return null;
  const seenAt = new Map<string, number>();
  for (let start = 0; start + length <= kinds.length; start += 1) {
    const block = kinds.slice(start, start + length);
    if (new Set(block).size < length / 2) continue;
    const key = block.join(" ");
    const earlier = seenAt.get(key);
    if (earlier === undefined) seenAt.set(key, start);
    else if (start - earlier >= length)
      return {
        rows: sharedRows(kinds, earlier, start),
        firstLine: log.lines[earlier] ?? 0,
        secondLine: log.lines[start] ?? 0,
      };
  }
  return null;
}

/** Each row as the number of its kind: rows with the same figures have the same number. */
function rowKinds(log: RunLog): number[] {
  const kinds = new Map<string, number>();
  return log.timeS.map((_, index) => {
    const key = log.series.map(({ values }) => values[index]).join(" ");
    const kind = kinds.get(key) ?? kinds.size;
    kinds.set(key, kind);
    return kind;
  });
}

function blockLengthFor(kinds: readonly number[]): number | null {
  const counts = new Map<number, number>();
  for (const kind of kinds) counts.set(kind, (counts.get(kind) ?? 0) + 1);
  const alike = [...counts.values()].reduce((sum, count) => sum + (count / kinds.length) ** 2, 0);
  if (alike > 0.5 || kinds.length < 2 * SHORTEST_BLOCK) return null;
  // Twice what independent rows would need: neighbouring rows of a log are alike.
  const needed = 2 * Math.ceil(Math.log(500 * kinds.length ** 2) / -Math.log(alike));
  return Math.max(SHORTEST_BLOCK, needed);
}

function sharedRows(kinds: readonly number[], first: number, second: number): number {
  let rows = 0;
  while (
    first + rows < second &&
    second + rows < kinds.length &&
    kinds[first + rows] === kinds[second + rows]
  )
    rows += 1;
  return rows;
}
