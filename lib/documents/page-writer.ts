import { rgb, type PDFPage } from "pdf-lib";
import { fontRuns, type Face } from "./fonts";

const INK = rgb(0, 0, 0);

/** How a line is set: its face and size in points, from where; `x` is its right end where it is set to the right. */
export type LineStyle = {
  readonly face: Face;
  readonly size: number;
  readonly x: number;
  readonly align?: "left" | "right";
};

/** A block: lines no wider than `width` points, one `leading` below the other (1.35 times the size where none is said). */
export type BlockStyle = LineStyle & { readonly width: number; readonly leading?: number };

/** How wide a text is in points. */
export const widthOf = (face: Face, text: string, size: number): number =>
  fontRuns(face, text).reduce((width, run) => width + run.font.widthOfTextAtSize(run.text, size), 0);

/** Writes one line with its base line at `y` points from the foot of the page. It is not wrapped. */
export function writeLine(page: PDFPage, text: string, { y, ...style }: LineStyle & { y: number }): void {
  const { face, size, align = "left" } = style;
  let x = align === "right" ? style.x - widthOf(face, text, size) : style.x;
  for (const run of fontRuns(face, text)) {
    page.drawText(run.text, { x, y, size, font: run.font, color: INK });
    x += run.font.widthOfTextAtSize(run.text, size);
  }
}

/** A text as lines no wider than `width` points. Line breaks of the text stay; a word wider than a line is cut. */
export function wrapText(
  face: Face,
  text: string,
  { size, width }: { size: number; width: number },
): string[] {
  const fits = (line: string) => widthOf(face, line, size) <= width;
  return text.split(/\r?\n/).flatMap((paragraph) => {
    const lines: string[] = [];
    let line = "";
    for (const word of paragraph.split(/\s+/).filter((one) => one !== "")) {
      const longer = line === "" ? word : `${line} ${word}`;
      if (fits(longer)) {
        line = longer;
        continue;
      }
      if (line !== "") lines.push(line);
      const pieces = cutWord(word, fits);
      lines.push(...pieces.slice(0, -1));
      line = pieces.at(-1) ?? "";
    }
    return [...lines, line];
  });
}

/** Writes a block whose first base line is at `y`, and answers where the next line would stand. */
export function writeBlock(page: PDFPage, text: string, { y, ...style }: BlockStyle & { y: number }): number {
  const leading = style.leading ?? style.size * 1.35;
  let at = y;
  for (const line of wrapText(style.face, text, style)) {
    writeLine(page, line, { ...style, y: at });
    at -= leading;
  }
  return at;
}

/** A rule from `x` to the right, `width` points long and `thickness` points thick (0.75 where none is said). */
export const drawRule = (
  page: PDFPage,
  { x, y, width, thickness = 0.75 }: { x: number; y: number; width: number; thickness?: number },
): void => page.drawLine({ start: { x, y }, end: { x: x + width, y }, thickness, color: INK });

function cutWord(word: string, fits: (text: string) => boolean): string[] {
  const pieces: string[] = [];
  let piece = "";
  for (const letter of word) {
    if (piece !== "" && !fits(piece + letter)) {
      pieces.push(piece);
      piece = "";
    }
    piece += letter;
  }
  return [...pieces, piece];
}
