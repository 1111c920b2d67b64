import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addFractions,
  approximate,
  compareFractions,
  equalFractions,
  fraction,
  fractionFrom,
  multiplyFractions,
  ONE,
  parseFraction,
  printFraction,
  subtractFractions,
  sumsToOne,
  ZERO,
} from "@/lib/kernel/fraction";

const anyInteger = fc.bigInt({ min: -(10n ** 12n), max: 10n ** 12n });
const anyFraction = fc
  .tuple(
    anyInteger,
    anyInteger.filter((d) => d !== 0n),
  )
  .map(([n, d]) => fraction(n, d));

describe("an exact fraction", () => {
  it("is kept in lowest terms with the sign above", () => {
    expect(fraction(14, 48)).toEqual({ numerator: 7n, denominator: 24n });
    expect(fraction(3n, -6n)).toEqual({ numerator: -1n, denominator: 2n });
    expect(fraction(0, -5)).toEqual(ZERO);
  });

  it("has a denominator and whole numbers", () => {
    expect(() => fraction(1, 0)).toThrow(RangeError);
    expect(() => fraction(0.5)).toThrow(RangeError);
  });

  it("adds, takes away and multiplies exactly where floating point does not", () => {
    expect(addFractions(fraction(1, 10), fraction(2, 10))).toEqual(fraction(3, 10));
    expect(multiplyFractions(fraction(2, 3), fraction(3, 4))).toEqual(fraction(1, 2));
    fc.assert(
      fc.property(anyFraction, anyFraction, (a, b) => {
        expect(subtractFractions(addFractions(a, b), b)).toEqual(a);
        expect(compareFractions(a, b)).toBe(0 - compareFractions(b, a));
        expect(multiplyFractions(a, b)).toEqual(multiplyFractions(b, a));
      }),
    );
  });

  it("compares by value", () => {
    expect(compareFractions(fraction(1, 3), fraction(33, 100))).toBe(1);
    expect(equalFractions(fraction(2, 4), fraction(1, 2))).toBe(true);
  });

  it("knows shares that are complete: thirds are, 0.33 three times is not", () => {
    expect(sumsToOne([fraction(1, 3), fraction(1, 3), fraction(1, 3)])).toBe(true);
    expect(sumsToOne([fraction(33, 100), fraction(33, 100), fraction(33, 100)])).toBe(false);
    expect(sumsToOne([ONE])).toBe(true);
    expect(sumsToOne([])).toBe(false);
  });

  it.each([
    ["7/24", fraction(7, 24)],
    ["20.000", fraction(20)],
    ["0.5", fraction(1, 2)],
    ["-0.5", fraction(-1, 2)],
    ["0", ZERO],
    ["2/4", fraction(1, 2)],
  ])("reads %s", (text, value) => {
    expect(parseFraction(text)).toEqual(value);
    expect(fractionFrom(text)).toEqual(value);
  });

  it.each(["", "1/0", "0,5", "1/2/3", "1e3", ".5", "5.", " 1", "NaN", "1/-2", "9".repeat(40)])(
    "does not read %j",
    (text) => {
      expect(parseFraction(text)).toBeNull();
      expect(() => fractionFrom(text)).toThrow(RangeError);
    },
  );

  it("is printed as it is read", () => {
    expect(printFraction(fraction(17, 24))).toBe("17/24");
    expect(printFraction(fraction(4, 2))).toBe("2");
    fc.assert(
      fc.property(anyFraction, (value) => {
        expect(parseFraction(printFraction(value))).toEqual(value);
      }),
    );
  });

  it("gives a floating-point number for drawing only", () => {
    expect(approximate(fraction(1, 4))).toBe(0.25);
  });
});
