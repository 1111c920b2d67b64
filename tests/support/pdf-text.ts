import {
  decodePDFRawStream,
  PDFArray,
  PDFDict,
  PDFDocument,
  PDFName,
  PDFRawStream,
  type PDFContext,
  type PDFObject,
  type PDFPage,
} from "pdf-lib";

/** A run of text as a page draws it, from its left edge and base line in points. */
export type Run = {
  readonly page: number;
  readonly x: number;
  readonly y: number;
  readonly size: number;
  readonly text: string;
};

const latin1 = (bytes: Uint8Array): string => Buffer.from(bytes).toString("latin1");
const contentOf = (stream: PDFObject | undefined): string =>
  stream instanceof PDFRawStream ? latin1(decodePDFRawStream(stream).decode()) : "";

/** What each glyph of a font stands for, from its ToUnicode map (ISO 32000-1, 9.10.3). */
function glyphsOf(font: PDFDict): ReadonlyMap<string, string> {
  const map = contentOf(font.lookup(PDFName.of("ToUnicode")));
  const glyphs = new Map<string, string>();
  for (const [, code = "", unicode = ""] of map.matchAll(/<([0-9a-f]{4})>\s*<([0-9a-f]+)>/giu))
    glyphs.set(code.toUpperCase(), Buffer.from(unicode, "hex").swap16().toString("utf16le"));
  return glyphs;
}

function fontsOf(page: PDFPage): ReadonlyMap<string, ReadonlyMap<string, string>> {
  const fonts = page.node.Resources()?.lookupMaybe(PDFName.of("Font"), PDFDict);
  return new Map(
    (fonts?.entries() ?? []).map(([name]) => [
      name.asString(),
      glyphsOf(fonts?.lookup(name, PDFDict) ?? PDFDict.withContext(page.doc.context)),
    ]),
  );
}

function streamsOf(page: PDFPage, context: PDFContext): string {
  const contents = page.node.Contents();
  const streams = contents instanceof PDFArray ? contents.asArray() : [contents];
  return streams.map((one) => contentOf(one && context.lookup(one))).join("\n");
}

const OPERATOR =
  /\/(\S+) ([\d.]+) Tf|([-\d.]+) ([-\d.]+) ([-\d.]+) ([-\d.]+) ([-\d.]+) ([-\d.]+) Tm|<([0-9a-f]*)> Tj/giu;

/** Every run of text of a PDF whose fonts are embedded with two bytes a glyph, page by page, in the order they are drawn. */
export async function pdfRuns(bytes: Uint8Array): Promise<Run[]> {
  const pdf = await PDFDocument.load(bytes, { updateMetadata: false });
  return pdf.getPages().flatMap((page, at) => {
    const fonts = fontsOf(page);
    const runs: Run[] = [];
    let [glyphs, size, x, y]: [ReadonlyMap<string, string>, number, number, number] = [new Map(), 0, 0, 0];
    for (const match of streamsOf(page, pdf.context).matchAll(OPERATOR)) {
      const [, font, points, , , , , left, base, hex] = match;
      if (font !== undefined) [glyphs, size] = [fonts.get(`/${font}`) ?? new Map(), Number(points)];
      else if (left !== undefined) [x, y] = [Number(left), Number(base)];
      else {
        const codes = (hex ?? "").toUpperCase().match(/.{4}/gu) ?? [];
        runs.push({
          page: at + 1,
          x,
          y,
          size,
          text: codes.map((code) => glyphs.get(code) ?? "\ufffd").join(""),
        });
      }
    }
    return runs;
  });
}

export type DrawnRule = {
  readonly page: number;
  readonly from: number;
  readonly to: number;
  readonly y: number;
};

const LINE = /([-\d.]+) ([-\d.]+) m\s+([-\d.]+) ([-\d.]+) l\s/gu;

/** Every rule from left to right that a page draws, in points. */
export async function pdfRules(bytes: Uint8Array): Promise<DrawnRule[]> {
  const pdf = await PDFDocument.load(bytes, { updateMetadata: false });
  return pdf.getPages().flatMap((page, at) =>
    [...streamsOf(page, pdf.context).matchAll(LINE)].map(([, from, y, to]) => ({
      page: at + 1,
      from: Number(from),
      to: Number(to),
      y: Number(y),
    })),
  );
}

/** The text of a PDF, each base line a line, from the top of the first page to the foot of the last. */
export async function pdfText(bytes: Uint8Array): Promise<string> {
  const lines = new Map<string, Run[]>();
  for (const run of await pdfRuns(bytes)) {
    const key = `${run.page} ${run.y.toFixed(1)}`;
    lines.set(key, [...(lines.get(key) ?? []), run]);
  }
  const first = (runs: readonly Run[]) => runs[0] ?? { page: 0, y: 0 };
  return [...lines.values()]
    .toSorted((a, b) => first(a).page - first(b).page || first(b).y - first(a).y)
    .map((runs) =>
      runs
        .toSorted((a, b) => a.x - b.x)
        .map(({ text }) => text)
        .join(" "),
    )
    .join("\n");
}
