import { describe, expect, it } from "vitest";
import { coverageOn } from "@/lib/coverage/coverage";
import { asSeenByWorkshop, type CoverageFacts } from "@/lib/coverage/facts";
import { day, factsWith, failed, termsWith } from "./facts";

const answered = (change: Partial<CoverageFacts>) => coverageOn(factsWith(change));
const results = (change: Partial<CoverageFacts>) =>
  answered(change).steps.map(({ rule, result }) => `${rule} ${result}`);

describe("the grace band", () => {
  const shareOfTerm = (fraction: string) => ({
    terms: termsWith({ grace: { kind: "fractionOfTerm", fraction } }),
  });

  it("lets a person consider goodwill for so many days, and not a day longer", () => {
    expect(answered(failed("2028-01-28"))).toMatchObject({
      answer: "outside",
      goodwillMayBeConsidered: true,
    });
    expect(answered(failed("2028-01-29"))).toMatchObject({
      answer: "outside",
      goodwillMayBeConsidered: false,
    });
    expect(answered(failed("2028-01-14")).goodwillMayBeConsidered).toBe(false);
  });

  it("may be a fraction of the term, whole days rounded down", () => {
    // 15 January 2026 to 14 January 2028 are 730 days: a 24th is 30.4, a 73rd is 10 to the day.
    expect(results({ ...shareOfTerm("1/24"), ...failed("2028-02-13") })).toContain("graceDays 30");
    expect(answered({ ...shareOfTerm("1/73"), ...failed("2028-01-24") }).goodwillMayBeConsidered).toBe(true);
    expect(answered({ ...shareOfTerm("1/73"), ...failed("2028-01-25") }).goodwillMayBeConsidered).toBe(false);
  });

  it("does not help a claim that fails for another reason", () => {
    expect(
      answered({ ...failed("2028-01-20"), heldBy: { claimNumber: "4107-3820" } }).goodwillMayBeConsidered,
    ).toBe(false);
  });
});

describe("what the workshop is shown", () => {
  it("differs in nothing from an honest answer when another claim holds the unit", () => {
    const held = asSeenByWorkshop(factsWith({ heldBy: { claimNumber: "4107-3820" } }));
    expect(coverageOn(held)).toEqual(coverageOn(factsWith()));
  });

  it("is the same for a serial shipped to somebody else as for one never shipped", () => {
    const elsewhere = factsWith({ shipment: { shippedOn: day("2025-12-01"), to: "otherOrganisation" } });
    expect(coverageOn(asSeenByWorkshop({ ...elsewhere, terms: null }))).toEqual(
      coverageOn(factsWith({ shipment: null, terms: null })),
    );
  });

  it("names a credit of its own only", () => {
    const credited = (ofClaimant: boolean) =>
      asSeenByWorkshop(factsWith({ creditedUnder: { claimNumber: "4107-3820", ofClaimant } }));
    expect([coverageOn(credited(true)).answer, coverageOn(credited(false)).answer]).toEqual([
      "outside",
      "covered",
    ]);
  });
});
