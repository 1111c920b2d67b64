import { describe, expect, it } from "vitest";
import { coverageOn } from "@/lib/coverage/coverage";
import { type CoverageFacts } from "@/lib/coverage/facts";
import { addDays } from "@/lib/kernel/calendar-day";
import type { Terms } from "@/lib/rule-book/terms-shape";
import { day, factsWith, failed, termsWith } from "./facts";

const answered = (change: Partial<CoverageFacts>) => coverageOn(factsWith(change));
/** Codes of the reasons that block or leave open. */
const against = (change: Partial<CoverageFacts>) =>
  answered(change)
    .reasons.filter(({ effect }) => effect !== "notes")
    .map(({ code }) => code);
const results = (change: Partial<CoverageFacts>) =>
  answered(change).steps.map(({ rule, result }) => `${rule} ${result}`);

describe("the term of a unit", () => {
  // Regulation (EEC, Euratom) 1182/71, Article 3, and the day before: fitted 15 January 2026, 24 months.
  it("fitted 15 January 2026 for 24 months is covered on 14 January 2028 and not on the 15th", () => {
    expect(answered(failed("2028-01-14"))).toMatchObject({
      answer: "covered",
      lastCoveredOn: "2028-01-14",
      daysLeft: 0,
      monthsUsed: 23,
    });
    expect(answered(failed("2028-01-15"))).toMatchObject({ answer: "outside", daysLeft: -1, monthsUsed: 24 });
  });

  // First days without cover: the check values of the civil rule in calendar-day.test.ts.
  it.each([
    ["2024-01-31", 1, "2024-02-28"],
    ["2025-01-31", 1, "2025-02-27"],
    ["2025-08-31", 6, "2026-02-27"],
    ["2024-02-29", 12, "2025-02-27"],
    ["2024-02-29", 48, "2028-02-28"],
  ])("fitted %s for %i months is covered to %s", (fittedOn, coverMonths, last) => {
    const terms = termsWith({ coverMonths, shelfLimitMonths: 6, replacementMinimumDays: 0 });
    const facts = {
      terms,
      fittedOn: day(fittedOn),
      shipment: { shippedOn: day(fittedOn), to: "claimant" as const },
    };
    expect(answered({ ...facts, ...failed(last) })).toMatchObject({ answer: "covered", lastCoveredOn: last });
    expect(answered({ ...facts, ...failed(addDays(day(last), 1)) }).answer).toBe("outside");
  });

  it("ends by the shelf limit where the part lay too long, shelf and term added once", () => {
    // Shipped 31 August 2025, shelf 6 and cover 24 months: 30 months on is 28 February 2028, not 28 August 2027 + 6.
    const shipment = { shippedOn: day("2025-08-31"), to: "claimant" as const };
    const late = { shipment, fittedOn: day("2026-05-01") };
    expect(answered(late).lastCoveredOn).toBe("2028-02-28");
    expect(results(late).slice(0, 4)).toEqual([
      "termFromFitting 2028-05-01",
      "shelfLimit 2028-02-29",
      "earlierEnd 2028-02-29",
      "lastCoveredDay 2028-02-28",
    ]);
  });

  it("starts with the shipment where no fitting is recorded and the terms say so", () => {
    expect(answered({ fittedOn: null })).toMatchObject({
      answer: "covered",
      lastCoveredOn: "2027-11-30",
      serviceStartOn: "2025-12-01",
    });
  });

  it("is open without a fitting where the terms want one, until it is over whatever the fitting day", () => {
    const terms = termsWith({ startsWithoutFitting: "none" });
    expect(answered({ fittedOn: null, terms })).toMatchObject({
      answer: "open",
      lastCoveredOn: null,
      daysLeft: null,
      monthsUsed: null,
    });
    expect(against({ fittedOn: null, terms, ...failed("2028-05-31") })).toEqual(["fittingMissing"]);
    expect(against({ fittedOn: null, terms, ...failed("2028-06-01") })).toEqual(["termOverAtLatest"]);
  });

  it("cites the version of the terms in each step that rests on them", () => {
    const cited = answered({}).steps.filter(({ source }) => source === "Rule 4, 1 January 2025");
    expect(cited.map(({ rule }) => rule)).toEqual(["termFromFitting", "shelfLimit", "filingDays"]);
  });
});

describe("a unit supplied under an earlier claim", () => {
  const rootTerms = termsWith({}, "Rule 4, 1 January 2024");
  const root = { shippedOn: day("2024-01-10"), fittedOn: day("2024-02-01") };
  const middle = { shippedOn: day("2025-03-01"), fittedOn: day("2025-03-05") };
  const chain = [root, middle];

  it("keeps the rest of the root's term, however long the chain", () => {
    const unit = {
      chain,
      rootTerms,
      shipment: { shippedOn: day("2025-06-01"), to: "claimant" as const },
      fittedOn: day("2025-06-10"),
    };
    expect(answered({ ...unit, ...failed("2026-01-31") })).toMatchObject({
      answer: "covered",
      lastCoveredOn: "2026-01-31",
      serviceStartOn: "2024-02-01",
      monthsUsed: 23,
      coverTerms: rootTerms,
    });
    expect(against({ ...unit, ...failed("2026-02-01") })).toEqual(["termOver"]);
  });

  it("has the least cover of its own terms where that is longer, its months then counted from its own fitting", () => {
    const unit = { chain, rootTerms, fittedOn: day("2026-01-15") };
    // 90 days from 15 January 2026 reach to 14 April.
    expect(answered({ ...unit, ...failed("2026-04-14") })).toMatchObject({
      answer: "covered",
      lastCoveredOn: "2026-04-14",
      serviceStartOn: "2026-01-15",
      monthsUsed: 2,
    });
    expect(against({ ...unit, ...failed("2026-04-15") })).toEqual(["termOver"]);
    expect(answered({ ...unit, ...failed("2026-01-20") })).toMatchObject({
      serviceStartOn: "2024-02-01",
      monthsUsed: 23,
    });
  });

  it("is open where the days of the chain contradict each other", () => {
    expect(
      against({ chain: [{ shippedOn: day("2025-06-01"), fittedOn: day("2026-10-01") }], rootTerms }),
    ).toEqual(["failureBeforeChain"]);
  });

  it("is open where the root's terms are missing", () => {
    expect(answered({ chain, rootTerms: null })).toMatchObject({ answer: "open", lastCoveredOn: null });
    expect(against({ chain, rootTerms: null })).toEqual(["termsMissing"]);
  });

  it("begins the root's term where the root was replaced before it was ever fitted", () => {
    const wanted = termsWith({ startsWithoutFitting: "none" });
    const unit = {
      chain: [{ shippedOn: day("2025-10-01"), fittedOn: null }],
      rootTerms: wanted,
      terms: wanted,
    };
    expect(answered(unit)).toMatchObject({
      answer: "covered",
      lastCoveredOn: "2028-01-14",
      serviceStartOn: "2026-01-15",
    });
    expect(answered({ ...unit, fittedOn: null }).answer).toBe("open");
  });
});

describe("filing", () => {
  const filedOn = (on: string, lateReasonGiven = false) => ({
    filing: { filedOn: day(on), timeZone: "Europe/Vienna", lateReasonGiven },
    todayOn: day(on),
  });
  const late = (lateFiling: Terms["lateFiling"]) => ({ terms: termsWith({ lateFiling }) });

  it("is in time on the last day of the limit", () => {
    expect(against({ ...filedOn("2026-10-20"), ...late({ policy: "refuse" }) })).toEqual([]);
    expect(results(filedOn("2026-10-20"))).toContain("filingDays 30");
  });

  it("late is refused, reduced, or accepted with a reason, as the terms say", () => {
    const day31 = filedOn("2026-10-21");
    expect(against({ ...day31, ...late({ policy: "refuse" }) })).toEqual(["filedLate"]);
    expect(answered({ ...day31, ...late({ policy: "reduce", fraction: "1/2" }) })).toMatchObject({
      answer: "covered",
    });
    expect(answered({ ...day31, ...late({ policy: "reduce", fraction: "1/2" }) }).reasons).toContainEqual({
      code: "filedLateReduced",
      effect: "notes",
      detail: { daysToFiling: 31, filingLimitDays: 30, fraction: "1/2" },
    });
    expect(against({ ...day31, ...late({ policy: "accept" }) })).toEqual(["lateReasonMissing"]);
    expect(answered({ ...filedOn("2026-10-21", true), ...late({ policy: "accept" }) }).answer).toBe(
      "covered",
    );
  });

  it("names the zone of its day, and no zone makes it earlier than the failure", () => {
    const step = answered({}).steps.find(({ rule }) => rule === "filingDays");
    expect(step?.input).toEqual({
      failedOn: "2026-09-20",
      filedOn: "2026-09-25",
      timeZone: "Europe/Vienna",
      filingLimitDays: 30,
    });
    expect(results({ ...filedOn("2026-09-19"), todayOn: day("2026-09-20") })).toContain("filingDays 0");
  });
});

describe("facts that block", () => {
  it.each<[string, Partial<CoverageFacts>]>([
    ["notShipped", { shipment: null }],
    ["shippedToAnother", { shipment: { shippedOn: day("2025-12-01"), to: "otherOrganisation" } }],
    ["creditedInFull", { creditedUnder: { claimNumber: "4107-3820", ofClaimant: true } }],
    ["heldByAnotherClaim", { heldBy: { claimNumber: "4107-3820" } }],
    [
      "failureBeforeFitting",
      { failedOn: day("2026-01-14"), ...{ filing: failed("2026-01-14").filing ?? factsWith().filing } },
    ],
    ["failureBeforeShipment", { fittedOn: null, ...failed("2025-11-30") }],
    ["failureInFuture", { todayOn: day("2026-09-19") }],
    ["termOver", failed("2029-01-01")],
  ])("%s is a reason of its own", (code, change) => {
    expect(against(change)).toEqual([code]);
    expect(answered(change).answer).toBe("outside");
  });

  it("a fitting in the future is one too", () => {
    expect(against({ fittedOn: day("2026-10-01") })).toEqual(["failureBeforeFitting", "fittingInFuture"]);
  });

  it("do not hide one another", () => {
    const change = {
      heldBy: { claimNumber: "4107-3820" },
      ...failed("2029-01-01"),
      price: "unknown" as const,
    };
    expect(against(change)).toEqual(["heldByAnotherClaim", "termOver", "priceUnknown"]);
    expect(answered(change).answer).toBe("outside");
  });

  it("another site of the same organisation is fine, and a transfer where the terms allow it", () => {
    expect(answered({ shipment: { shippedOn: day("2025-12-01"), to: "otherSite" } }).answer).toBe("covered");
    const transferred = answered({
      shipment: { shippedOn: day("2025-12-01"), to: "otherOrganisation" },
      terms: termsWith({ transfer: "allowed" }),
    });
    expect(transferred.answer).toBe("covered");
    expect(transferred.reasons.map(({ code }) => code)).toContain("transferred");
  });
});

describe("facts that leave it open", () => {
  it.each<[string, Partial<CoverageFacts>]>([
    ["priceUnknown", { price: "unknown" }],
    ["evidenceMissing", { evidenceMissing: 2 }],
    ["termsMissing", { terms: null }],
    ["shipmentUnknown", { serial: null, shipment: null }],
    ["fittingBeforeShipment", { fittedOn: day("2025-11-01") }],
  ])("%s", (code, change) => {
    expect(against(change)).toEqual([code]);
    expect(answered(change).answer).toBe("open");
  });

  it("a price from a dated list or typed with a reason is enough, and is noted", () => {
    expect(answered({ price: "datedList" })).toMatchObject({ answer: "covered" });
    expect(answered({ price: "typed" }).reasons.map(({ code }) => code)).toContain("priceTyped");
  });
});
