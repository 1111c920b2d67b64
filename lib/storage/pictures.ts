import "server-only";
import sharp from "sharp";
import { LIMITS } from "@/lib/kernel/limits";

// Only the three decoders we need exist for this process; everything else a file could ask for is shut.
sharp.block({ operation: ["VipsForeignLoad"] });
sharp.unblock({ operation: ["VipsForeignLoadJpeg", "VipsForeignLoadPng", "VipsForeignLoadWebp"] });
sharp.concurrency(1);
sharp.cache(false);

const LONGEST_EDGE_PX = 1600;

export type ViewCopy = { readonly jpeg: Buffer; readonly widthPx: number; readonly heightPx: number };

/**
 * A new picture from the pixels of an old one, at most 1600 px on its longer edge, upright, and without anything else
 * the file carried: no place, no camera's number, no trailing bytes. Throws for what is no picture, and for one of more
 * than 50 megapixels before its pixels are touched.
 */
export async function viewCopyOf(original: Buffer): Promise<ViewCopy> {
  const { data, info } = await sharp(original, {
    limitInputPixels: LIMITS.photoPixels,
    failOn: "warning",
    sequentialRead: true,
    pages: 1,
  })
    .rotate()
    .resize({ width: LONGEST_EDGE_PX, height: LONGEST_EDGE_PX, fit: "inside", withoutEnlargement: true })
    .flatten({ background: "#ffffff" })
    .jpeg({ quality: 82, mozjpeg: true })
    .toBuffer({ resolveWithObject: true });
  return { jpeg: data, widthPx: info.width, heightPx: info.height };
}
