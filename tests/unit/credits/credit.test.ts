import { describe, expect, it } from "vitest";
import { noteLines, type CreditLineInput, type SettlementByKind } from "@/lib/credits/credit";
import { fraction, ZERO } from "@/lib/kernel/fraction";
import type { CoverFractionSchedule } from "@/lib/rule-book/terms-shape";
import { halved, invoiced, lost, nets, one, ruled, terms } from "./inputs";

const ALL_ON_NOTE: SettlementByKind = {
  part: "creditNote",
  labour: "creditNote",
  diagnosis: "creditNote",
  consumables: "creditNote",
  carriage: "creditNote",
};

// Months left over months covered: trade practice, from memory, no source. 218.33 x 16/24 = 145.553...
it("pays 145.55 of a part of 218.33 with 8 of 24 months used, and its tax", () => {
  const credit = one({});
  expect(ruled(credit)).toEqual([
    ["partPriceInvoiced", "218.33 GBP"],
    ["coverStraightLine", "2/3"],
    ["coverAmount", "145.55 GBP"],
  ]);
  expect([credit.netMinor, credit.taxMinor, credit.totalMinor]).toEqual([145_55n, 29_11n, 174_66n]);
  expect(lost(credit)).toEqual([["monthsUsed", 218_33n, 145_55n]]);
});

describe("each step", () => {
  // Computed by hand: 100.01 x 1/2 = 50.005 -> 50.01, x 1/2 = 25.005 -> 25.01; in one go, 25.0025 would give 25.00.
  it("starts from the printed figure, so that a clerk who rounds each line gets the same", () => {
    const invoice = invoiced({ unitPriceMinor: 100_01n, lineNetMinor: 100_01n });
    const credit = one({ ...halved, invoice, monthsUsed: 12 });
    expect(ruled(credit)).toEqual([
      ["partPriceInvoiced", "100.01 GBP"],
      ["coverStraightLine", "1/2"],
      ["coverAmount", "50.01 GBP"],
      ["creditedShare", "1/2"],
      ["attribution", "25.01 GBP"],
    ]);
  });

  it("rounds a half to the even neighbour where the distributor chose that", () => {
    const invoice = invoiced({ unitPriceMinor: 100_01n, lineNetMinor: 100_01n });
    const credit = one({ ...halved, invoice, monthsUsed: 12 }, { rounding: "halfEven" });
    expect(credit.netMinor).toBe(25_00n);
  });

  it("names the version it rests on: cover by the shipment day, labour and caps by the repair day", () => {
    const credit = one({ labourAskedMinutes: 30, diagnosisAskedMinor: 30_00n });
    const sources = credit.lines.map(({ steps }) => steps.flatMap(({ source }) => source ?? []));
    expect(sources).toEqual([
      ["Rule 4, 1 January 2025"],
      ["Rule 5, 1 January 2026", "Rule 5, 1 January 2026"],
      ["Rule 5, 1 January 2026"],
    ]);
  });
});

describe("cover", () => {
  const schedule: CoverFractionSchedule = {
    kind: "step",
    steps: [
      { fromMonth: 0, fraction: "1" },
      { fromMonth: 12, fraction: "1/2" },
    ],
  };
  it.each([
    ["full price with a full schedule", { coverTerms: terms({ coverFraction: { kind: "full" } }) }, 218_33n],
    ["the last step reached", { coverTerms: terms({ coverFraction: schedule }), monthsUsed: 12 }, 109_17n],
    ["all of the first step", { coverTerms: terms({ coverFraction: schedule }), monthsUsed: 11 }, 218_33n],
    ["one month's share in the last month", { monthsUsed: 23 }, 9_10n],
    ["nothing after the term", { monthsUsed: 24 }, 0n],
    [
      "nothing after the term, whatever the schedule",
      { monthsUsed: 24, coverTerms: terms({ coverFraction: { kind: "full" } }) },
      0n,
    ],
    ["the last month's share by goodwill after the term", { monthsUsed: 25, goodwill: true }, 9_10n],
    ["no more by goodwill within the term", { monthsUsed: 8, goodwill: true }, 145_55n],
    ["nothing by a schedule whose months are not known", { monthsUsed: null }, 0n],
    [
      "all by a full schedule, months known or not",
      { monthsUsed: null, coverTerms: terms({ coverFraction: { kind: "full" } }) },
      218_33n,
    ],
  ] as const)("gives %s", (_name, change, netMinor) => {
    expect(one(change).netMinor).toBe(netMinor);
  });

  it("is reckoned on all pieces of the line", () => {
    // 3 x 37.45 = 112.35, x 2/3 = 74.90.
    const invoice = invoiced({ unitPriceMinor: 37_45n, lineNetMinor: 112_35n });
    expect(one({ invoice, quantity: 3 }).netMinor).toBe(74_90n);
  });
});

describe("labour", () => {
  const labour = (change: Partial<CreditLineInput>) =>
    one(change).lines.find(({ kind }) => kind === "labour");
  // 45 standard minutes at 48.00 an hour are 36.00; 31 are 24.80.
  it.each([
    ["claimed minutes where they are fewer than the standard", { labourAskedMinutes: 31 }, 24_80n],
    ["standard minutes where more are claimed", { labourAskedMinutes: 90 }, 36_00n],
    ["nothing from the month its own term is over", { labourAskedMinutes: 30, monthsUsed: 12 }, 0n],
    ["for the last month of its own term", { labourAskedMinutes: 30, monthsUsed: 11 }, 24_00n],
    [
      "nothing where the terms pay none",
      { labourAskedMinutes: 30, repairTerms: terms({ labour: null }) },
      0n,
    ],
    ["nothing where the months are not known", { labourAskedMinutes: 30, monthsUsed: null }, 0n],
  ] as const)("is paid %s", (_name, change, netMinor) => {
    expect(labour(change)?.netMinor).toBe(netMinor);
  });

  it("stays off the credit note until the distributor says otherwise, and is named with its sum", () => {
    const credit = one({ labourAskedMinutes: 45 });
    expect(credit.elsewhere).toEqual([{ settledBy: "workshopInvoice", netMinor: 36_00n }]);
    expect([credit.linesMinor, noteLines(credit.lines).length]).toEqual([145_55n, 1]);
    expect(credit.lines[1]).toMatchObject({ settledBy: "workshopInvoice", taxCategory: null, taxRate: null });

    const onNote = one({ labourAskedMinutes: 45 }, { settlement: ALL_ON_NOTE });
    expect([onNote.linesMinor, onNote.elsewhere]).toEqual([181_55n, []]);
    expect(onNote.lines[1]).toMatchObject({ settledBy: "creditNote", taxCategory: "S", taxRate: "20.000" });
  });

  it("says how much was claimed beyond the standard time", () => {
    expect(lost(one({ labourAskedMinutes: 90, monthsUsed: 0 }))).toEqual([
      ["standardMinutes", 72_00n, 36_00n],
    ]);
  });
});

describe("diagnosis, consumables and carriage", () => {
  it("are each held to a cap of their own, before attribution", () => {
    const asked = { diagnosisAskedMinor: 50_00n, consumablesAskedMinor: 3_00n, carriageAskedMinor: 12_01n };
    // Caps 20, 5 and 12; then half of each. Capped after the half, diagnosis would be 20.00.
    expect(nets(one({ ...halved, ...asked, monthsUsed: 0 }))).toEqual([
      ["part", 109_17n],
      ["diagnosis", 10_00n],
      ["consumables", 1_50n],
      ["carriage", 6_00n],
    ]);
  });

  it("have no line where nothing was asked", () => {
    expect(nets(one({}))).toEqual([["part", 145_55n]]);
  });
});

describe("filing late", () => {
  it("pays the share the terms say of every kind, after caps", () => {
    const lateFiling = { fraction: fraction(1, 2), version: "Rule 4, 1 January 2025" };
    const credit = one({ lateFiling, carriageAskedMinor: 40_00n });
    // 145.55 / 2 = 72.775 -> 72.78; the cap of 12 halved.
    expect(nets(credit)).toEqual([
      ["part", 72_78n],
      ["carriage", 6_00n],
    ]);
    expect(lost(credit).map(([reason]) => reason)).toEqual([
      "monthsUsed",
      "filedLate",
      "kindCap",
      "filedLate",
    ]);
  });
});

describe("attribution", () => {
  it("is summed first and applied once", () => {
    // Computed by hand: 0.05 x 2/3 = 0.033 -> 0.03, where a third twice would be 0.02 + 0.02 = 0.04.
    const invoice = invoiced({ unitPriceMinor: 5n, lineNetMinor: 5n });
    const attribution = {
      shares: { maker: "1/3", carrier: "1/3", wear: "1/3" },
      creditedShare: fraction(2, 3),
    };
    const credit = one({ invoice, monthsUsed: 0, outcome: "upheldInPart", attribution });
    expect(credit.netMinor).toBe(3n);
    expect(lost(credit)).toEqual([["sharedCause", 5n, 3n]]);
  });

  it("of a declined line gives nothing of any kind, and says what was asked", () => {
    const asked = { labourAskedMinutes: 30, carriageAskedMinor: 8_00n };
    const attribution = { shares: { maker: "1" }, creditedShare: ZERO };
    const credit = one({ ...asked, outcome: "declined", attribution });
    expect(lost(credit)).toEqual([
      ["declined", 218_33n, 0n],
      ["declined", 24_00n, 0n],
      ["declined", 8_00n, 0n],
    ]);
    expect([credit.totalMinor, credit.taxGroups, credit.elsewhere]).toEqual([0n, [], []]);
  });
});
