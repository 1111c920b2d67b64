import { describe, expect, it } from "vitest";
import { amountText, readableCreditValues, readAmountText } from "@/lib/credits/amount-text";
import { CURRENCIES, minorDigits } from "@/lib/kernel/currency";
import { money } from "@/lib/kernel/money";

describe("minor units", () => {
  const withDigits = (digits: number) => CURRENCIES.filter((code) => minorDigits(code) === digits).join(" ");

  // npm currency-codes 2.2.0, list dated 2024-06-25.
  it("are those of ISO 4217: the currencies with none, three and four decimals, all others two", () => {
    expect(withDigits(0)).toBe("BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XOF XPF");
    expect(withDigits(3)).toBe("BHD IQD JOD KWD LYD OMR TND");
    expect(withDigits(4)).toBe("CLF UYW");
  });

  it("are two where the format library shows none", () => {
    for (const code of ["AFN", "ALL", "COP", "HUF", "IDR", "IRR", "LBP", "MGA", "PKR", "SYP", "YER"] as const)
      expect(minorDigits(code)).toBe(2);
  });
});

describe("floating point", () => {
  // Measured on Node 20.20.2: why money here is whole minor units, and rounding a rule of our own.
  it("loses a cent of 1.005 and rounds minus two and a half up", () => {
    expect((1.005).toFixed(2)).toBe("1.00");
    expect(Math.round(-2.5)).toBe(-2);
    expect(0.1 + 0.2).not.toBe(0.3);
  });
});

describe("an amount in a step", () => {
  it("is the same text in every language, and is read back", () => {
    expect(amountText(145_55n, "GBP")).toBe("145.55 GBP");
    expect(amountText(-5n, "EUR")).toBe("-0.05 EUR");
    expect(amountText(14555n, "JPY")).toBe("14555 JPY");
    expect(readAmountText("145.55 GBP")).toEqual(money(145_55n, "GBP"));
    expect(readAmountText("-0.05 EUR")).toEqual(money(-5n, "EUR"));
  });

  it.each([
    "145.55",
    "2/3",
    "145.55 XXX",
    "145,55 GBP",
    "1.555 GBP",
    "Rule 4, 1 January 2025",
    "12 GBP more",
    "",
  ])("is not read into %j", (text) => {
    expect(readAmountText(text)).toBeNull();
  });

  it("is written as people of a language write it, and nothing else is touched", () => {
    const values = { amount: "1145.55 EUR", fraction: "2/3", minutes: 45, on: "2026-05-03" };
    expect(readableCreditValues(values, "de")).toEqual({
      amount: "1.145,55\u00a0€",
      fraction: "2/3",
      minutes: 45,
      on: "3. Mai 2026",
    });
    expect(readableCreditValues({ amount: "145.55 GBP" }, "en").amount).toBe("£145.55");
  });
});
