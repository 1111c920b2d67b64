import type { PDFPage } from "pdf-lib";
import { addPage, mm, type OpenDocument } from "./document";
import type { Face } from "./fonts";
import { drawRule, wrapText, writeLine } from "./page-writer";

const LEFT = mm(18);
const RIGHT = mm(192);
const TOP = mm(279);
const FOOT = mm(20);

/** Sheets that are filled from the top; a new one is begun where the next line would not fit. */
export type Paper = {
  readonly document: OpenDocument;
  page: PDFPage;
  /** The base line of what is written next, in points from the foot. */
  y: number;
};

/** The first sheet of a document. */
export const startPaper = (document: OpenDocument): Paper => ({ document, page: addPage(document), y: TOP });

/** Makes room for so many points, on the next sheet where this one has none. */
export function makeRoom(paper: Paper, points: number): void {
  if (paper.y - points >= FOOT) return;
  paper.page = addPage(paper.document);
  paper.y = TOP;
}

type Text = {
  readonly face: Face;
  readonly size: number;
  readonly indent?: number;
  /** Points of what follows that have to fit on the same sheet: a heading never stands alone at the foot. */
  readonly keep?: number;
};

/** Running text over the whole width, line by line, onto the next sheet where needed. */
export function writeText(paper: Paper, text: string, { face, size, indent = 0, keep = 0 }: Text): void {
  const x = LEFT + mm(indent);
  makeRoom(paper, size * 1.35 + keep);
  for (const line of wrapText(face, text, { size, width: RIGHT - x })) {
    makeRoom(paper, size * 1.35);
    writeLine(paper.page, line, { face, size, x, y: paper.y });
    paper.y -= size * 1.35;
  }
}

/** Leaves so many millimetres free. */
export const skip = (paper: Paper, millimetres: number): void => {
  paper.y -= mm(millimetres);
};

/** A column: where it begins and how wide it is, in millimetres from the left edge of the text. */
export type Column = { readonly from: number; readonly width: number; readonly align?: "left" | "right" };
type TableRow = {
  readonly columns: readonly Column[];
  readonly texts: readonly string[];
  readonly face: Face;
  /** Of the first column, where it is another one. */
  readonly firstFace?: Face;
  readonly size?: number;
};

const ROW_SIZE = 9;
const LEADING = 1.3;
/** Between one row and the next, as a part of the size. */
const ROW_GAP = 0.35;
/** How high capitals and figures reach over the base line, and letters under it, as parts of the size. */
const CAPITALS = 0.7;
const DESCENT = 0.25;
/** Points of air over a rule and under it. */
const AIR = 4;

/** A rule moves the base line of what follows down by so much: it takes room of its own and touches no text. */
const roomOfRule = (size: number): number => 2 * AIR + size * (DESCENT + CAPITALS - LEADING - ROW_GAP);

const cellsOf = ({ columns, texts, size = ROW_SIZE, ...faces }: TableRow) =>
  texts.map((text, place) => {
    const face = place === 0 ? (faces.firstFace ?? faces.face) : faces.face;
    return { face, lines: wrapText(face, text, { size, width: mm(columns[place]?.width ?? 20) }) };
  });

const heightOf = (row: TableRow): number =>
  Math.max(...cellsOf(row).map(({ lines }) => lines.length)) * (row.size ?? ROW_SIZE) * LEADING;

/** One row of a table: each cell wrapped in its column, the row as high as its highest cell. It never breaks in two. */
export function writeRow(paper: Paper, row: TableRow): void {
  const { columns, size = ROW_SIZE } = row;
  const height = heightOf(row);
  makeRoom(paper, height);
  for (const [place, { face, lines }] of cellsOf(row).entries()) {
    const { from, width, align = "left" } = columns[place] ?? { from: 0, width: 20 };
    const x = LEFT + mm(align === "right" ? from + width : from);
    for (const [at, line] of lines.entries())
      writeLine(paper.page, line, { face, size, x, align, y: paper.y - at * size * LEADING });
  }
  paper.y -= height + size * ROW_GAP;
}

type Table = {
  readonly columns: readonly Column[];
  readonly heads: readonly string[];
  readonly rows: readonly (readonly string[])[];
};

/** A table with a rule over each row. A row goes onto the next sheet whole, and the heads stand there again. */
export function writeTable(paper: Paper, { columns, heads, rows }: Table): void {
  const { text, bold } = paper.document.fonts;
  const head = { columns, texts: heads, face: bold };
  for (const [place, texts] of rows.entries()) {
    const row = { columns, texts, face: text };
    const needed = roomOfRule(ROW_SIZE) + heightOf(row);
    const isFirst = place === 0;
    const sheet = paper.page;
    makeRoom(paper, isFirst ? heightOf(head) + needed : needed);
    if (isFirst || paper.page !== sheet) writeRow(paper, head);
    rule(paper, { thickness: isFirst ? 0.75 : 0.4 });
    writeRow(paper, row);
  }
}

type RuleStyle = { readonly thickness?: number; readonly last?: number; readonly over?: number };

/** A rule over the whole width, or over the last so many millimetres; `over` is the size of the text under it. */
export function rule(paper: Paper, { thickness = 0.5, last = 174, over = ROW_SIZE }: RuleStyle = {}): void {
  // Down from the last base line of the row before, past its descenders.
  const y = paper.y + ROW_SIZE * (LEADING + ROW_GAP - DESCENT) - AIR;
  drawRule(paper.page, { x: RIGHT - mm(last), y, width: mm(last), thickness });
  paper.y = y - AIR - over * CAPITALS;
}

/** Under a total of that size: two rules close together, as in a ledger. */
export function doubleRule(paper: Paper, { last, under }: { last: number; under: number }): void {
  const y = paper.y + under * (LEADING + ROW_GAP - DESCENT) - AIR;
  for (const lower of [0, 2])
    drawRule(paper.page, { x: RIGHT - mm(last), y: y - lower, width: mm(last), thickness: 0.75 });
  paper.y = y - 2 - AIR - ROW_SIZE * CAPITALS;
}

/** A line at the foot of every sheet, written once all of them are there. */
export function writeFeet({ document }: Paper, textOf: (page: number, pages: number) => string): void {
  const pages = document.pdf.getPages();
  for (const [place, page] of pages.entries())
    writeLine(page, textOf(place + 1, pages.length), {
      face: document.fonts.text,
      size: 8,
      x: RIGHT,
      y: mm(11),
      align: "right",
    });
}
