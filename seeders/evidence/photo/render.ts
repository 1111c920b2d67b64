import { createHash } from "node:crypto";
import sharp from "sharp";
import { chanceFrom, type Chance } from "../../random";
import { BENCH_MARGIN, benchSvgs, HEIGHT, WIDTH } from "./bench";
import { pixelsOf, sceneSvg, type PhotoScene } from "./scene";

export type RenderedPhoto = {
  readonly original: Buffer;
  /** The copy for screens: no data of the camera, at most 1600 px. */
  readonly view: Buffer;
  readonly sha256: string;
  readonly widthPx: number;
  readonly heightPx: number;
};

const VIEW_PX = 1600;
const LARGE = { width: WIDTH + BENCH_MARGIN, height: HEIGHT + BENCH_MARGIN };

type Size = { readonly width: number; readonly height: number };
type Picture = { readonly pixels: Buffer; readonly channels: 3 | 4 };

const rawOf = (channels: 3 | 4, { width, height } = LARGE) => ({ raw: { width, height, channels } });

const pieceOf = (draw: Chance, size: Size) => ({
  left: draw.whole(0, BENCH_MARGIN),
  top: draw.whole(0, BENCH_MARGIN),
  ...size,
});

const grainPiece = ({ pixels }: Picture, piece: ReturnType<typeof pieceOf>): Promise<Buffer> =>
  sharp(pixels, rawOf(3)).extract(piece).raw().toBuffer();

const drawnBench = async (svg: string): Promise<Picture> => ({
  pixels: await sharp(Buffer.from(svg)).removeAlpha().resize(LARGE).raw().toBuffer(),
  channels: 3,
});

/** A sensor's grain as a larger grey picture; each photo takes another piece of it. */
async function sensorGrain(): Promise<Picture> {
  const draw = chanceFrom("photo/grain");
  const grey = Buffer.alloc(LARGE.width * LARGE.height);
  // The sum of three uniforms is near enough to a bell curve, and quick.
  for (let at = 0; at < grey.length; at += 1)
    grey[at] = 128 + Math.round((draw.next() + draw.next() + draw.next() - 1.5) * 40);
  const pixels = await sharp(grey, { raw: { ...LARGE, channels: 1 } })
    .blur(0.6)
    .toColourspace("srgb")
    .raw()
    .toBuffer();
  return { pixels, channels: 3 };
}

const EXIF_SECONDS = 19;
const capturedText = (takenAt: Date): string =>
  takenAt.toISOString().slice(0, EXIF_SECONDS).replaceAll("-", ":").replace("T", " ");

export type PhotoRenderer = (scene: PhotoScene, takenAt: Date) => Promise<RenderedPhoto>;

/** Renders photos on a few shared benches; the same scene and time give the same bytes on the same machine. */
export async function photoRenderer(): Promise<PhotoRenderer> {
  const [grain, ...benches] = await Promise.all([sensorGrain(), ...benchSvgs().map(drawnBench)]);
  return async (scene, takenAt) => {
    const draw = chanceFrom(`render/${scene.key}`);
    const bench = draw.pick(benches);
    const size = pixelsOf(scene);
    const piece = pieceOf(draw, size);
    // The grain of a small photo would be lost in its pixels.
    const noise = scene.size === "full" ? [await grainPiece(grain, piece)] : [];
    const things = await sharp(Buffer.from(sceneSvg(scene)))
      .resize(size.width, size.height)
      .ensureAlpha()
      .raw()
      .toBuffer();
    const original = await sharp(bench.pixels, rawOf(3))
      .extract(pieceOf(draw, size))
      .flip(draw.happens(0.5))
      .flop(draw.happens(0.5))
      .linear(draw.between(0.86, 1.12))
      .composite([
        { input: things, ...rawOf(4, size) },
        ...noise.map((input) => ({ input, ...rawOf(3, size), blend: "soft-light" as const })),
      ])
      .jpeg({ quality: draw.whole(78, 88) })
      .withExif({ IFD0: { Software: "Bench camera" }, IFD2: { DateTimeOriginal: capturedText(takenAt) } })
      .toBuffer();
    const fitted = { width: VIEW_PX, height: VIEW_PX, fit: "inside", withoutEnlargement: true } as const;
    const view = await sharp(original).resize(fitted).jpeg({ quality: 80 }).toBuffer();
    const sha256 = createHash("sha256").update(original).digest("hex");
    return { original, view, sha256, widthPx: size.width, heightPx: size.height };
  };
}
