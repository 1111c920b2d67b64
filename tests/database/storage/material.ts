import { randomBytes } from "node:crypto";
import { crc32, deflateSync } from "node:zlib";
import sharp from "sharp";

const noise = (widthPx: number, heightPx: number) =>
  sharp(randomBytes(widthPx * heightPx * 3), { raw: { width: widthPx, height: heightPx, channels: 3 } });

/** A photo nobody has sent before. */
export const jpegPhoto = (widthPx = 64, heightPx = 48): Promise<Buffer> =>
  noise(widthPx, heightPx).jpeg().toBuffer();
export const pngPhoto = (): Promise<Buffer> => noise(40, 30).png().toBuffer();
export const webpPhoto = (): Promise<Buffer> => noise(40, 30).webp().toBuffer();
export const avifPhoto = (): Promise<Buffer> => noise(40, 30).avif().toBuffer();
export const tiffPhoto = (): Promise<Buffer> => noise(40, 30).tiff().toBuffer();

export const pdfFile = (): Buffer =>
  Buffer.from(`%PDF-1.4\n% ${randomBytes(8).toString("hex")}\n1 0 obj<<>>endobj\ntrailer<<>>\n%%EOF\n`);
export const csvFile = (): Buffer =>
  Buffer.from(`time_s,current_a\n0,${randomBytes(2).readUInt16LE()}\n1,2.5\n`);

export const HTML = Buffer.from("<!doctype html><script>fetch('/api/v1/claims')</script>");
export const HTML_BIG_ENDIAN = Buffer.from(`\ufeff${String(HTML)}`, "utf16le").swap16();
export const SVG = Buffer.from(
  `<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"><script>1</script></svg>`,
);
export const GIF = Buffer.from(
  "47494638396101000100800000000000ffffff2c00000000010001000002024401003b",
  "hex",
);
export const ZIP = Buffer.from("504b0506000000000000000000000000000000000000", "hex");
export const EXE = Buffer.concat([Buffer.from("4d5a90000300000004000000ffff0000", "hex"), Buffer.alloc(512)]);
export const HEIC = Buffer.from("000000186674797068656963000000006d69663168656963", "hex");

const chunk = (type: string, data: Buffer): Buffer => {
  const named = Buffer.concat([Buffer.from(type, "latin1"), data]);
  const frame = Buffer.alloc(8);
  frame.writeUInt32BE(data.length, 0);
  frame.writeUInt32BE(crc32(named), 4);
  return Buffer.concat([frame.subarray(0, 4), named, frame.subarray(4)]);
};

/** A picture in black and white that is small in bytes and as large in pixels as it is said to be. */
export function whitePng(widthPx: number, heightPx: number): Buffer {
  const head = Buffer.alloc(13);
  head.writeUInt32BE(widthPx, 0);
  head.writeUInt32BE(heightPx, 4);
  head[8] = 1;
  const rows = Buffer.alloc((Math.ceil(widthPx / 8) + 1) * heightPx);
  return Buffer.concat([
    Buffer.from("89504e470d0a1a0a", "hex"),
    chunk("IHDR", head),
    chunk("IDAT", deflateSync(rows, { level: 1 })),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}
