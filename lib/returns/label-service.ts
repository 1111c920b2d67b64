import "server-only";
import type { PDFPage } from "pdf-lib";
import { drawDataMatrix } from "@/lib/documents/data-matrix";
import { addPage, finishDocument, mm, openDocument } from "@/lib/documents/document";
import type { Fonts } from "@/lib/documents/fonts";
import { drawRule, widthOf, writeBlock, writeLine } from "@/lib/documents/page-writer";
import type { Locale } from "@/lib/kernel/locale";

export type LabelSize = "a4" | "roll";

/** What a return label says, in the reader's words. */
export type LabelText = {
  readonly title: string;
  /** `R512-408-337`, and what its code holds. */
  readonly number: string;
  readonly code: string;
  readonly claim: string;
  readonly toHead: string;
  readonly to: string;
  readonly by: string;
  readonly fromHead: string;
  readonly from: string;
  readonly note: string;
};

type Sheet = {
  readonly widthMm: number;
  readonly heightMm: number;
  readonly marginMm: number;
  /** A roll: as long as what stands on it. */
  readonly isEndless: boolean;
};
type Sizes = { readonly number: number; readonly text: number; readonly code: number };

// The roll is as wide as a usual label printer takes; the sheet carries the same label, larger, to be folded once.
const SHEETS: Readonly<Record<LabelSize, Sheet & { readonly sizes: Sizes }>> = {
  a4: {
    widthMm: 210,
    heightMm: 297,
    marginMm: 18,
    isEndless: false,
    sizes: { number: 46, text: 15, code: 42 },
  },
  roll: {
    widthMm: 62,
    heightMm: 400,
    marginMm: 3,
    isEndless: true,
    sizes: { number: 21, text: 9.5, code: 24 },
  },
};

type Pen = { readonly page: PDFPage; readonly fonts: Fonts; readonly sheet: Sheet; readonly sizes: Sizes };

/** A head and a block under it; answers where the next one starts. */
function writeSection(
  { page, fonts, sheet, sizes }: Pen,
  y: number,
  text: { head: string; body: string },
): number {
  const style = { x: mm(sheet.marginMm), width: mm(sheet.widthMm - 2 * sheet.marginMm) };
  writeLine(page, text.head, { face: fonts.text, size: sizes.text * 0.8, x: style.x, y });
  const next = writeBlock(page, text.body, {
    face: fonts.bold,
    size: sizes.text,
    ...style,
    y: y - sizes.text * 1.3,
  });
  return next - sizes.text * 0.5;
}

function writeHead(pen: Pen, text: LabelText): number {
  const { page, fonts, sheet, sizes } = pen;
  const [left, width] = [mm(sheet.marginMm), mm(sheet.widthMm - 2 * sheet.marginMm)];
  const codeSize = mm(sizes.code);
  const top = mm(sheet.heightMm - sheet.marginMm);
  drawDataMatrix(page, text.code, { x: left + width - codeSize, y: top - codeSize, size: codeSize });
  const beside = { x: left, width: width - codeSize - sizes.text / 2 };
  const next = writeBlock(page, text.title, {
    face: fonts.bold,
    size: sizes.text,
    ...beside,
    y: top - sizes.text,
  });
  writeBlock(page, text.claim, { face: fonts.text, size: sizes.text, ...beside, y: next });
  const fits = width / widthOf(fonts.mono, text.number, 1);
  const size = Math.min(sizes.number, fits);
  const base = top - codeSize - size;
  writeLine(page, text.number, { face: fonts.mono, size, x: left, y: base });
  drawRule(page, { x: left, y: base - size * 0.35, width, thickness: 1.5 });
  return base - size * 0.35 - sizes.text * 1.3;
}

/** Cuts the page a margin below where the writing ended. */
function cutBelow({ page, sheet }: Pen, y: number): void {
  const foot = Math.max(0, y - mm(sheet.marginMm));
  const [width, height] = [mm(sheet.widthMm), mm(sheet.heightMm) - foot];
  page.setMediaBox(0, foot, width, height);
  page.setCropBox(0, foot, width, height);
}

/** The label of a return as a PDF. The same words and the same day give the same bytes. */
export async function makeReturnLabel(
  text: LabelText,
  { size, locale, madeAt }: { size: LabelSize; locale: Locale; madeAt: Date },
): Promise<Uint8Array> {
  const document = await openDocument(`${text.title} ${text.number}`, locale, madeAt);
  const { sizes, ...sheet } = SHEETS[size];
  const pen: Pen = { page: addPage(document, sheet), fonts: document.fonts, sheet, sizes };
  let y = writeHead(pen, text);
  y = writeSection(pen, y, { head: text.toHead, body: text.to });
  y = writeSection(pen, y, { head: text.by, body: text.note });
  y = writeSection(pen, y, { head: text.fromHead, body: text.from });
  if (sheet.isEndless) cutBelow(pen, y);
  return finishDocument(document);
}
