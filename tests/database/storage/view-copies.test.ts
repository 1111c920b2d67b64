import { createHash } from "node:crypto";
import { Logger, runOnce } from "graphile-worker";
import sharp from "sharp";
import { beforeAll, describe, expect, it } from "vitest";
import { viewCopy } from "@/lib/jobs/tasks/view-copy";
import { LIMITS } from "@/lib/kernel/limits";
import { originalKey, viewKey } from "@/lib/storage/keys";
import { putOnce, readAll } from "@/lib/storage/objects";
import { viewCopyOf } from "@/lib/storage/pictures";
import { buildClaim, buildFile } from "../../support/build";
import { adminQuery } from "../../support/database";
import { twoShops, type Shop } from "../shops";
import * as made from "./material";
import { keysIn, useOwnBucket } from "./own-bucket";

let shop: Shop;
let claim: { id: string };

beforeAll(async () => {
  await useOwnBucket();
  [shop] = (await twoShops()).shops;
  claim = await buildClaim(shop);
});

const quiet = new Logger(() => () => undefined);
const sha256Of = (bytes: Uint8Array) => createHash("sha256").update(bytes);

/** A photo as it stands after its upload: bytes in the store, a row that waits, a task in the queue. */
async function uploaded(bytes: Buffer) {
  const sha256 = sha256Of(bytes).digest("hex");
  const key = originalKey(sha256);
  const sha256Base64 = sha256Of(bytes).digest("base64");
  await putOnce(key, bytes, { sha256Base64, contentType: "image/jpeg" });
  const { id } = await buildFile(shop, claim, { sha256, object_key: key, size_bytes: bytes.length });
  const payload = JSON.stringify({ evidenceId: id });
  await adminQuery("select graphile_worker.add_job('viewCopy', $1::json)", [payload]);
  return { id, key, sha256, bytes };
}

/** The worker's own round over its queue, as its own login. */
const work = () =>
  runOnce({
    connectionString: process.env["DATABASE_URL_WORKER"] ?? "",
    logger: quiet,
    taskList: { viewCopy },
    noHandleSignals: true,
  });

async function stateOf(id: string) {
  const [row] = await adminQuery("select view_state, view_key from evidence_files where id = $1", [id]);
  return row;
}

/** How long a picture is looked at before it is refused; null where it is taken. */
async function refusedAfterMs(bytes: Buffer): Promise<number | null> {
  const started = performance.now();
  return viewCopyOf(bytes).then(
    () => null,
    () => performance.now() - started,
  );
}

describe("a picture that is small in bytes and huge in pixels", () => {
  it.each([
    [16_000, 16_000],
    [30_000, 30_000],
    [65_000, 1000],
    [7072, 7072],
  ])("of %i x %i is refused before its pixels are touched, in under 100 ms", async (widthPx, heightPx) => {
    await viewCopyOf(await made.jpegPhoto());
    const bomb = made.whitePng(widthPx, heightPx);
    expect(bomb.length).toBeLessThan(LIMITS.photoBytes);
    // The best of three: another program of this machine may have had its turn.
    const times = [await refusedAfterMs(bomb), await refusedAfterMs(bomb), await refusedAfterMs(bomb)];
    expect(times).not.toContain(null);
    const ms = Math.min(...times.map(Number));
    process.stdout.write(
      `image bomb ${widthPx} x ${heightPx}: ${bomb.length} bytes, refused after ${ms.toFixed(1)} ms\n`,
    );
    expect(ms).toBeLessThan(100);
  });

  it("is taken up to 50 megapixels", async () => {
    expect(await refusedAfterMs(made.whitePng(7071, 7071))).toBeNull();
  });

  it("stays as evidence, is said to be unreadable, and the worker does the next one", async () => {
    const bomb = await uploaded(made.whitePng(16_000, 16_000));
    const photo = await uploaded(await made.jpegPhoto());
    await work();
    expect(await stateOf(bomb.id)).toEqual({ view_state: "unreadable", view_key: null });
    expect(await stateOf(photo.id)).toEqual({ view_state: "ready", view_key: viewKey(photo.sha256) });
    expect((await readAll(bomb.key, LIMITS.photoBytes)).equals(bomb.bytes)).toBe(true);
    expect(await keysIn(viewKey(bomb.sha256))).toEqual([]);
    expect(await adminQuery("select 1 from graphile_worker.jobs")).toEqual([]);
  });
});

describe("a photo that says where it was taken", () => {
  /** Lying on its side, as a phone writes it: 90 wide and 60 high, red on the left, to be turned by a quarter. */
  const fromPhone = () =>
    sharp({ create: { width: 90, height: 60, channels: 3, background: "#0000ff" } })
      .composite([
        {
          input: { create: { width: 45, height: 60, channels: 3, background: "#ff0000" } },
          left: 0,
          top: 0,
        },
      ])
      .withExif({
        IFD0: { Make: "Somebody", Orientation: "6", ImageDescription: "a private note" },
        IFD3: {
          GPSLatitudeRef: "N",
          GPSLatitude: "52/1 31/1 12/1",
          GPSLongitudeRef: "E",
          GPSLongitude: "13/1 24/1 0/1",
        },
      })
      .withIccProfile("p3")
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();

  it("gives a copy that stands upright and says nothing, and keeps the original byte for byte", async () => {
    const trailing = Buffer.from("<script>after the picture</script>");
    const photo = await uploaded(Buffer.concat([await fromPhone(), trailing]));
    const told = await sharp(photo.bytes).metadata();
    expect(told).toMatchObject({ orientation: 6, width: 90, height: 60 });
    for (const word of ["Exif", "Somebody", "private note", "<script>"])
      expect(photo.bytes.includes(word), word).toBe(true);
    await work();
    const copy = await readAll(viewKey(photo.sha256), LIMITS.photoBytes);
    const { exif, xmp, iptc, icc, orientation, width, height, format } = await sharp(copy).metadata();
    expect({ exif, xmp, iptc, icc, orientation, width, height, format }).toEqual({
      exif: undefined,
      xmp: undefined,
      iptc: undefined,
      icc: undefined,
      orientation: undefined,
      width: 60,
      height: 90,
      format: "jpeg",
    });
    for (const word of ["Exif", "GPS", "Somebody", "private note", "<script>"])
      expect(copy.includes(word), word).toBe(false);
    const [top, bottom] = await Promise.all(
      [10, 80].map((y) => sharp(copy).extract({ left: 30, top: y, width: 1, height: 1 }).raw().toBuffer()),
    );
    expect(Number(top?.[0])).toBeGreaterThan(200);
    expect(Number(bottom?.[2])).toBeGreaterThan(200);
    const kept = await readAll(photo.key, LIMITS.photoBytes);
    expect(kept.equals(photo.bytes)).toBe(true);
    expect(kept.includes(trailing)).toBe(true);
  });

  it("is made smaller to 1600 px on its longer edge, and never larger", async () => {
    expect(await viewCopyOf(await made.jpegPhoto(2400, 600))).toMatchObject({ widthPx: 1600, heightPx: 400 });
    expect(await viewCopyOf(await made.jpegPhoto(80, 20))).toMatchObject({ widthPx: 80, heightPx: 20 });
  });
});

describe("a decoder that is not needed", () => {
  it.each([
    ["SVG", () => Promise.resolve(made.SVG)],
    ["GIF", () => Promise.resolve(made.GIF)],
    ["AVIF", made.avifPhoto],
    ["TIFF", made.tiffPhoto],
    ["PDF", () => Promise.resolve(made.pdfFile())],
    ["HEIC", () => Promise.resolve(made.HEIC)],
    ["HTML", () => Promise.resolve(made.HTML)],
    ["a raw picture of the library's own", () => Promise.resolve(Buffer.from("b6a6f208", "hex"))],
  ])("is shut: %s is no picture", async (_name, make) => {
    expect(await refusedAfterMs(await make())).not.toBeNull();
  });

  it.each([made.jpegPhoto, made.pngPhoto, made.webpPhoto])(
    "while those that are needed work",
    async (make) => {
      expect((await viewCopyOf(await make())).jpeg.subarray(0, 2).toString("hex")).toBe("ffd8");
    },
  );
});

describe("a picture that is not whole", () => {
  it.each([
    ["cut off", async () => (await made.jpegPhoto(600, 400)).subarray(0, 20_000)],
    [
      "a beginning with mark-up behind it",
      () => Promise.resolve(Buffer.concat([Buffer.from("ffd8ffe0", "hex"), made.HTML])),
    ],
    ["a beginning alone", () => Promise.resolve(Buffer.from("89504e470d0a1a0a", "hex"))],
  ])("%s is kept and never shown", async (_said, make) => {
    const photo = await uploaded(await make());
    await work();
    expect(await stateOf(photo.id)).toEqual({ view_state: "unreadable", view_key: null });
    expect((await readAll(photo.key, LIMITS.photoBytes)).equals(photo.bytes)).toBe(true);
  });
});

describe("the task", () => {
  it("run twice has its effect once, and for a file that is gone none", async () => {
    const photo = await uploaded(await made.jpegPhoto());
    await adminQuery("select graphile_worker.add_job('viewCopy', $1::json)", [
      JSON.stringify({ evidenceId: photo.id }),
    ]);
    await adminQuery("select graphile_worker.add_job('viewCopy', $1::json)", [
      JSON.stringify({ evidenceId: "00000000-0000-4000-8000-000000000000" }),
    ]);
    await work();
    expect((await stateOf(photo.id))?.["view_state"]).toBe("ready");
    expect(await keysIn(viewKey(photo.sha256))).toHaveLength(1);
    expect(await adminQuery("select 1 from graphile_worker.jobs")).toEqual([]);
  });
});
