import { describe, expect, it } from "vitest";
import fc from "fast-check";
import { storableText } from "@/lib/kernel/storable-text";

describe("a text to be kept", () => {
  it("loses the NUL and shows half a character as the replacement sign", () => {
    expect(storableText("a\u0000b\ud83dc")).toBe("ab\ufffdc");
  });

  it("stays as it was typed where it is whole", () => {
    fc.assert(
      fc.property(fc.string({ unit: "grapheme" }), (text) => {
        fc.pre(!text.includes("\u0000"));
        expect(storableText(text)).toBe(text);
      }),
    );
  });
});
