import { createHash } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { CLAIM_STATES, CREDIT_STATES, RETURN_STATES } from "@/lib/claims/lifecycle";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { isClaimNumber } from "@/lib/labels/check-digit";
import { printClaimNumber } from "@/lib/claims/number";
import { ROLES } from "@/lib/access/roles";
import { DISPOSALS, FINDING_KINDS } from "@/lib/returns/kinds";
import { FAMILY_CODES } from "@/lib/parts/families";
import { storyOn, type Story } from "@/seeders/demo-story";
import { ORGANISATIONS } from "@/seeders/story/organisations";
import { PEOPLE, peopleList } from "@/seeders/story/people";
import { TABLES } from "@/seeders/tables";
import { quickRenderer } from "./quick-renderer";
import { byColumn, rowsOf, text } from "./rows";

const TODAY = calendarDay("2026-12-01");
const told = (day = TODAY): Promise<Story> => storyOn(day, { passwordHash: "hash", render: quickRenderer });
const fingerprint = ({ tables, files }: Story): string =>
  createHash("sha256")
    .update(JSON.stringify([tables, files.map(({ sha256 }) => sha256)]))
    .digest("hex");

let story: Story;
beforeAll(async () => {
  story = await told();
});

describe("the demo story", () => {
  it("is the same to the byte for the same day", async () => {
    expect(fingerprint(await told())).toBe(fingerprint(story));
  });

  it("moves its days with the day it is told, and keeps its size", async () => {
    const later = await told(calendarDay("2027-03-17"));
    expect(fingerprint(later)).not.toBe(fingerprint(story));
    expect(later.world.units.length).toBe(story.world.units.length);
    expect(later.cases.length).toBe(story.cases.length);
  });

  it("has the size the tour speaks of: 40 batches, some 6,000 units, three quarters of them fitted", () => {
    expect(story.world.batches).toHaveLength(40);
    expect(new Set(story.world.batches.map(({ part }) => part.family))).toEqual(new Set(FAMILY_CODES));
    expect(story.world.units.length).toBeGreaterThan(5_700);
    expect(story.world.units.length).toBeLessThan(6_400);
    const share = story.world.fittings.length / story.world.units.length;
    expect(share).toBeGreaterThan(0.7);
    expect(share).toBeLessThan(0.8);
  });

  it("shows a claim in every state, and every outcome", () => {
    const claims = rowsOf(story.tables, "claims");
    expect(new Set(claims.map(({ state }) => state))).toEqual(new Set(CLAIM_STATES));
    const outcomes = claims.filter(({ state }) => state === "decided").map(({ outcome }) => outcome);
    expect(new Set(outcomes)).toEqual(new Set(["upheld", "upheldInPart", "declined"]));
    expect(claims.length).toBeGreaterThanOrEqual(240);
    expect(claims.length).toBeLessThanOrEqual(260);
  });

  it("shows every state of the part and of the credit, and every way a part may end", () => {
    const lines = rowsOf(story.tables, "claimLines");
    expect(new Set(lines.map(({ returnState }) => returnState))).toEqual(new Set(RETURN_STATES));
    expect(new Set(lines.map(({ creditState }) => creditState))).toEqual(new Set(CREDIT_STATES));
    const ends = rowsOf(story.tables, "returnLines").flatMap(({ disposedAs }) =>
      disposedAs === null ? [] : [disposedAs],
    );
    expect(new Set(ends)).toEqual(new Set(DISPOSALS));
    const findings = rowsOf(story.tables, "findings").map(({ kind }) => kind);
    expect(new Set(findings)).toEqual(new Set(FINDING_KINDS));
  });

  it("has work on every desk of both distributors", () => {
    for (const seller of [ORGANISATIONS.larkmoor.id, ORGANISATIONS.fenwright.id]) {
      const claims = rowsOf(story.tables, "claims").filter(({ sellerId }) => sellerId === seller);
      const waiting = claims.filter(({ state }) => state === "filed" || state === "contested");
      expect(waiting.length).toBeGreaterThanOrEqual(30);
      const lines = rowsOf(story.tables, "claimLines").filter(({ sellerId }) => sellerId === seller);
      for (const state of ["awaited", "sent", "received", "examined"])
        expect(lines.filter(({ returnState }) => returnState === state).length, state).toBeGreaterThan(0);
      for (const state of ["due", "noteIssued"])
        expect(lines.filter(({ creditState }) => creditState === state).length, state).toBeGreaterThan(1);
    }
  });

  it("shows the first assessor a claim in her hands that waits for no part, before the others", () => {
    const held = rowsOf(story.tables, "claims")
      .filter(({ state, holderId }) => state === "beingJudged" && holderId === PEOPLE.ada.id)
      .filter(({ safetyReported }) => safetyReported === true);
    expect(held).toHaveLength(1);
    const lines = rowsOf(story.tables, "claimLines").filter(({ claimId }) => claimId === held[0]?.["id"]);
    expect(lines.map(({ returnState }) => returnState)).toEqual(["notNeeded"]);
  });

  it("has one person who works in two places", () => {
    const places = byColumn(rowsOf(story.tables, "memberships"), "userId");
    expect([...places].filter(([, own]) => own.length > 1).map(([id]) => id)).toEqual([PEOPLE.kit.id]);
  });

  it("writes every table it says it writes", () => {
    const empty = TABLES.filter((table) => rowsOf(story.tables, table).length === 0);
    expect(empty).toEqual([]);
  });

  it("gives every row of a table the same columns, as the bulk insert needs", () => {
    for (const table of TABLES) {
      const shapes = new Set(rowsOf(story.tables, table).map((row) => Object.keys(row).sort().join(",")));
      expect([table, shapes.size]).toEqual([table, 1]);
    }
  });

  it("numbers claims with a check digit, each once, telling no count", () => {
    const numbers = rowsOf(story.tables, "claims").map((claim) => text(claim, "number"));
    expect(new Set(numbers).size).toBe(numbers.length);
    expect(numbers.filter((number) => !isClaimNumber(printClaimNumber(number)))).toEqual([]);
    expect(numbers.toSorted()).not.toEqual(numbers);
  });

  it("has somebody for every role, under an invented address", () => {
    const people = peopleList();
    expect(new Set(people.flatMap(({ roles }) => roles))).toEqual(new Set(ROLES));
    expect(people.filter(({ email }) => !email.endsWith(".example"))).toEqual([]);
    expect(new Set(people.map(({ email }) => email)).size).toBe(people.length);
    const german = rowsOf(story.tables, "users").filter(({ locale }) => locale === "de");
    expect(german.map(({ id }) => id)).toContain(PEOPLE.jonas.id);
  });

  it("has two editions of each distributor's terms, so that the day a part was shipped matters", () => {
    const terms = rowsOf(story.tables, "ruleBookVersions").filter(({ kind }) => kind === "terms");
    expect([...byColumn(terms, "sellerId").values()].map((editions) => editions.length)).toEqual([2, 2]);
    const cited = new Set(rowsOf(story.tables, "verdictLines").map(({ ruleVersionId }) => ruleVersionId));
    expect(cited.size).toBeGreaterThan(2);
  });
});

describe("the special claims", () => {
  const claimWith = (twist: string) => {
    const one = story.cases.find((candidate) => candidate.twist === twist);
    const claim = rowsOf(story.tables, "claims").find(({ number }) => number === one?.number);
    if (!one || !claim) throw new RangeError(`no claim with ${twist}`);
    const lines = rowsOf(story.tables, "claimLines").filter(({ claimId }) => claimId === claim["id"]);
    const flags = rowsOf(story.tables, "claimFlags").filter(({ claimId }) => claimId === claim["id"]);
    return { one, claim, lines, flags };
  };

  it("a pair of batteries is one claim with two lines, left and right", () => {
    const { one, lines } = claimWith("pair");
    expect(lines).toHaveLength(2);
    expect(new Set(one.lines.map(({ position }) => position))).toEqual(new Set(["left", "right"]));
  });

  it("chargers without serial are a quantity of an invoice line", () => {
    const { lines } = claimWith("noSerial");
    expect(lines[0]).toMatchObject({ unitId: null, serialTyped: null, quantity: 2, holdsUnit: false });
    expect(lines[0]?.["invoiceLineId"]).toBeTypeOf("string");
  });

  it("a unit supplied under a claim failed again, and knows the one it stands in for", () => {
    const { one: first, lines } = claimWith("chainFirst");
    const { one: second } = claimWith("chainSecond");
    expect(lines[0]).toMatchObject({ creditState: "replaced" });
    const unit = rowsOf(story.tables, "units").find(({ id }) => id === second.lines[0].unit?.id);
    expect(unit).toMatchObject({ suppliedUnderClaim: true, replacesUnitId: first.lines[0].unit?.id });
    expect(second.vehicle).toBe(first.vehicle);
  });

  it("the same photo stands on two claims, and the later one is flagged with the number of the first", () => {
    const { claim, flags } = claimWith("photoReused");
    const hashes = byColumn(rowsOf(story.tables, "evidenceFiles"), "sha256");
    const shared = [...hashes.values()].filter((files) => files.length > 1);
    expect(shared).toHaveLength(1);
    const other = shared[0]?.find(({ claimId }) => claimId !== claim["id"]);
    const first = rowsOf(story.tables, "claims").find(({ id }) => id === other?.["claimId"]);
    expect(flags).toMatchObject([{ kind: "photoSeenBefore", detail: { otherClaim: first?.["number"] } }]);
  });

  it("a doubtful serial was never shipped, and one that looks like it was", () => {
    const { lines, flags } = claimWith("serialDoubtful");
    expect(lines[0]).toMatchObject({ unitId: null, holdsUnit: false });
    expect(flags.map(({ kind }) => kind)).toEqual(["serialUnknown"]);
    const serials = rowsOf(story.tables, "units").map(({ serial }) => serial);
    expect(serials).not.toContain(lines[0]?.["serialTyped"]);
  });

  it("the second workshop's claim on a unit does not hold it; the distributor alone is told who does", () => {
    const { lines, flags } = claimWith("heldElsewhere");
    expect(lines[0]).toMatchObject({ unitId: null, holdsUnit: false });
    const held = flags.find(({ kind }) => kind === "unitHeld");
    const holder = story.cases.find(({ lines: [line] }) => line.unit?.serial === lines[0]?.["serialTyped"]);
    expect(held?.["detail"]).toEqual({ otherClaim: holder?.number });
    expect(holder?.workshop).toBe("saltmarsh");
  });

  it("a parcel is missing, and an incident is stamped with the moment it became known", () => {
    expect(claimWith("parcelLost").lines[0]).toMatchObject({ returnState: "missing" });
    expect(RETURN_STATES).toContain("missing");
    expect(claimWith("incident").claim).toMatchObject({
      safetyReported: true,
      incidentKnownAt: expect.any(Date),
    });
  });

  it("a failed unit was sold on the one zero-rated invoice", () => {
    const { one } = claimWith("zeroRated");
    const zero = rowsOf(story.tables, "invoiceLines").filter(({ taxCategory }) => taxCategory === "Z");
    expect(new Set(zero.map(({ invoiceNumber }) => invoiceNumber)).size).toBe(1);
    expect(zero.map(({ id }) => id)).toContain(one.lines[0].sale?.id);
  });
});
