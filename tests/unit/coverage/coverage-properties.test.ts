import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { coverageOn } from "@/lib/coverage/coverage";
import { addDays, addMonths, completedMonths, isBefore } from "@/lib/kernel/calendar-day";
import type { Terms } from "@/lib/rule-book/terms-shape";
import { day, factsWith, failed, termsWith } from "./facts";

describe("whatever the terms and days", () => {
  const anyDays = (max: number) => fc.integer({ min: 0, max });
  const start = day("2020-01-31");
  const ROOT_FITTED_AFTER = 20;
  const anyTerms = fc
    .record({
      coverMonths: fc.integer({ min: 1, max: 60 }),
      shelfLimitMonths: fc.integer({ min: 0, max: 18 }),
      replacementMinimumDays: anyDays(28),
      startsWithoutFitting: fc.constantFrom<Terms["startsWithoutFitting"][]>("shipment", "none"),
    })
    .map((change) => termsWith({ ...change, filingLimitDays: 3660 }));
  const anyFacts = fc
    .record({
      terms: anyTerms,
      rootTerms: fc.option(anyTerms),
      shippedAfter: anyDays(800),
      fittedAfter: fc.option(anyDays(900)),
      failedAfter: anyDays(3000),
      chained: fc.boolean(),
    })
    .map(({ terms, rootTerms, shippedAfter, fittedAfter, failedAfter, chained }) => {
      // A replacement is shipped after the unit it replaces was fitted, never before.
      const shippedOn = addDays(start, shippedAfter + (chained ? ROOT_FITTED_AFTER : 0));
      return factsWith({
        terms,
        rootTerms,
        chain: chained ? [{ shippedOn: start, fittedOn: addDays(start, ROOT_FITTED_AFTER) }] : [],
        shipment: { shippedOn, to: "claimant" },
        fittedOn: fittedAfter === null ? null : addDays(shippedOn, fittedAfter),
        ...failed(addDays(shippedOn, failedAfter)),
      });
    });

  it("a covered day never has the full term used up", () => {
    fc.assert(
      fc.property(anyFacts, (facts) => {
        const { answer, lastCoveredOn, monthsUsed, serviceStartOn, coverTerms } = coverageOn(facts);
        if (answer !== "covered") return;
        expect(lastCoveredOn).not.toBeNull();
        expect(monthsUsed).toBe(completedMonths(serviceStartOn ?? start, facts.failedOn));
        expect(monthsUsed).toBeLessThan(coverTerms?.terms.coverMonths ?? 0);
      }),
      { numRuns: 1000 },
    );
  });

  it("a failure a day earlier, but not before the unit's start, is covered too", () => {
    fc.assert(
      fc.property(anyFacts, (facts) => {
        const dayBefore = addDays(facts.failedOn, -1);
        const firstDay = facts.fittedOn ?? facts.shipment?.shippedOn ?? start;
        if (coverageOn(facts).answer !== "covered" || isBefore(dayBefore, firstDay)) return;
        expect(coverageOn({ ...facts, ...failed(dayBefore) }).answer).toBe("covered");
      }),
      { numRuns: 1000 },
    );
  });

  it("cover ends where days are compared: covered exactly up to the last covered day", () => {
    fc.assert(
      fc.property(anyFacts, (facts) => {
        const { answer, lastCoveredOn, daysLeft, reasons } = coverageOn(facts);
        const blocked = reasons.some(({ code, effect }) => effect !== "notes" && code !== "termOver");
        if (lastCoveredOn === null || blocked) return;
        expect(answer === "covered").toBe(facts.failedOn <= lastCoveredOn);
        expect(addDays(facts.failedOn, daysLeft ?? NaN)).toBe(lastCoveredOn);
      }),
      { numRuns: 1000 },
    );
  });

  it("a bought unit's cover ends by fitting or by shelf, whichever is first, and never later", () => {
    fc.assert(
      fc.property(anyFacts, (facts) => {
        const { shipment, terms, fittedOn } = facts;
        const { lastCoveredOn } = coverageOn({ ...facts, chain: [] });
        if (lastCoveredOn === null || shipment === null || terms === null) return;
        const { coverMonths, shelfLimitMonths } = terms.terms;
        expect(lastCoveredOn < addMonths(shipment.shippedOn, shelfLimitMonths + coverMonths)).toBe(true);
        expect(lastCoveredOn < addMonths(fittedOn ?? shipment.shippedOn, coverMonths)).toBe(true);
      }),
    );
  });

  it("longer cover never takes cover away", () => {
    fc.assert(
      fc.property(anyFacts, (facts) => {
        if (facts.terms === null || coverageOn({ ...facts, chain: [] }).answer !== "covered") return;
        const longer = termsWith({ ...facts.terms.terms, coverMonths: facts.terms.terms.coverMonths + 1 });
        expect(coverageOn({ ...facts, chain: [], terms: longer }).answer).toBe("covered");
      }),
    );
  });
});
