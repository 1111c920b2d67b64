import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { mod11And10CheckDigit } from "@/lib/labels/check-digit";
import {
  labelCode,
  normaliseReturnNumber,
  printReturnNumber,
  readLabelCode,
  RETURN_NUMBERS,
  returnNumberFrom,
} from "@/lib/returns/number";
import { meaningsOf } from "@/lib/returns/scan-anything";

const TODAY = calendarDay("2026-12-01");
const numbers = fc.integer({ min: 0, max: RETURN_NUMBERS - 1 }).map(returnNumberFrom);

describe("a return number", () => {
  // ISO/IEC 7064 MOD 11,10, the standard's worked value 0794 -> 5 (from memory), as for claim numbers.
  it("ends in the check digit of ISO/IEC 7064 MOD 11,10", () => {
    expect(mod11And10CheckDigit("0794")).toBe("5");
    fc.assert(
      fc.property(numbers, (number) => {
        expect(number).toMatch(/^\d{9}$/);
        expect(mod11And10CheckDigit(number.slice(0, 8))).toBe(number.slice(8));
      }),
    );
  });

  it("is read back from every way it is written, and from no other way with one digit wrong", () => {
    fc.assert(
      fc.property(numbers, fc.nat(8), fc.integer({ min: 1, max: 9 }), (number, place, more) => {
        const printed = printReturnNumber(number);
        expect(printed).toMatch(/^R\d{3}-\d{3}-\d{3}$/);
        for (const text of [
          number,
          printed,
          printed.toLowerCase(),
          printed.replaceAll("-", " "),
          ` ${number} `,
        ])
          expect(normaliseReturnNumber(text)).toBe(number);
        const wrong = String((Number(number[place]) + more) % 10);
        expect(normaliseReturnNumber(number.slice(0, place) + wrong + number.slice(place + 1))).toBeNull();
      }),
    );
  });

  it("is not made outside its eight digits", () => {
    for (const random of [-1, RETURN_NUMBERS, 1.5, Number.NaN])
      expect(() => returnNumberFrom(random)).toThrow(RangeError);
  });
});

describe("what is scanned at goods-in", () => {
  it("is the return first where it is the code of a label", () => {
    const number = returnNumberFrom(51_240_833);
    const code = labelCode(number, "4107-3820");
    expect(code).toBe(`R${number}/41073820`);
    expect(readLabelCode(code)).toEqual({ returnNumber: number, claimNumber: "41073820" });
    expect(meaningsOf(code, TODAY)[0]).toEqual({ means: "return", number });
    expect(readLabelCode(code.replace("3820", "3821"))).toBeNull();
  });

  it("is a number of ours only where its check digit is right, and a serial all the same", () => {
    const number = returnNumberFrom(51_240_833);
    expect(meaningsOf(number, TODAY).map(({ means }) => means)).toEqual(["return", "serial"]);
    expect(meaningsOf("4107-3820", TODAY).map(({ means }) => means)).toEqual(["claim", "serial"]);
    expect(meaningsOf("4107-3821", TODAY).map(({ means }) => means)).toEqual(["serial"]);
    expect(meaningsOf("   ", TODAY)).toEqual([]);
  });

  it("is the serial inside a GS1 label, in its normal form", () => {
    expect(meaningsOf("(01)04012345000009(21)br-20417", TODAY)).toEqual([
      { means: "serial", serialNormal: "BR20417" },
    ]);
  });
});
