import bwip from "bwip-js/node";
import { rgb, type PDFPage } from "pdf-lib";

type Square = { readonly x: number; readonly y: number; readonly size: number };
type Modules = { readonly dark: readonly boolean[]; readonly across: number; readonly down: number };

const INK = rgb(0, 0, 0);
// A symbol needs one module of white around it (ISO/IEC 16022, from memory); two are easier on a poor print.
const QUIET_MODULES = 2;

/** The modules of a Data Matrix (ECC 200) that holds a text. Throws where the text is too long for a symbol. */
export function dataMatrixModules(text: string): Modules {
  const [symbol] = bwip.raw({ bcid: "datamatrix", text });
  if (!symbol || !("pixs" in symbol)) throw new RangeError(`No Data Matrix can hold ${text}`);
  return { dark: symbol.pixs.map((module) => module === 1), across: symbol.pixx, down: symbol.pixy };
}

/** Draws a Data Matrix, its white border within the square, as shapes that stay sharp at any size. `y` is its foot, in points. */
export function drawDataMatrix(page: PDFPage, text: string, { x, y, size }: Square): void {
  const { dark, across, down } = dataMatrixModules(text);
  const module = size / (Math.max(across, down) + 2 * QUIET_MODULES);
  const left = x + QUIET_MODULES * module;
  const top = y + size - QUIET_MODULES * module;
  for (let row = 0; row < down; row += 1) {
    for (const { from, length } of runsOf(dark.slice(row * across, (row + 1) * across)))
      page.drawRectangle({
        x: left + from * module,
        y: top - (row + 1) * module,
        width: length * module,
        height: module,
        color: INK,
      });
  }
}

/** Dark modules side by side as one bar each, so that no hairline shows between them. */
function runsOf(row: readonly boolean[]): { from: number; length: number }[] {
  const runs: { from: number; length: number }[] = [];
  for (const [place, isDark] of row.entries()) {
    const last = runs.at(-1);
    if (!isDark) continue;
    if (last && last.from + last.length === place) last.length += 1;
    else runs.push({ from: place, length: 1 });
  }
  return runs;
}
