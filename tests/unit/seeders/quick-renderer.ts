import { createHash } from "node:crypto";
import type { PhotoRenderer } from "@/seeders/evidence/photo/render";

/** Stands in for the renderer where a test is about the story and not about pictures: the scene itself is the photo. */
export const quickRenderer: PhotoRenderer = async (scene, takenAt) => {
  const original = Buffer.from(JSON.stringify([scene, takenAt]));
  const sha256 = createHash("sha256").update(original).digest("hex");
  return { original, view: Buffer.from("view"), sha256, widthPx: 1200, heightPx: 900 };
};
