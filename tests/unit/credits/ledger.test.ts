import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  allocatedMinor,
  allocateNote,
  balancesOf,
  counterNote,
  openMinor,
  postingsOf,
  type Movement,
  type NoteInLedger,
} from "@/lib/credits/ledger";

const note = (change: Partial<NoteInLedger> = {}): NoteInLedger => ({
  currency: "GBP",
  totalMinor: 412_95n,
  isCountered: false,
  allocations: [],
  ...change,
});
const flat = (movement: Movement) =>
  postingsOf(movement).map(({ account, amountMinor }) => [account, amountMinor]);

describe("a movement", () => {
  it("of a note books expense and tax against what the workshop is owed", () => {
    expect(flat({ kind: "noteIssued", currency: "GBP", netMinor: 346_62n, taxMinor: 66_33n })).toEqual([
      ["claimsExpense", 346_62n],
      ["tax", 66_33n],
      ["workshopPayable", -412_95n],
    ]);
  });

  it("of an allocation books it to where it went", () => {
    const moved = { kind: "allocated", currency: "GBP", amountMinor: 100_00n } as const;
    expect(flat({ ...moved, how: "invoice" })).toEqual([
      ["workshopPayable", 100_00n],
      ["appliedToInvoice", -100_00n],
    ]);
    expect(flat({ ...moved, how: "paidOut" })).toEqual([
      ["workshopPayable", 100_00n],
      ["paidOut", -100_00n],
    ]);
  });

  it("of a recovery takes expense to what the maker owes", () => {
    expect(flat({ kind: "recoveryCharged", currency: "GBP", amountMinor: 50_00n })).toEqual([
      ["recoveryReceivable", 50_00n],
      ["claimsExpense", -50_00n],
    ]);
  });

  it("books no posting of nothing: a note without tax has no tax posting, an empty one none at all", () => {
    const noted = { kind: "noteIssued", currency: "GBP", taxMinor: 0n } as const;
    expect(flat({ ...noted, netMinor: 10_00n }).map(([account]) => account)).toEqual([
      "claimsExpense",
      "workshopPayable",
    ]);
    expect(flat({ ...noted, netMinor: 0n })).toEqual([]);
  });
});

describe("a note", () => {
  it("is open as far as it is not allocated; what was taken back is open again", () => {
    const used = note({
      allocations: [{ amountMinor: 100_00n }, { amountMinor: 12_95n }, { amountMinor: -100_00n }],
    });
    expect([allocatedMinor(used), openMinor(used)]).toEqual([12_95n, 400_00n]);
    expect(openMinor(note({ isCountered: true }))).toBe(0n);
  });

  const wanted = { currency: "GBP", amountMinor: 412_95n, how: "invoice" } as const;

  it("is allocated to its last penny", () => {
    expect(allocateNote(note(), wanted)).toEqual({
      ok: true,
      value: { movement: { kind: "allocated", ...wanted }, openMinor: 0n },
    });
  });

  it.each([
    ["more than is open", note(), { amountMinor: 412_96n }, "allocationMoreThanOpen"],
    ["more than is left", note({ allocations: [{ amountMinor: 1n }] }), {}, "allocationMoreThanOpen"],
    ["another currency", note(), { currency: "EUR" }, "allocationOtherCurrency"],
    ["nothing", note(), { amountMinor: 0n }, "allocationOfNothing"],
    ["less than nothing", note(), { amountMinor: -1n }, "allocationOfNothing"],
    ["what was taken back by another document", note({ isCountered: true }), {}, "noteCountered"],
  ] as const)("refuses %s", (_name, from, change, code) => {
    expect(allocateNote(from, { ...wanted, ...change })).toMatchObject({ ok: false, code });
  });

  it("says how much is open where too much is wanted", () => {
    expect(allocateNote(note(), { ...wanted, amountMinor: 500_00n })).toMatchObject({
      detail: { open: "412.95 GBP" },
      field: "amount",
    });
  });

  it("is countered whole and once, and only while nothing of it is allocated", () => {
    expect(counterNote(note())).toMatchObject({ ok: true });
    expect(counterNote(note({ allocations: [{ amountMinor: 1n }] }))).toMatchObject({
      code: "noteAllocated",
    });
    expect(counterNote(note({ isCountered: true }))).toMatchObject({ code: "noteCountered" });
  });
});

describe("whatever moves", () => {
  const anyAmount = fc.bigInt(0n, 10n ** 12n);
  const currency = fc.constantFrom<("GBP" | "EUR" | "JPY")[]>("GBP", "EUR", "JPY");
  const anyMovement: fc.Arbitrary<Movement> = fc.oneof(
    fc.record({
      kind: fc.constantFrom<("noteIssued" | "noteCountered")[]>("noteIssued", "noteCountered"),
      currency,
      netMinor: anyAmount,
      taxMinor: anyAmount,
    }),
    fc.record({
      kind: fc.constantFrom<("allocated" | "allocationTakenBack")[]>("allocated", "allocationTakenBack"),
      how: fc.constantFrom<("invoice" | "paidOut")[]>("invoice", "paidOut"),
      currency,
      amountMinor: anyAmount,
    }),
    fc.record({
      kind: fc.constantFrom<("recoveryCharged" | "recoveryTakenBack")[]>(
        "recoveryCharged",
        "recoveryTakenBack",
      ),
      currency,
      amountMinor: anyAmount,
    }),
  );

  it("the books sum to nothing in each currency", () => {
    fc.assert(
      fc.property(fc.array(anyMovement, { maxLength: 12 }), (movements) => {
        const sums = new Map<string, bigint>();
        for (const { currency: code, amountMinor } of balancesOf(movements.flatMap(postingsOf)))
          sums.set(code, (sums.get(code) ?? 0n) + amountMinor);
        return [...sums.values()].every((sum) => sum === 0n);
      }),
      { numRuns: 5_000 },
    );
  });

  it("a note is allocated plus open at every moment, and what is owed in the books is what is open", () => {
    const tries = fc.array(fc.tuple(fc.bigInt(-10n, 600_00n), fc.boolean()), { maxLength: 12 });
    fc.assert(
      fc.property(fc.bigInt(0n, 1000_00n), tries, (totalMinor, wanted) => {
        let now = note({ totalMinor });
        let books = postingsOf({ kind: "noteIssued", currency: "GBP", netMinor: totalMinor, taxMinor: 0n });
        for (const [amountMinor, takesBack] of wanted) {
          const made = allocateNote(now, { currency: "GBP", amountMinor, how: "invoice" });
          if (!made.ok) continue;
          const back: Movement = {
            kind: "allocationTakenBack",
            currency: "GBP",
            amountMinor,
            how: "invoice",
          };
          const rows = takesBack ? [amountMinor, -amountMinor] : [amountMinor];
          const allocations = [...now.allocations, ...rows.map((minor) => ({ amountMinor: minor }))];
          now = { ...now, allocations };
          books = [...books, ...postingsOf(made.value.movement), ...(takesBack ? postingsOf(back) : [])];
          const owed =
            balancesOf(books).find(({ account }) => account === "workshopPayable")?.amountMinor ?? 0n;
          if (allocatedMinor(now) + openMinor(now) !== totalMinor) return false;
          if (openMinor(now) < 0n || owed !== -openMinor(now)) return false;
        }
        return true;
      }),
      { numRuns: 5_000 },
    );
  });
});
