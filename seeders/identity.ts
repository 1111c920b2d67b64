import { createHash } from "node:crypto";

/** The id of a thing of the story, from its kind and its name: the same in every seeding (RFC 9562, version 8). */
export function idOf(kind: string, ...name: readonly (string | number)[]): string {
  const hex = createHash("sha256")
    .update(`${kind}:${name.join(":")}`)
    .digest("hex");
  const variant = ((Number.parseInt(hex.slice(16, 17), 16) & 3) | 8).toString(16);
  return [
    hex.slice(0, 8),
    hex.slice(8, 12),
    `8${hex.slice(13, 16)}`,
    variant + hex.slice(17, 20),
    hex.slice(20, 32),
  ].join("-");
}
