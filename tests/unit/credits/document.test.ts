import fc from "fast-check";
import { describe, expect, it, vi } from "vitest";
import {
  documentTotals,
  lineNetMinor,
  reversedContent,
  splitGross,
  type DocumentContent,
  type TaxedAmount,
} from "@/lib/credits/document";
import { fraction, fractionFrom } from "@/lib/kernel/fraction";
import { roundHalfAwayFromZero, roundHalfEven } from "@/lib/kernel/money";
import { anyContent, anyRounding, halfUpOf, turned } from "./arbitraries";

// Many thousand cases each: seconds on a machine at rest, more on a busy one.
vi.setConfig({ testTimeout: 180_000 });

const at = (taxRate: string, netMinor: bigint): TaxedAmount => ({
  taxCategory: taxRate === "0" ? "Z" : "S",
  taxRate,
  exemptionReason: null,
  netMinor,
});
const totals = (content: DocumentContent) => documentTotals(content, roundHalfAwayFromZero);
const taxes = ({ taxGroups }: ReturnType<typeof totals>) =>
  taxGroups.map(({ taxRate, baseMinor, taxMinor }) => [taxRate, baseMinor, taxMinor]);

describe("totals of a document", () => {
  // EN 16931 validation artefacts, example 2 (NOK).
  it("are those of published example 2: 365.28 of tax, 801.78 due", () => {
    const example = totals({
      lines: [at("25", 1273_00n), at("15", -3_96n), at("15", 4_96n), at("0", -25_00n), at("25", 187_50n)],
      allowances: [at("25", 100_00n)],
      charges: [at("25", 100_00n)],
      paidMinor: 1000_00n,
    });
    expect(example).toMatchObject({
      linesMinor: 1436_50n,
      allowancesMinor: 100_00n,
      chargesMinor: 100_00n,
      netMinor: 1436_50n,
      taxMinor: 365_28n,
      totalMinor: 1801_78n,
      dueMinor: 801_78n,
    });
    expect(taxes(example)).toEqual([
      ["25", 1460_50n, 365_13n],
      ["15", 1_00n, 15n],
      ["0", -25_00n, 0n],
    ]);
  });

  // EN 16931 validation artefacts, example 5 (DKK): its bases, tax, total and half of it paid.
  it("are those of published example 5: 4675.00, of which 2337.50 is due", () => {
    const example = totals({ lines: [at("25", 1500_00n), at("12", 2500_00n)], paidMinor: 2337_50n });
    expect(example).toMatchObject({ taxMinor: 675_00n, totalMinor: 4675_00n, dueMinor: 2337_50n });
    expect(taxes(example)).toEqual([
      ["25", 1500_00n, 375_00n],
      ["12", 2500_00n, 300_00n],
    ]);
  });

  // Peppol BIS Billing 3, sample base-creditnote-correction (EUR).
  it("are those of a published credit note with a charge: 1656.25", () => {
    const note = totals({ lines: [at("25", 2800_00n), at("25", -1500_00n)], charges: [at("25", 25_00n)] });
    expect(note).toMatchObject({
      linesMinor: 1300_00n,
      netMinor: 1325_00n,
      taxMinor: 331_25n,
      dueMinor: 1656_25n,
    });
  });

  // EN 16931 validation artefacts, ubl-tc434-creditnote1.
  it("are those of a published credit note without tax: 100.11", () => {
    const exempt = { taxCategory: "E", taxRate: "0", exemptionReason: "Exempt", netMinor: 100_11n } as const;
    const note = totals({ lines: [exempt] });
    expect(note).toMatchObject({ taxMinor: 0n, dueMinor: 100_11n });
    expect(note.taxGroups).toMatchObject([{ taxCategory: "E", exemptionReason: "Exempt" }]);
  });

  // A credit note of our own, checked with the official rules: no finding under 1.3.14.1 and 1.3.16.
  it("are those of the worked credit note: 412.95", () => {
    const piece = (priceMinor: string, quantity: number) =>
      lineNetMinor(
        { priceMinor: fractionFrom(priceMinor), quantity: fraction(quantity) },
        roundHalfAwayFromZero,
      );
    const lines = [at("20", piece("3745", 3)), at("20", piece("21833", 1)), at("5", piece("999.5", 2))];
    expect(lines.map(({ netMinor }) => netMinor)).toEqual([112_35n, 218_33n, 19_99n]);
    const note = totals({ lines, charges: [at("20", 12_50n)], allowances: [at("20", 16_55n)] });
    expect(note).toMatchObject({
      linesMinor: 350_67n,
      netMinor: 346_62n,
      taxMinor: 66_33n,
      totalMinor: 412_95n,
      dueMinor: 412_95n,
    });
    expect(taxes(note)).toEqual([
      ["20", 326_63n, 65_33n],
      ["5", 19_99n, 1_00n],
    ]);
  });

  // Computed by hand from BR-CO-17: the group's base is taxed, never the line.
  it("tax the document, not the line: 3.16 where lines would give 3.20, 0.64 where they would give 0.63", () => {
    const eleven = [...Array.from({ length: 10 }, () => at("20", 33n)), at("20", 12_49n)];
    expect(totals({ lines: eleven })).toMatchObject({ netMinor: 15_79n, taxMinor: 3_16n });
    const byLine = eleven.reduce((so, line) => so + totals({ lines: [line] }).taxMinor, 0n);
    expect(byLine).toBe(3_20n);

    const three = [1, 2, 3].map(() => at("19", 1_13n));
    expect(totals({ lines: three }).taxMinor).toBe(64n);
    expect(three.reduce((so, line) => so + totals({ lines: [line] }).taxMinor, 0n)).toBe(63n);
  });

  it("keep one group for each category and rate, however the rate is written", () => {
    const zero = (taxCategory: "E" | "Z", exemptionReason: string | null) =>
      ({ taxCategory, taxRate: "0", exemptionReason, netMinor: 1_00n }) as const;
    const note = totals({
      lines: [
        at("5", 1_00n),
        at("20", 1_00n),
        at("20.000", 1_00n),
        zero("E", "A"),
        zero("E", "B"),
        zero("Z", null),
      ],
    });
    expect(
      note.taxGroups.map(({ taxCategory, taxRate, baseMinor }) => [taxCategory, taxRate, baseMinor]),
    ).toEqual([
      ["S", "20", 2_00n],
      ["S", "5", 1_00n],
      ["Z", "0", 1_00n],
      ["E", "0", 2_00n],
    ]);
    expect(note.taxGroups.at(-1)?.exemptionReason).toBe("A; B");
  });

  it("add the rounding amount to what is due", () => {
    expect(totals({ lines: [at("20", 10_01n)], roundingMinor: -1n })).toMatchObject({
      totalMinor: 12_01n,
      dueMinor: 12_00n,
    });
  });
});

describe("a line", () => {
  it("is priced by its base quantity, rounded once, its own charges and allowances apart", () => {
    const line = { priceMinor: fraction(100_00), priceFor: fraction(3), quantity: fraction(2) };
    expect(lineNetMinor(line, roundHalfAwayFromZero)).toBe(66_67n);
    expect(lineNetMinor({ ...line, chargesMinor: 1_00n, allowancesMinor: 67n }, roundHalfAwayFromZero)).toBe(
      67_00n,
    );
    const half = { priceMinor: fraction(5, 2), quantity: fraction(1) };
    expect([lineNetMinor(half, roundHalfAwayFromZero), lineNetMinor(half, roundHalfEven)]).toEqual([3n, 2n]);
  });
});

describe("a gross amount", () => {
  // Computed by hand: 9.99 / 1.2 = 8.325; 20 % of 8.33 would be 1.67, and the parts would be a penny too much.
  it("is split so that net and tax add up to it: 9.99 with 20 % in it is 8.33 and 1.66", () => {
    expect(splitGross(9_99n, "20", roundHalfAwayFromZero)).toEqual({ netMinor: 8_33n, taxMinor: 1_66n });
  });

  it("always adds up", () => {
    fc.assert(
      fc.property(
        fc.bigInt(-(10n ** 12n), 10n ** 12n),
        fc.integer({ min: 0, max: 99_999 }),
        (grossMinor, thousandths) => {
          const { netMinor, taxMinor } = splitGross(grossMinor, `${thousandths}/1000`, roundHalfAwayFromZero);
          return netMinor + taxMinor === grossMinor;
        },
      ),
      { numRuns: 10_000 },
    );
  });
});

describe("whatever stands on a document", () => {
  it("a credit and its reversal leave nothing, in any total or tax group", () => {
    fc.assert(
      fc.property(anyContent, anyRounding, (content, rounding) => {
        const credit = documentTotals(content, rounding);
        const back = documentTotals(reversedContent(content), rounding);
        return turned(credit) === turned(back, -1n);
      }),
      { numRuns: 20_000 },
    );
  });

  it("bases add up to the net, each group's tax is its own rate on its base, and nothing else is in the total", () => {
    fc.assert(
      fc.property(anyContent, (content) => {
        const { taxGroups, netMinor, taxMinor, totalMinor, dueMinor } = totals(content);
        const bases = taxGroups.reduce((so, { baseMinor }) => so + baseMinor, 0n);
        const parts = taxGroups.map(({ baseMinor, taxRate }) => halfUpOf(baseMinor * BigInt(taxRate), 100n));
        return (
          bases === netMinor &&
          taxGroups.every((group, place) => group.taxMinor === parts[place]) &&
          parts.reduce((so, part) => so + part, 0n) === taxMinor &&
          totalMinor === netMinor + taxMinor &&
          dueMinor === totalMinor - (content.paidMinor ?? 0n) + (content.roundingMinor ?? 0n)
        );
      }),
      { numRuns: 20_000 },
    );
  });

  it("totals do not depend on the order of its lines", () => {
    fc.assert(
      fc.property(anyContent, (content) => {
        const other = { ...content, lines: content.lines.toReversed() };
        return turned(totals(content)) === turned(totals(other));
      }),
      { numRuns: 5_000 },
    );
  });
});
