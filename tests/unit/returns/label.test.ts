import { PDFDocument } from "pdf-lib";
import { describe, expect, it } from "vitest";
import { dataMatrixModules } from "@/lib/documents/data-matrix";
import { mm } from "@/lib/documents/document";
import { makeReturnLabel, type LabelText } from "@/lib/returns/label-service";

const TEXT: LabelText = {
  title: "Return to Goods-in",
  number: "R512-408-337",
  code: "R512408337/41073826",
  claim: "Claim 4107-3826",
  toHead: "To",
  to: "Nordlicht Teile, Łódź Straße 3\nHalle 4",
  by: "Send by 15 December 2026",
  fromHead: "From",
  from: "Harbour Mobility",
  note: "Send it warm-tested, with its leads.",
};
const made = (size: "a4" | "roll", over: Partial<LabelText> = {}) =>
  makeReturnLabel({ ...TEXT, ...over }, { size, locale: "en", madeAt: new Date("2026-12-01T10:00:00Z") });

describe("a return label", () => {
  it("is the same bytes from the same words", async () => {
    expect(Buffer.from(await made("a4")).equals(Buffer.from(await made("a4")))).toBe(true);
    expect(Buffer.from(await made("a4")).equals(Buffer.from(await made("a4", { note: "Other." })))).toBe(
      false,
    );
  });

  it("is one page: a sheet of A4, or a strip 62 mm wide and as long as what stands on it", async () => {
    const sheet = await PDFDocument.load(await made("a4"), { updateMetadata: false });
    expect(sheet.getPageCount()).toBe(1);
    expect(sheet.getPage(0).getWidth()).toBeCloseTo(mm(210));
    expect(sheet.getTitle()).toBe("Return to Goods-in R512-408-337");
    const lengthOf = async (note: string) => {
      const page = (await PDFDocument.load(await made("roll", { note }))).getPage(0);
      expect(page.getWidth()).toBeCloseTo(mm(62));
      return page.getHeight();
    };
    expect(await lengthOf("Long words about how to pack it. ".repeat(9))).toBeGreaterThan(
      await lengthOf("Short."),
    );
  });

  it("stands on embedded fonts cut to the letters in use", async () => {
    const text = Buffer.from(await made("roll")).toString("latin1");
    expect(text).toMatch(/FontFile2/);
    expect(text.length).toBeLessThan(60_000);
  });

  // ISO/IEC 16022 (from memory): the left and lower edge of a symbol are solid, the two others alternate.
  it("carries a Data Matrix with the finder pattern of ECC 200", () => {
    const { dark, across, down } = dataMatrixModules(TEXT.code);
    const at = (row: number, column: number) => dark[row * across + column];
    for (let row = 0; row < down; row += 1) expect(at(row, 0)).toBe(true);
    for (let column = 0; column < across; column += 1) {
      expect(at(down - 1, column)).toBe(true);
      expect(at(0, column)).toBe(column % 2 === 0);
    }
  });
});
