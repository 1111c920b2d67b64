import type { BatchLine, LifeCurvesView } from "./view";

/** Columns of the file in their order; each names its unit in its head. */
export const CSV_COLUMNS = [
  "batch",
  "partNumber",
  "grade",
  "units",
  "failed",
  "unitMonths",
  "rate",
  "rateLower",
  "rateUpper",
  "expected",
  "ratio",
  "ratioLower",
  "ratioUpper",
  "p",
  "oldest",
  "doa",
  "undecided",
  "count",
  "start",
  "cut",
] as const;
export type CsvColumn = (typeof CSV_COLUMNS)[number];

/** A cell of text: a leading sign that a spreadsheet would run as a formula gets a quote before it (OWASP ASVS 1.2.10). */
function textCell(text: string): string {
  const safe = /^[=+\-@\t\r\0]/u.test(text) ? `'${text}` : text;
  return /[",\r\n]/u.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

const SIGNIFICANT = 6;
const numberCell = (value: number | null | undefined): string =>
  value === null || value === undefined ? "" : String(Number(value.toPrecision(SIGNIFICANT)));

function cellsOf(batch: BatchLine, { query, starts }: LifeCurvesView): Readonly<Record<CsvColumn, string>> {
  return {
    batch: textCell(batch.key),
    partNumber: textCell(batch.partNumber),
    grade: batch.grade,
    units: numberCell(batch.units),
    failed: numberCell(batch.failed),
    unitMonths: numberCell(batch.unitMonths),
    rate: numberCell(batch.rate?.value),
    rateLower: numberCell(batch.rate?.lower),
    rateUpper: numberCell(batch.rate?.upper),
    expected: numberCell(batch.expected),
    ratio: numberCell(batch.ratio?.value),
    ratioLower: numberCell(batch.ratio?.lower),
    ratioUpper: numberCell(batch.ratio?.upper),
    p: numberCell(batch.adjustedP),
    oldest: numberCell(batch.oldestDays),
    doa: numberCell(batch.deadOnArrival),
    undecided: numberCell(batch.undecided),
    count: query.count,
    start: starts.rule,
    cut: query.cut,
  };
}

/** The table of a view as RFC 4180 has it: points for decimals, ISO days, lines ended by CR LF. */
export function csvOf(view: LifeCurvesView, head: (column: CsvColumn) => string): string {
  const rows = view.batches.map((batch) => {
    const cells = cellsOf(batch, view);
    return CSV_COLUMNS.map((column) => cells[column]).join(",");
  });
  return [CSV_COLUMNS.map((column) => head(column)).join(","), ...rows].map((row) => `${row}\r\n`).join("");
}
