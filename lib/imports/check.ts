import { readLine, type Reading } from "./check-line";
import type { ColumnKey } from "./columns";
import { cellOf, type CsvFile } from "./csv-file";
import { lineKey, unitKey, type GoodLine, type KnownLine, type LineFacts, type Recorded } from "./known";
import type { LineProblem, ProblemCode } from "./line-desk";
import type { InPieces } from "./pieces";
import { totalsOf, type InvoiceLine, type Totals } from "./totals";

/** Lines with problems that are shown; the others are counted. */
export const PROBLEM_LINES_SHOWN = 100;

type Found = { readonly problems: LineProblem[]; lineCount: number };

export type ReadLines = {
  readonly lineCount: number;
  readonly invoiceLines: readonly InvoiceLine[];
  readonly problems: readonly LineProblem[];
  readonly problemLineCount: number;
};

export type Check = {
  readonly lineCount: number;
  readonly unchangedCount: number;
  /** What the import writes. */
  readonly fresh: readonly InvoiceLine[];
  readonly totals: Totals;
  /** Of the first lines with problems, in the order of the file. */
  readonly problems: readonly LineProblem[];
  readonly problemLineCount: number;
};

const note = (found: Found, problems: readonly LineProblem[]): void => {
  found.lineCount += 1;
  if (found.lineCount <= PROBLEM_LINES_SHOWN) found.problems.push(...problems);
};

type Wrong = Pick<LineProblem, "column" | "code" | "detail">;
const wrong = (code: ProblemCode, column: ColumnKey | null, detail: LineProblem["detail"] = {}): Wrong => ({
  code,
  column,
  detail,
});

const COLUMN_OF_FACT: Readonly<Record<keyof LineFacts, ColumnKey>> = {
  accountId: "account",
  siteId: "site",
  invoicedOn: "invoicedOn",
  shippedOn: "shippedOn",
  partId: "part",
  currency: "currency",
  unitPriceMinor: "netPrice",
  taxCategory: "taxCategory",
  taxRate: "taxRate",
  exemptionReason: "exemptionReason",
};

const isFact = (name: string): name is keyof LineFacts => Object.hasOwn(COLUMN_OF_FACT, name);
const FACTS = Object.keys(COLUMN_OF_FACT).filter(isFact);

/** The columns in which two tellings of an invoice line differ. */
const differing = (a: LineFacts, b: LineFacts): ColumnKey[] =>
  FACTS.filter((fact) => a[fact] !== b[fact]).map((fact) => COLUMN_OF_FACT[fact]);

const shown = (columns: readonly ColumnKey[]) => ({ columns: columns.join(" ") });

type Places = {
  readonly byLine: Map<string, { first: GoodLine; lines: GoodLine[] }>;
  readonly bySerial: Map<string, number>;
};

/** Puts a good line with its invoice line, or says why the file contradicts itself. */
function place(good: GoodLine, { byLine, bySerial }: Places): Wrong | null {
  const key = lineKey(good.invoice, good.lineNumber);
  const group = byLine.get(key);
  const serial = good.serial && unitKey(good.facts.partId, good.serial.normal);
  const earlier = serial === null ? undefined : bySerial.get(serial);
  if (earlier !== undefined) return wrong("serialTwice", "serial", { earlier });
  if (serial !== null) bySerial.set(serial, good.line);
  if (!group) {
    byLine.set(key, { first: good, lines: [good] });
    return null;
  }
  const columns = differing(group.first.facts, good.facts);
  if (columns.length > 0)
    return wrong("lineDiffers", "line", { earlier: group.first.line, ...shown(columns) });
  if (serial === null) return wrong("lineTwice", "line", { earlier: group.first.line });
  group.lines.push(good);
  return null;
}

/** Every line of the file by itself and against the others of the file. May pause after each. */
export function* readLines(file: CsvFile, reading: Omit<Reading, "heading">): InPieces<ReadLines> {
  const found: Found = { problems: [], lineCount: 0 };
  const places: Places = { byLine: new Map(), bySerial: new Map() };
  for (const row of file.rows) {
    yield;
    const read = readLine(row, { ...reading, heading: file.heading });
    if (Array.isArray(read)) {
      note(found, read);
      continue;
    }
    const against = place(read, places);
    if (against) {
      const given = against.column ? cellOf(file.heading, row, against.column) : "";
      note(found, [{ ...against, line: row.line, given }]);
    }
  }
  return {
    lineCount: file.rows.length,
    invoiceLines: [...places.byLine.values()],
    problems: found.problems,
    problemLineCount: found.lineCount,
  };
}

/** Why a line does not agree with the invoice line that is on record, or null where all of it is there already. */
function againstLine(good: GoodLine, existing: KnownLine, { units }: Recorded): Wrong | null {
  const columns = differing(existing.facts, good.facts);
  if (good.serial === null) {
    if (existing.quantity !== good.quantity) columns.push("quantity");
  } else {
    const unit = units.get(unitKey(good.facts.partId, good.serial.normal));
    if (unit?.invoiceLineId !== existing.id) columns.push("serial");
    else if (unit.batch !== good.batch) columns.push("batch");
  }
  const detail = { invoice: good.invoice, number: good.lineNumber, ...shown(columns) };
  return columns.length === 0 ? null : wrong("lineExists", "line", detail);
}

/** Why the unit of a new invoice line cannot be written: its serial is on record for its part. */
function againstUnits(good: GoodLine, { units }: Recorded): Wrong | null {
  const unit = good.serial && units.get(unitKey(good.facts.partId, good.serial.normal));
  return unit
    ? wrong("serialKnown", "serial", { invoice: unit.invoice ?? "", number: unit.lineNumber ?? 0 })
    : null;
}

const givenAt = (good: GoodLine, column: ColumnKey | null): string =>
  column === "serial" ? (good.serial?.raw ?? "") : String(good.lineNumber);

/** The whole file against what is on record: what is new, what is there unchanged, and what stands in the way. May pause. */
export function* checked(read: ReadLines, recorded: Recorded): InPieces<Check> {
  const found: Found = { problems: [], lineCount: 0 };
  const fresh: InvoiceLine[] = [];
  let unchangedCount = 0;
  for (const invoiceLine of read.invoiceLines) {
    const { first, lines } = invoiceLine;
    const existing = recorded.lines.get(lineKey(first.invoice, first.lineNumber));
    if (!existing) fresh.push(invoiceLine);
    for (const good of lines) {
      yield;
      const against = existing ? againstLine(good, existing, recorded) : againstUnits(good, recorded);
      if (against) note(found, [{ ...against, line: good.line, given: givenAt(good, against.column) }]);
      else if (existing) unchangedCount += 1;
    }
  }
  return {
    lineCount: read.lineCount,
    unchangedCount,
    fresh,
    totals: yield* totalsOf(fresh, recorded),
    problems: firstOf([...read.problems, ...found.problems]),
    problemLineCount: read.problemLineCount + found.lineCount,
  };
}

/** The problems of the first lines that have any. */
function firstOf(problems: readonly LineProblem[]): LineProblem[] {
  const lines = [...new Set(problems.map(({ line }) => line))].toSorted((a, b) => a - b);
  const last = lines[PROBLEM_LINES_SHOWN - 1] ?? Infinity;
  return problems.filter(({ line }) => line <= last).toSorted((a, b) => a.line - b.line);
}
