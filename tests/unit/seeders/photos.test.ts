import sharp from "sharp";
import { beforeAll, describe, expect, it } from "vitest";
import { FAMILY_CODES } from "@/lib/parts/families";
import { photoRenderer, type PhotoRenderer } from "@/seeders/evidence/photo/render";
import { sceneSvg, type PhotoScene } from "@/seeders/evidence/photo/scene";

const LABEL = {
  maker: "Ostrand",
  partNumber: "LMB-2410",
  rating: "24 V DC",
  serial: "R2614-0RBIM",
  batch: "R2614",
};
const scene = (changes: Partial<PhotoScene> = {}): PhotoScene => ({
  key: "one",
  family: "brake",
  view: "label",
  label: LABEL,
  reading: { value: "24.1", unit: "V" },
  marked: false,
  size: "full",
  ...changes,
});
const TAKEN_AT = new Date("2026-11-03T10:00:00Z");

let render: PhotoRenderer;
beforeAll(async () => {
  render = await photoRenderer();
}, 60_000);

describe("the photos of the story", () => {
  it("are the same to the byte for the same scene, whichever renderer makes them", async () => {
    const [first, again] = [
      await render(scene(), TAKEN_AT),
      await (await photoRenderer())(scene(), TAKEN_AT),
    ];
    expect(again.sha256).toBe(first.sha256);
    expect(again.view.equals(first.view)).toBe(true);
  });

  it("differ from claim to claim, even of the same part", async () => {
    const [first, second] = [await render(scene(), TAKEN_AT), await render(scene({ key: "two" }), TAKEN_AT)];
    expect(second.sha256).not.toBe(first.sha256);
  });

  it("are small pictures of 1200 by 900 with the camera's day in them, which the view copy leaves out", async () => {
    const { original, view } = await render(scene(), TAKEN_AT);
    expect(await sharp(original).metadata()).toMatchObject({ format: "jpeg", width: 1200, height: 900 });
    expect((await sharp(original).metadata()).exif?.toString("latin1")).toContain("2026:11:03 10:00:00");
    expect((await sharp(view).metadata()).exif).toBeUndefined();
    expect(original.length).toBeLessThan(400_000);
  });

  it("are smaller for the many claims nobody looks at closely, and no two the same", async () => {
    const small = await Promise.all(
      ["one", "two"].map((key) => render(scene({ key, size: "small" }), TAKEN_AT)),
    );
    expect(small.map(({ widthPx, heightPx }) => [widthPx, heightPx])).toEqual([
      [480, 360],
      [480, 360],
    ]);
    expect(new Set(small.map(({ sha256 }) => sha256)).size).toBe(2);
  });

  it.each(FAMILY_CODES)("show a %s from every side without a face of the machine's own", (family) => {
    for (const view of ["label", "part", "close", "meter"] as const) {
      const svg = sceneSvg(scene({ family, view }));
      expect(svg).not.toContain("<text");
      expect(svg).not.toMatch(/NaN|undefined/);
    }
  });
});
