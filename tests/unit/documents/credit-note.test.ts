import { describe, expect, it } from "vitest";
import { creditFor, type CreditLineInput } from "@/lib/credits/credit";
import { counterDocument, noteDocument } from "@/lib/credits/note-document";
import { creditNotePdf } from "@/lib/documents/credit-note";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { pdfRules, pdfRuns, pdfText } from "../../support/pdf-text";
import { bodies } from "../rule-book/bodies";

const terms = { terms: bodies.terms, version: "G 1 (2024-01-01)" };
const line: CreditLineInput = {
  lineNumber: 1,
  outcome: "upheld",
  invoice: {
    invoiceNumber: "R-100",
    lineNumber: 2,
    unitPriceMinor: 218_33n,
    lineNetMinor: 218_33n,
    alreadyCreditedMinor: 0n,
    taxCategory: "S",
    taxRate: "20",
    exemptionReason: null,
  },
  typedPrice: null,
  quantity: 1,
  monthsUsed: 8,
  coverTerms: terms,
  repairTerms: terms,
  labourAskedMinutes: 60,
  diagnosisAskedMinor: 0n,
  consumablesAskedMinor: 9_00n,
  carriageAskedMinor: 0n,
  lateFiling: null,
  attribution: { shares: { maker: "1" }, creditedShare: { numerator: 1n, denominator: 1n } },
  goodwill: false,
};
const relief = "Zero rated: aid for a disabled person";
const credit = creditFor({
  currency: "GBP",
  rounding: "halfUp",
  claimCapMinor: null,
  handling: { amountMinor: 4_50n, reason: "Goods-in and test" },
  lines: [
    line,
    {
      ...line,
      lineNumber: 2,
      labourAskedMinutes: 0,
      consumablesAskedMinor: 0n,
      invoice: line.invoice && {
        ...line.invoice,
        lineNumber: 3,
        taxCategory: "Z",
        taxRate: "0",
        exemptionReason: relief,
      },
    },
  ],
});
const party = (legalName: string) => ({
  name: legalName,
  legalName,
  address: "1 Mill Lane\nLarkmoor",
  country: "GB",
  taxNumber: "GB 123",
});
const note = noteDocument({
  credit,
  number: "LP-2026-00042",
  issuedOn: calendarDay("2026-12-01"),
  seller: party("Larkmoor Parts Ltd"),
  buyer: party("Saltmarsh Mobility Ltd"),
  accountNumber: "K 100",
  claim: { number: "4107-3826", filedOn: calendarDay("2026-11-02"), decidedOn: calendarDay("2026-11-20") },
  claimLines: [1, 2].map((lineNumber) => ({
    lineNumber,
    partNumber: "BR-24",
    partName: "Brake 57 Ω",
    serial: "BR0123456701",
    quantity: 1,
    invoicedOn: calendarDay("2026-03-03"),
    reasonCode: "faultOfThePart",
    reason: "The coil.",
  })),
});

/** As the database keeps a rate: three decimals. */
const withThousandths = (input: Readonly<Record<string, string | number>>) =>
  "taxRate" in input ? { ...input, taxRate: Number(input.taxRate).toFixed(3) } : input;

describe("the PDF of a credit note", () => {
  it("says in English what a bookkeeper looks for, with every figure", async () => {
    const text = await pdfText(await creditNotePdf(note, "en"));
    for (const words of [
      "Credit note LP-2026-00042",
      "Larkmoor Parts Ltd",
      "Saltmarsh Mobility Ltd",
      "R-100 of 3 March 2026",
      "4107-3826, filed 2 November 2026",
      // 16/24 of 218.33, from the table of the trade's practice, from memory.
      "S 20% £145.55",
      "Z 0% £145.55",
      relief,
      "Fault of the part",
      "£36.00 is settled by an invoice of the workshop",
      "24 months of term less 8 completed, over 24",
      "page 1 of",
    ])
      expect(text).toContain(words);
    // The figures of the document, reckoned by hand: 145.55 + 5.00 + 145.55, less 4.50 shared 2.29 and 2.21.
    for (const figure of ["£296.10", "-£2.29", "-£2.21", "£291.60", "£148.26", "£29.65", "£321.25"])
      expect(text).toContain(figure);
  });

  it("calls itself a correction of the invoice in German, never what self-billing is called", async () => {
    const text = await pdfText(await creditNotePdf(note, "de"));
    expect(text).toContain("Rechnungskorrektur LP-2026-00042");
    expect(text).toContain("321,25 £");
    expect(text).not.toContain("Gutschrift");
  });

  it("of a counter note names the note it takes back, and why", async () => {
    const counter = counterDocument(note, {
      number: "LP-2026-00043",
      issuedOn: calendarDay("2026-12-02"),
      reason: "Wrong account.",
    });
    const text = await pdfText(await creditNotePdf(counter, "en"));
    for (const words of [
      "Counter note LP-2026-00043",
      "Credit note LP-2026-00042 of 1 December 2026",
      "Wrong account.",
    ])
      expect(text).toContain(words);
    expect(text).toContain("Total charged back £321.25");
  });

  it("is the same to the byte each time, and keeps every line on the sheet", async () => {
    const [first, again] = [await creditNotePdf(note, "en"), await creditNotePdf(note, "en")];
    expect(Buffer.compare(Buffer.from(first), Buffer.from(again))).toBe(0);
    const runs = await pdfRuns(first);
    expect(runs.length).toBeGreaterThan(50);
    expect(runs.filter(({ text }) => text.includes("\ufffd"))).toEqual([]);
    // A4 is 595 by 842 points.
    expect(runs.filter(({ x, y }) => x < 40 || x > 555 || y < 25 || y > 815)).toEqual([]);
  });

  it("has rules that touch no letter, on every sheet and in both languages", async () => {
    for (const bytes of [await creditNotePdf(note, "en"), await creditNotePdf(note, "de")]) {
      const [rules, runs] = [await pdfRules(bytes), await pdfRuns(bytes)];
      expect(rules.length).toBeGreaterThan(8);
      // Capitals reach 0.7 of the size over the base line, letters 0.25 under it; two points of air on either side.
      const touched = rules.flatMap((rule) =>
        runs.filter(
          ({ page, x, y, size }) =>
            page === rule.page &&
            x < rule.to &&
            x >= rule.from - 1 &&
            rule.y > y - size * 0.25 - 2 &&
            rule.y < y + size * 0.7 + 2,
        ),
      );
      expect(touched.map(({ text }) => text)).toEqual([]);
    }
  });

  it("names the columns again on the next sheet, and leaves no rule or heading alone at a foot", async () => {
    const [line] = note.lines;
    if (!line) throw new Error("No line");
    const long = { ...note, lines: Array.from({ length: 24 }, (_, at) => ({ ...line, position: at + 1 })) };
    const bytes = await creditNotePdf(long, "en");
    const runs = await pdfRuns(bytes);
    const sheets = [...new Set(runs.flatMap(({ page, text }) => (text === "No." ? [page] : [])))];
    expect(sheets).toEqual([1, 2]);
    const feet = runs.filter(({ y }) => y < 40).map(({ y }) => y);
    for (const { page, y } of await pdfRules(bytes)) {
      const below = runs.filter((run) => run.page === page && run.y < y && !feet.includes(run.y));
      expect(below.length).toBeGreaterThan(0);
    }
  });

  it("prints a rate without zeros behind it, wherever it stands", async () => {
    const kept = {
      ...note,
      steps: note.steps.map((step) => ({ ...step, input: withThousandths(step.input) })),
    };
    const [english, german] = [
      await pdfText(await creditNotePdf(kept, "en")),
      await pdfText(await creditNotePdf(kept, "de")),
    ];
    expect(english).toContain("Tax in group S: 20% of");
    expect(german).toContain("Steuer in Gruppe S: 20 % von");
    expect(`${english}${german}`).not.toMatch(/20[.,]0/u);
  });
});
