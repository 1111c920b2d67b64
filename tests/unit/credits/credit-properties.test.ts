import fc from "fast-check";
import { describe, expect, it, vi } from "vitest";
import { creditFor, noteLines, type Credit } from "@/lib/credits/credit";
import { reversedContent, documentTotals } from "@/lib/credits/document";
import { balancesOf, postingsOf } from "@/lib/credits/ledger";
import { roundHalfAwayFromZero } from "@/lib/kernel/money";
import { anyCreditInput, halfUpOf, turned } from "./arbitraries";
import { followsOn, redo } from "./redo";

// Many thousand cases each: seconds on a machine at rest, more on a busy one.
vi.setConfig({ testTimeout: 180_000 });

type Minor = { readonly netMinor: bigint };
const sum = (amounts: readonly Minor[]) => amounts.reduce((so, { netMinor }) => so + netMinor, 0n);
const text = (value: unknown) =>
  JSON.stringify(value, (_name, inner: unknown) => (typeof inner === "bigint" ? `${inner}n` : inner));

/** The property as a list of what does not hold, so that a case that fails says which sentence it broke. */
const holds = (claims: Readonly<Record<string, boolean>>): boolean => {
  const broken = Object.keys(claims).filter((name) => !claims[name]);
  if (broken.length > 0) expect(broken).toEqual([]);
  return true;
};

const reasonsTell = (credit: Credit): boolean =>
  credit.lines.every(({ lineNumber, kind, askedMinor, netMinor }) => {
    const rows = credit.notGiven.filter((row) => row.lineNumber === lineNumber && row.kind === kind);
    const end = rows.reduce(
      (met: bigint | null, row) => (met === row.askedMinor ? row.givenMinor : null),
      askedMinor,
    );
    return end === netMinor;
  });

describe("whatever is claimed", () => {
  it("sums of parts are wholes, no limit is passed, and nothing taken is without its reason", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const credit = creditFor(input);
        const { allowances, taxGroups, separateCharge } = credit;
        const onNote = noteLines(credit.lines);
        const taken = allowances.reduce((so, { amountMinor }) => so + amountMinor, 0n);
        const handling = input.handling?.amountMinor ?? 0n;
        return holds({
          linesAddUp: sum(onNote) === credit.linesMinor,
          netIsLinesLessAllowances: credit.netMinor === credit.linesMinor - taken,
          basesAddUp: taxGroups.reduce((so, { baseMinor }) => so + baseMinor, 0n) === credit.netMinor,
          noBaseBelowZero: taxGroups.every(({ baseMinor }) => baseMinor >= 0n),
          taxAddsUp: taxGroups.reduce((so, { taxMinor }) => so + taxMinor, 0n) === credit.taxMinor,
          totalIsNetAndTax: credit.totalMinor === credit.netMinor + credit.taxMinor,
          handlingIsAllOrApart: taken === handling || (taken === 0n && separateCharge !== null),
          apartOnlyWhereItExceeds: (separateCharge !== null) === handling > credit.linesMinor,
          allIsSettled: sum(credit.lines) === credit.linesMinor + sum(credit.elsewhere),
          neverMoreThanAsked: credit.lines.every(
            (one) => one.netMinor >= 0n && one.netMinor <= one.askedMinor,
          ),
          claimCapHolds: input.claimCapMinor === null || sum(credit.lines) <= input.claimCapMinor,
          reasonsTell: reasonsTell(credit),
        });
      }),
      { numRuns: 15_000 },
    );
  });

  it("no invoice line is given back more than once over all notes and lines", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const parts = creditFor(input).lines.filter(({ kind }) => kind === "part");
        return input.lines.every(({ invoice }) => {
          if (invoice === null) return true;
          const given = sum(parts.filter((one) => one.invoice?.lineNumber === invoice.lineNumber));
          return given === 0n || invoice.alreadyCreditedMinor + given <= invoice.lineNetMinor;
        });
      }),
      { numRuns: 5_000 },
    );
  });

  it("the order in which lines come changes nothing", () => {
    fc.assert(
      fc.property(anyCreditInput, fc.infiniteStream(fc.nat()), (input, keys) => {
        const dealt = input.lines.map((line) => ({ line, key: keys.next().value ?? 0 }));
        const lines = dealt.toSorted((a, b) => a.key - b.key).map(({ line }) => line);
        return text(creditFor({ ...input, lines })) === text(creditFor(input));
      }),
      { numRuns: 5_000 },
    );
  });

  it("a clerk redoes every printed step from its printed figures, each from the one before", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const credit = creditFor({ ...input, rounding: "halfUp" });
        for (const { steps, netMinor } of credit.lines) {
          steps.forEach(redo);
          followsOn(steps);
          const last = steps.at(-1)?.result ?? "";
          if (last.replace(/\D/g, "").replace(/^0+(?=\d)/, "") !== String(netMinor))
            expect(last).toBe(String(netMinor));
        }
        credit.steps.forEach(redo);
        followsOn(credit.steps.filter(({ rule }) => ["noteLines", "netAfterHandling"].includes(rule)));
        return true;
      }),
      { numRuns: 10_000 },
    );
  });

  it("tax is taken once for each category and rate on the document", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const { taxGroups } = creditFor({ ...input, rounding: "halfUp" });
        const names = taxGroups.map(({ taxCategory, taxRate }) => `${taxCategory} ${taxRate}`);
        return (
          new Set(names).size === names.length &&
          taxGroups.every(
            ({ baseMinor, taxRate, taxMinor }) => taxMinor === halfUpOf(baseMinor * BigInt(taxRate), 100n),
          )
        );
      }),
      { numRuns: 5_000 },
    );
  });

  it("a credit and its reversal leave nothing, on the document and on every account", () => {
    fc.assert(
      fc.property(anyCreditInput, (input) => {
        const credit = creditFor(input);
        const allowances = credit.allowances.map((one) => ({ ...one, netMinor: one.amountMinor }));
        const content = { lines: noteLines(credit.lines), allowances };
        const back = documentTotals(reversedContent(content), roundHalfAwayFromZero);
        const there = documentTotals(content, roundHalfAwayFromZero);
        const books = balancesOf(
          (["noteIssued", "noteCountered"] as const).flatMap((kind) => postingsOf({ kind, ...credit })),
        );
        return turned(there) === turned(back, -1n) && books.every(({ amountMinor }) => amountMinor === 0n);
      }),
      { numRuns: 5_000 },
    );
  });
});
