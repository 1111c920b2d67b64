import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  claimNumberFrom,
  gs1CheckDigit,
  hasGs1CheckDigit,
  isClaimNumber,
  mod11And10CheckDigit,
  normaliseClaimNumber,
} from "@/lib/labels/check-digit";

const anyNumber = fc.integer({ min: 0, max: 9_999_999 });
const digitsOf = (claimNumber: string) => claimNumber.replace("-", "");

describe("the check digit of a claim number", () => {
  // ISO/IEC 7064, hybrid system MOD 11,10: the standard's own worked value, from memory.
  it("is 5 for 0794", () => {
    expect(mod11And10CheckDigit("0794")).toBe("5");
  });

  // The same system guards the German tax identification number; 86095742719 is a published sample, from memory.
  it("is 9 for 8609574271", () => {
    expect(mod11And10CheckDigit("8609574271")).toBe("9");
  });

  it("finds every single wrong digit", () => {
    fc.assert(
      fc.property(anyNumber, fc.nat(7), fc.integer({ min: 1, max: 9 }), (random7, place, change) => {
        const digits = digitsOf(claimNumberFrom(random7));
        const wrong = (Number(digits[place]) + change) % 10;
        expect(normaliseClaimNumber(digits.slice(0, place) + wrong + digits.slice(place + 1))).toBeNull();
      }),
      { numRuns: 2000 },
    );
  });

  it("finds more than 97 of 100 swaps of neighbouring digits: measured over every 4999th number", () => {
    let [swaps, found] = [0, 0];
    for (let random7 = 0; random7 < 10_000_000; random7 += 4999) {
      const digits = digitsOf(claimNumberFrom(random7));
      for (let place = 0; place < 7; place += 1) {
        const [left = "", right = ""] = digits.slice(place, place + 2);
        if (left === right) continue;
        swaps += 1;
        if (normaliseClaimNumber(digits.slice(0, place) + right + left + digits.slice(place + 2)) === null)
          found += 1;
      }
    }
    expect(swaps).toBeGreaterThan(10_000);
    expect(found / swaps).toBeGreaterThan(0.97);
  });
});

describe("a claim number", () => {
  it("is eight digits in two groups", () => {
    expect(claimNumberFrom(4_107_382)).toBe("4107-3820");
    expect(claimNumberFrom(0)).toMatch(/^0000-000\d$/);
    fc.assert(
      fc.property(anyNumber, (random7) => {
        expect(isClaimNumber(claimNumberFrom(random7))).toBe(true);
      }),
    );
  });

  it.each(["41073820", " 4107 3820 ", "4107–3820", "4107-3820", "４１０７-３８２０"])(
    "is read from %j",
    (text) => {
      expect(normaliseClaimNumber(text)).toBe("4107-3820");
    },
  );

  it.each(["4107-3826", "4107-382", "4107-38200", "4107-382O", "", "claim 4107-3820"])(
    "is not read from %j",
    (text) => {
      expect(normaliseClaimNumber(text)).toBeNull();
      expect(isClaimNumber(text)).toBe(false);
    },
  );

  it("is printed in one form only", () => {
    expect(isClaimNumber("41073820")).toBe(false);
  });

  it.each([-1, 10_000_000, 1.5, NaN])("is never made from %d", (random7) => {
    expect(() => claimNumberFrom(random7)).toThrow(RangeError);
  });
});

describe("the check digit of a GS1 number", () => {
  // 6291041500213: textbook number of GS1, from memory. 614141210220 and 1014541210223: a page of the former US
  // article-numbering body. 5012345678900: sheet of GS1 UK.
  it.each([
    ["629104150021", "3"],
    ["61414121022", "0"],
    ["501234567890", "0"],
    ["101454121022", "3"],
    ["0950600013435", "2"],
  ])("of %s is %s", (body, digit) => {
    expect(gs1CheckDigit(body)).toBe(digit);
  });

  // GS1 Barcode Syntax Dictionary, 2026-01-27: test vectors of its check-digit linter.
  it.each(["02345673", "416000336108", "1234567890128", "12345678901231", "123456789012345675"])(
    "is right in %s",
    (number) => {
      expect(hasGs1CheckDigit(number)).toBe(true);
    },
  );
  it.each([
    "12345673",
    "416000336109",
    "1234567890129",
    "12345678901232",
    "123456789012345670",
    "",
    "7",
    "0234567X",
  ])("is wrong in %j", (number) => {
    expect(hasGs1CheckDigit(number)).toBe(false);
  });

  it("is made of digits", () => {
    expect(() => gs1CheckDigit("12A")).toThrow(RangeError);
    expect(() => mod11And10CheckDigit("")).toThrow(RangeError);
  });
});
