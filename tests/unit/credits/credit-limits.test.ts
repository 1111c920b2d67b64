import { describe, expect, it } from "vitest";
import { creditFor } from "@/lib/credits/credit";
import { fraction } from "@/lib/kernel/fraction";
import { halved, inputWith, invoiced, lineWith, lost, nets, one, ruled } from "./inputs";

describe("the claim cap", () => {
  const part = (lineNumber: number, minor: bigint) =>
    lineWith({
      lineNumber,
      monthsUsed: 0,
      invoice: invoiced({ lineNumber, unitPriceMinor: minor, lineNetMinor: minor }),
    });

  // Largest remainder, computed by hand: 16.55 over 112.35, 218.33, 19.99 gives 5.30, 10.31, 0.94.
  it("is shared out by largest remainder over the lines", () => {
    const lines = [part(1, 112_35n), part(2, 218_33n), part(3, 19_99n)];
    const credit = creditFor(inputWith(lines, { claimCapMinor: 16_55n }));
    expect(credit.lines.map(({ netMinor }) => netMinor)).toEqual([5_30n, 10_31n, 94n]);
  });

  it("gives a tie to the earlier line, whatever order the lines come in", () => {
    const lines = [part(3, 50_00n), part(1, 50_00n), part(2, 50_00n)];
    const credit = creditFor(inputWith(lines, { claimCapMinor: 100_00n }));
    expect(credit.lines.map(({ lineNumber, netMinor }) => [lineNumber, netMinor])).toEqual([
      [1, 33_34n],
      [2, 33_33n],
      [3, 33_33n],
    ]);
  });

  it("holds for what is paid after attribution, and for labour too", () => {
    const credit = one({ ...halved, monthsUsed: 0, labourAskedMinutes: 45 }, { claimCapMinor: 127_16n });
    // 218.33 / 2 = 109.165 -> 109.17, 36.00 / 2 = 18.00: together 127.17, one penny too much.
    expect(nets(credit)).toEqual([
      ["part", 109_16n],
      ["labour", 18_00n],
    ]);
    expect(one({ ...halved, monthsUsed: 0 }, { claimCapMinor: 109_17n }).lines[0]?.steps.at(-1)?.rule).toBe(
      "attribution",
    );
  });

  it("of nothing gives nothing", () => {
    expect(one({}, { claimCapMinor: 0n }).totalMinor).toBe(0n);
  });
});

describe("the original invoice line", () => {
  it("is never given back more than once over all notes", () => {
    const invoice = invoiced({ alreadyCreditedMinor: 100_00n });
    const credit = one({ invoice, monthsUsed: 0 });
    expect(credit.netMinor).toBe(118_33n);
    expect(credit.lines[0]?.steps.at(-1)).toMatchObject({
      rule: "invoiceLimit",
      input: { amount: "218.33 GBP", lineAmount: "218.33 GBP", creditedAmount: "100.00 GBP" },
    });
  });

  it("is shared by the lines of this claim, the earlier one first", () => {
    const invoice = invoiced({ lineNetMinor: 300_00n });
    const lines = [1, 2].map((lineNumber) => lineWith({ lineNumber, invoice, monthsUsed: 0 }));
    const credit = creditFor(inputWith(lines));
    expect(credit.lines.map(({ netMinor }) => netMinor)).toEqual([218_33n, 81_67n]);
  });

  // Computed by hand: the cap gives 50.00 each, then 20.00 are left of the first invoice line. The other way round it
  // would be 16.67 and 83.33.
  it("comes after the claim cap: what it takes there is not given elsewhere", () => {
    const on = (lineNumber: number, alreadyCreditedMinor: bigint) =>
      lineWith({
        lineNumber,
        monthsUsed: 0,
        invoice: invoiced({
          lineNumber,
          unitPriceMinor: 100_00n,
          lineNetMinor: 100_00n,
          alreadyCreditedMinor,
        }),
      });
    const credit = creditFor(inputWith([on(1, 80_00n), on(2, 0n)], { claimCapMinor: 100_00n }));
    expect(credit.lines.map(({ netMinor }) => netMinor)).toEqual([20_00n, 50_00n]);
  });

  it("counts with its rebates: the net of the line is the most, not price by pieces", () => {
    expect(one({ invoice: invoiced({ lineNetMinor: 200_00n }), monthsUsed: 0 }).netMinor).toBe(200_00n);
  });

  it("gives nothing more where more than all of it was given back already", () => {
    expect(one({ invoice: invoiced({ alreadyCreditedMinor: 300_00n }) }).netMinor).toBe(0n);
  });
});

describe("a price without its invoice", () => {
  it("is credited as it was typed, with its reason in the first step", () => {
    const typedPrice = {
      unitPriceMinor: 90_00n,
      reason: "List of March 2026",
      taxCategory: "S",
      taxRate: "20",
      exemptionReason: null,
    } as const;
    const credit = one({ invoice: null, typedPrice });
    expect(credit.netMinor).toBe(60_00n);
    expect(credit.lines[0]?.steps[0]).toMatchObject({
      rule: "partPriceTyped",
      input: { reason: "List of March 2026" },
    });
    expect(credit.lines[0]?.invoice).toBeNull();
  });

  it("is not guessed where nobody knows it, and nothing goes on the note without a tax of its own", () => {
    const credit = one({
      invoice: null,
      typedPrice: null,
      carriageAskedMinor: 8_00n,
      labourAskedMinutes: 45,
    });
    expect(nets(credit)).toEqual([
      ["part", 0n],
      ["labour", 36_00n],
      ["carriage", 0n],
    ]);
    expect(lost(credit)).toEqual([
      ["priceUnknown", 0n, 0n],
      ["priceUnknown", 8_00n, 0n],
    ]);
  });
});

describe("handling", () => {
  const lines = [
    lineWith({
      monthsUsed: 0,
      invoice: invoiced({ lineNumber: 1, unitPriceMinor: 326_63n, lineNetMinor: 326_63n }),
    }),
    lineWith({
      lineNumber: 2,
      monthsUsed: 0,
      invoice: invoiced({ lineNumber: 2, unitPriceMinor: 19_99n, lineNetMinor: 19_99n, taxRate: "5.000" }),
    }),
  ];
  const handling = { amountMinor: 20_00n, reason: "Handling of a part without a fault" };

  it("is an allowance on the document, shared over the tax groups by their base", () => {
    const credit = creditFor(inputWith(lines, { handling }));
    // 20.00 x 326.63 / 346.62 = 18.8466, 20.00 x 19.99 / 346.62 = 1.1534.
    expect(credit.allowances.map(({ taxRate, amountMinor }) => [taxRate, amountMinor])).toEqual([
      ["20.000", 18_85n],
      ["5.000", 1_15n],
    ]);
    // Bases 307.78 and 18.84: tax 61.556 -> 61.56 and 0.942 -> 0.94.
    expect([credit.netMinor, credit.taxMinor, credit.totalMinor]).toEqual([326_62n, 62_50n, 389_12n]);
    expect(credit.separateCharge).toBeNull();
  });

  it("is charged apart, whole, where it would exceed the credit", () => {
    const credit = creditFor(inputWith(lines, { handling: { ...handling, amountMinor: 346_63n } }));
    expect(credit.separateCharge).toEqual({ ...handling, amountMinor: 346_63n });
    expect([credit.allowances, credit.netMinor]).toEqual([[], 346_62n]);
  });

  it("may take all of the credit", () => {
    const credit = creditFor(inputWith(lines, { handling: { ...handling, amountMinor: 346_62n } }));
    expect([credit.netMinor, credit.taxMinor, credit.separateCharge]).toEqual([0n, 0n, null]);
  });
});

describe("tax", () => {
  it("bears category, rate and exemption reason of the original line", () => {
    const invoice = invoiced({ taxCategory: "AE", taxRate: "0.000", exemptionReason: "Reverse charge" });
    const { taxGroups, lines } = one({ invoice });
    expect(taxGroups).toEqual([
      {
        taxCategory: "AE",
        taxRate: "0.000",
        exemptionReason: "Reverse charge",
        baseMinor: 145_55n,
        taxMinor: 0n,
      },
    ]);
    expect(lines[0]).toMatchObject({ taxCategory: "AE", exemptionReason: "Reverse charge" });
  });
});

describe("currencies", () => {
  it("are never converted: labour and caps in another one give nothing, and say so", () => {
    const credit = one({ labourAskedMinutes: 45, carriageAskedMinor: 8_00n }, { currency: "EUR" });
    expect(nets(credit)).toEqual([
      ["part", 145_55n],
      ["labour", 0n],
      ["carriage", 0n],
    ]);
    expect(lost(credit).slice(1)).toEqual([
      ["currencyDiffers", 0n, 0n],
      ["currencyDiffers", 8_00n, 0n],
    ]);
  });

  it("without minor units are reckoned whole", () => {
    const credit = one(
      { invoice: invoiced({ unitPriceMinor: 21_833n, lineNetMinor: 21_833n }) },
      { currency: "JPY" },
    );
    expect(ruled(credit).at(-1)).toEqual(["coverAmount", "14555 JPY"]);
  });
});

it("refuses what cannot be", () => {
  expect(() => one({ carriageAskedMinor: -1n })).toThrow(RangeError);
  expect(() => one({ quantity: 0 })).toThrow(RangeError);
  expect(() => one({ attribution: { shares: {}, creditedShare: fraction(3, 2) } })).toThrow(RangeError);
  expect(() => one({}, { claimCapMinor: -1n })).toThrow(RangeError);
  expect(() => one({}, { handling: { amountMinor: -1n, reason: "x" } })).toThrow(RangeError);
});
