import { readFile } from "node:fs/promises";
import { join } from "node:path";
import fontkit from "@pdf-lib/fontkit";
import type { PDFDocument, PDFFont } from "pdf-lib";

/** One font file embedded in a document, and the characters it has. */
type FacePart = { readonly font: PDFFont; readonly has: ReadonlySet<number> };

/** A type face: its own letters first, then those of wider fonts, because a PDF falls back on nothing by itself. */
export type Face = readonly FacePart[];

export type Fonts = { readonly text: Face; readonly bold: Face; readonly mono: Face };

// The packages ship with the app. Only the static WOFF files can be cut to the letters in use.
const FONT_FOLDER = join(/* turbopackIgnore: true */ process.cwd(), "node_modules", "@fontsource");
const OWN = {
  text: { family: "atkinson-hyperlegible-next", weight: 400 },
  bold: { family: "atkinson-hyperlegible-next", weight: 700 },
  mono: { family: "atkinson-hyperlegible-mono", weight: 600 },
} as const;
const WIDER = ["latin", "latin-ext", "greek", "cyrillic"].map((script) => fontFile("noto-sans", script, 400));

const contents = new Map<string, Promise<Uint8Array>>();

function fontFile(family: string, script: string, weight: number): string {
  return join(FONT_FOLDER, family, "files", `${family}-${script}-${weight}-normal.woff`);
}

function contentOf(path: string): Promise<Uint8Array> {
  const known = contents.get(path);
  if (known) return known;
  const content = readFile(path);
  contents.set(path, content);
  // A file that could not be read once is asked for again.
  content.catch(() => contents.delete(path));
  return content;
}

/** Embeds the three faces of the house, cut to the letters in use: text, bold, and mono for numbers and serials. */
export async function embedFonts(pdf: PDFDocument): Promise<Fonts> {
  pdf.registerFontkit(fontkit);
  // One after the other: the order in which fonts are embedded is part of the bytes.
  const embed = async (paths: readonly string[]): Promise<Face> => {
    const parts: FacePart[] = [];
    for (const path of paths) {
      const font = await pdf.embedFont(await contentOf(path), { subset: true });
      parts.push({ font, has: new Set(font.getCharacterSet()) });
    }
    return parts;
  };
  const wider = await embed(WIDER);
  const face = async ({ family, weight }: { family: string; weight: number }): Promise<Face> => [
    ...(await embed(["latin", "latin-ext"].map((script) => fontFile(family, script, weight)))),
    ...wider,
  ];
  return { text: await face(OWN.text), bold: await face(OWN.bold), mono: await face(OWN.mono) };
}

/** A text cut into runs of one font each; a character no font has becomes a question mark, never a blank. */
export function fontRuns(face: Face, text: string): readonly { font: PDFFont; text: string }[] {
  const runs: { font: PDFFont; text: string }[] = [];
  for (const letter of text.normalize("NFC").replace(/[\u00a0\u2009\u202f]/g, " ")) {
    const part = face.find(({ has }) => has.has(letter.codePointAt(0) ?? 0));
    const font = (part ?? face[0])?.font;
    if (font === undefined) throw new RangeError("A face has one font at least");
    const last = runs.at(-1);
    const set = part === undefined ? "?" : letter;
    if (last?.font === font) last.text += set;
    else runs.push({ font, text: set });
  }
  return runs;
}
