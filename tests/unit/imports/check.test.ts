import { describe, expect, it } from "vitest";
import { checked, PROBLEM_LINES_SHOWN } from "@/lib/imports/check";
import { lineKey, unitKey, type KnownLine, type Recorded } from "@/lib/imports/known";
import { atOnce } from "@/lib/imports/pieces";
import { lineWith, looseLine, NOTHING_RECORDED, read, wrongIn } from "./invoice-file";

const checkOf = async (recorded: Recorded, ...lines: readonly string[]) =>
  atOnce(checked(await read(...lines), recorded));
const problemsOf = async (recorded: Recorded, ...lines: readonly string[]) =>
  (await checkOf(recorded, ...lines)).problems.map(({ line, code, detail }) => ({ line, code, detail }));

describe("a line by itself", () => {
  it("is taken as it should be, with a serial or with a quantity", async () => {
    expect(await wrongIn(lineWith(), looseLine())).toEqual([]);
  });

  it.each([
    ["account", { account: "K-7" }, "2 account accountUnknown"],
    ["account", { account: "" }, "2 account missing"],
    ["closed account", { account: "K-9" }, "2 invoicedOn accountClosed"],
    ["site", { site: "Weir Street" }, "2 site siteUnknown"],
    ["invoice", { invoice: "" }, "2 invoice missing"],
    ["long invoice", { invoice: "R".repeat(41) }, "2 invoice tooLong"],
    ["line", { line: "0" }, "2 line lineNumber"],
    ["line", { line: "1a" }, "2 line lineNumber"],
    ["day", { invoicedOn: "31.2.2026" }, "2 invoicedOn dayUnread"],
    ["day", { invoicedOn: "3/2/2026" }, "2 invoicedOn dayUnread"],
    ["day", { invoicedOn: "2.3.26" }, "2 invoicedOn dayUnread"],
    ["day", { invoicedOn: "2026-05-12" }, "2 invoicedOn dayAhead"],
    ["part", { part: "BR-7" }, "2 part partUnknown"],
    ["serial", { serial: "" }, "2 serial serialWanted"],
    ["serial", { serial: "--" }, "2 serial serialUnread"],
    ["quantity", { quantity: "2" }, "2 quantity quantityOfSerial"],
    ["quantity", { quantity: "-1" }, "2 quantity quantity"],
    ["price", { netPrice: "" }, "2 netPrice missing"],
    ["price", { netPrice: "-1" }, "2 netPrice amountNegative"],
    ["price", { netPrice: "1.845" }, "2 netPrice amountTooFine"],
    ["price", { netPrice: '"1.845,50"' }, "2 netPrice amountUnread"],
    ["price", { netPrice: "99999999999999" }, "2 netPrice amountTooLarge"],
    ["price with a bare comma", { netPrice: "184,50", exemptionReason: "x" }, "2 line cellsOutside"],
    ["tax category", { taxCategory: "X" }, "2 taxCategory taxCategory"],
    ["tax rate", { taxRate: "" }, "2 taxRate missing"],
    ["tax rate", { taxRate: "0" }, "2 taxRate taxRateZero"],
    ["tax rate", { taxRate: "119" }, "2 taxRate taxRate"],
    ["tax rate", { taxCategory: "Z" }, "2 taxRate taxRateNotZero"],
    ["reason", { taxCategory: "E", taxRate: "0" }, "2 exemptionReason reasonMissing"],
    ["reason", { exemptionReason: "None" }, "2 exemptionReason reasonNotTaken"],
  ])("is refused at its %s", async (_name, over, problem) => {
    expect(await wrongIn(lineWith(over))).toContain(problem);
  });

  it.each([
    ["serial", { serial: "A1" }, "2 serial serialNotTaken"],
    ["batch", { batch: "L1" }, "2 batch batchNotTaken"],
  ])("of a part without serial takes no %s", async (_name, over, problem) => {
    expect(await wrongIn(looseLine(over))).toEqual([problem]);
  });

  it("says everything that is wrong with it at once", async () => {
    expect(
      await wrongIn(lineWith({ account: "K-7", part: "BR-7", netPrice: "", invoicedOn: "soon" })),
    ).toEqual([
      "2 account accountUnknown",
      "2 invoicedOn dayUnread",
      "2 part partUnknown",
      "2 netPrice missing",
    ]);
  });

  it("keeps what it says exactly: minor units, three decimals of the rate, days, the serial beside its normal form", async () => {
    const { invoiceLines } = await read(
      lineWith({
        invoicedOn: "2.3.2026",
        netPrice: '"184,5"',
        taxRate: '"8,1 %"',
        serial: "aa-00 1",
        site: "mill lane",
      }),
    );
    expect(invoiceLines[0]?.first).toMatchObject({
      serial: { raw: "aa-00 1", normal: "AA001" },
      facts: {
        invoicedOn: "2026-03-02",
        shippedOn: "2026-03-02",
        unitPriceMinor: "18450",
        taxRate: "8.100",
        siteId: "site-2",
        currency: "EUR",
      },
    });
  });
});

describe("lines against each other", () => {
  it("are one invoice line where they repeat its number with another serial", async () => {
    const { fresh, totals } = await checkOf(
      NOTHING_RECORDED,
      lineWith(),
      lineWith({ serial: "AA-2" }),
      looseLine(),
    );
    expect(fresh.map(({ lines }) => lines.length)).toEqual([2, 1]);
    expect(totals).toMatchObject({ invoiceLines: 2, units: 2, batches: 0 });
    expect(totals.sums).toEqual([{ minor: 18_450n * 2n + 18_450n * 6n, currency: "EUR" }]);
  });

  it("may not repeat a serial, however it is spaced, nor a quantity, nor disagree", async () => {
    expect(await wrongIn(lineWith(), lineWith({ line: "3", serial: "aa 1" }))).toEqual([
      "3 serial serialTwice",
    ]);
    expect(await wrongIn(looseLine(), looseLine())).toEqual(["3 line lineTwice"]);
    expect(await wrongIn(lineWith(), lineWith({ serial: "AA-2", netPrice: "1" }))).toEqual([
      "3 line lineDiffers",
    ]);
  });

  it("show the first hundred that cannot be taken, and count them all", async () => {
    const many = Array.from({ length: 150 }, () => lineWith({ account: "", part: "" }));
    const check = await checkOf(NOTHING_RECORDED, ...many);
    expect(check.problemLineCount).toBe(150);
    expect(new Set(check.problems.map(({ line }) => line)).size).toBe(PROBLEM_LINES_SHOWN);
  });
});

describe("lines against what is on record", async () => {
  const [whole] = (await read(looseLine())).invoiceLines;
  const [single] = (await read(lineWith())).invoiceLines;
  if (!whole || !single) throw new Error("the usual lines were not taken");
  const existing = (id: string, of: typeof whole): KnownLine => ({
    id,
    quantity: of.first.quantity,
    facts: of.first.facts,
  });
  const recorded: Recorded = {
    batches: new Map(),
    lines: new Map([
      [lineKey("R-1", 1), existing("line-1", single)],
      [lineKey("R-1", 2), existing("line-2", whole)],
    ]),
    units: new Map([
      [unitKey("part-1", "AA1"), { invoiceLineId: "line-1", invoice: "R-1", lineNumber: 1, batch: null }],
    ]),
  };

  it("are left as they are where all is equal", async () => {
    const check = await checkOf(recorded, lineWith(), looseLine());
    expect(check).toMatchObject({ unchangedCount: 2, problemLineCount: 0, fresh: [] });
  });

  it.each([
    ["price", looseLine({ netPrice: "1" }), "netPrice"],
    ["quantity", looseLine({ quantity: "7" }), "quantity"],
    ["serial", lineWith({ serial: "AA-9" }), "serial"],
    ["batch", lineWith({ batch: "L1" }), "batch"],
  ])("are refused where the %s differs, and the columns are named", async (_name, line, columns) => {
    expect(await problemsOf(recorded, line)).toEqual([
      { line: 2, code: "lineExists", detail: expect.objectContaining({ columns }) },
    ]);
  });

  it("are refused where the serial is on record with another invoice line", async () => {
    expect(await problemsOf(recorded, lineWith({ invoice: "R-2" }))).toEqual([
      { line: 2, code: "serialKnown", detail: { invoice: "R-1", number: 1 } },
    ]);
  });
});
