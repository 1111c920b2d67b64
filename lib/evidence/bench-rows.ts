const BENCH = "bench.";

/** What the bench adds to a claim; each is a row of its own beside the workshop's Evidence list. */
export const BENCH_FILES = ["runLog", "photo"] as const;
export type BenchFile = (typeof BENCH_FILES)[number];

/** The row of a claim that holds what the bench recorded of one line: `bench.runLog.2`. */
export const benchRowId = (file: BenchFile, lineNumber: number): string => `${BENCH}${file}.${lineNumber}`;

/** True for a row of the bench, false for one of the workshop's Evidence list. */
export const isBenchRow = (rowId: string): boolean => rowId.startsWith(BENCH);

/** The line a row of the bench belongs to; null for any other row. */
export function lineOfBenchRow(rowId: string): number | null {
  const [, line] = /^bench\.(?:runLog|photo)\.([1-8])$/.exec(rowId) ?? [];
  return line === undefined ? null : Number(line);
}
