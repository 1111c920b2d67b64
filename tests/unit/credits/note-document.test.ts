import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { creditFor, type Credit } from "@/lib/credits/credit";
import { creditInMail } from "@/lib/credits/explained";
import { frozenText, thawedCredit } from "@/lib/credits/frozen-credit-shape";
import { counterDocument, invoicesOf, noteDocument, type NoteDocument } from "@/lib/credits/note-document";
import { thawedNote } from "@/lib/credits/note-shape";
import { plainRate } from "@/lib/credits/plain-rate";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { anyCreditInput } from "./arbitraries";

const party = (legalName: string) => ({
  name: legalName,
  legalName,
  address: "1 Mill Lane",
  country: "GB",
  taxNumber: null,
});

const noteOf = (credit: Credit): NoteDocument =>
  noteDocument({
    credit,
    number: "LP-2026-00001",
    issuedOn: calendarDay("2026-12-01"),
    seller: party("Larkmoor Parts Ltd"),
    buyer: party("Saltmarsh Mobility Ltd"),
    accountNumber: "K 100",
    claim: {
      number: "4107-3826",
      filedOn: calendarDay("2026-11-02"),
      decidedOn: calendarDay("2026-11-20"),
    },
    claimLines: [...new Set(credit.lines.map(({ lineNumber }) => lineNumber))].map((lineNumber) => ({
      lineNumber,
      partNumber: "BR-24",
      partName: "Brake",
      serial: null,
      quantity: 1,
      invoicedOn: calendarDay("2026-03-03"),
      reasonCode: "faultOfThePart",
      reason: "The coil.",
    })),
  });

const sum = (amounts: readonly bigint[]): bigint => amounts.reduce((so, amount) => so + amount, 0n);

describe("a note, whatever credit it is for", () => {
  it("adds up to the minor unit, and is read back as it was frozen", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const credit = creditFor(input);
        const note = noteOf(credit);
        const lines = sum(note.lines.map(({ netMinor }) => netMinor));
        const taken = sum(note.allowances.map(({ amountMinor }) => amountMinor));
        expect(lines).toBe(note.linesMinor);
        expect(lines - taken).toBe(note.netMinor);
        expect(sum(note.taxGroups.map(({ baseMinor }) => baseMinor))).toBe(note.netMinor);
        expect(sum(note.taxGroups.map(({ taxMinor }) => taxMinor))).toBe(note.taxMinor);
        expect(note.netMinor + note.taxMinor).toBe(note.totalMinor);
        expect(thawedNote(JSON.parse(frozenText(note)))).toEqual(note);
        expect(thawedCredit(JSON.parse(frozenText(credit)))).toEqual(credit);
      }),
      { numRuns: 1000 },
    );
  });

  it("is taken back to nothing by its counter note", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const note = noteOf(creditFor(input));
        const counter = counterDocument(note, {
          number: "LP-2026-00002",
          issuedOn: calendarDay("2026-12-02"),
          reason: "Wrong account.",
        });
        const figures = ({ netMinor, taxMinor, totalMinor, lines, taxGroups, allowances }: NoteDocument) =>
          frozenText([netMinor, taxMinor, totalMinor, lines, taxGroups, allowances]);
        expect(figures(counter)).toEqual(figures(note));
        expect(counter.counters).toEqual({ number: note.number, issuedOn: note.issuedOn });
        expect([counter.kind, counter.number, counter.reason]).toEqual([
          "counter",
          "LP-2026-00002",
          "Wrong account.",
        ]);
      }),
      { numRuns: 200 },
    );
  });

  it("names each original invoice once, and explains every line that was asked", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const credit = creditFor(input);
        const note = noteOf(credit);
        const named = invoicesOf(note).map(({ invoiceNumber }) => invoiceNumber);
        expect(new Set(named).size).toBe(named.length);
        expect(note.explained.map(({ lineNumber, kind }) => [lineNumber, kind])).toEqual(
          credit.lines.map(({ lineNumber, kind }) => [lineNumber, kind]),
        );
        const mailed = creditInMail(credit);
        if (mailed) expect(mailed.steps.at(-1)?.rule).toBe("total");
      }),
      { numRuns: 200 },
    );
  });

  it("never holds a number as a number: what is frozen are digits", () => {
    expect(frozenText({ netMinor: 9_007_199_254_740_993n })).toBe('{"netMinor":"9007199254740993"}');
    expect(() => thawedNote({})).toThrow();
  });
});

describe("a rate", () => {
  it.each([
    ["20.000", "20"],
    ["5.500", "5.5"],
    ["0.000", "0"],
    ["10", "10"],
    ["7.125", "7.125"],
  ])("kept as %s is printed as %s", (kept, printed) => {
    expect(plainRate(kept)).toBe(printed);
  });
});
