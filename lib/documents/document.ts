import { PDFDocument, type PDFPage } from "pdf-lib";
import { formatTag, type Locale } from "@/lib/kernel/locale";
import { embedFonts, type Fonts } from "./fonts";

export type OpenDocument = { readonly pdf: PDFDocument; readonly fonts: Fonts };

const MAKER = "Partproof";
const POINTS_PER_MM = 72 / 25.4;

/** Millimetres as the points of a PDF, 72 to the inch. */
export const mm = (millimetres: number): number => millimetres * POINTS_PER_MM;

/**
 * An empty document with the fonts of the house, its title and language. `madeAt` is what it says of its own time, from
 * the facts it prints: the same facts give the same bytes.
 */
export async function openDocument(title: string, locale: Locale, madeAt: Date): Promise<OpenDocument> {
  const pdf = await PDFDocument.create({ updateMetadata: false });
  pdf.setTitle(title, { showInWindowTitleBar: true });
  pdf.setLanguage(formatTag(locale));
  pdf.setProducer(MAKER);
  pdf.setCreator(MAKER);
  pdf.setCreationDate(madeAt);
  pdf.setModificationDate(madeAt);
  return { pdf, fonts: await embedFonts(pdf) };
}

/** A new page of that size in millimetres; A4 upright where none is said. */
export const addPage = (
  { pdf }: OpenDocument,
  size: { widthMm: number; heightMm: number } = { widthMm: 210, heightMm: 297 },
): PDFPage => pdf.addPage([mm(size.widthMm), mm(size.heightMm)]);

/** The finished file. */
export const finishDocument = ({ pdf }: OpenDocument): Promise<Uint8Array> =>
  pdf.save({ useObjectStreams: false });
