import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { storedDraft } from "@/lib/claims/draft-shape";
import { canonicalText, claimFacts } from "@/lib/claims/facts-shape";
import {
  CLAIM_STATES,
  holdsItsUnit,
  MOVES,
  VERDICT_OUTCOMES,
  type ReturnState,
} from "@/lib/claims/lifecycle";
import { REASONS } from "@/lib/claims/verdict";
import { addDays, calendarDay } from "@/lib/kernel/calendar-day";
import { keysOf } from "@/lib/kernel/keys";
import { PART_ENTRIES, PART_MOVES } from "@/lib/returns/lifecycle";
import { normaliseReturnNumber } from "@/lib/returns/number";
import { storyOn } from "@/seeders/demo-story";
import { quickRenderer } from "./quick-renderer";
import { byColumn, instant, rowsOf, text } from "./rows";

// Days that have tripped calendars before: ends of months, a leap day, both changes of the clock, weekends, a holiday.
const DAYS = [
  "2026-12-01",
  "2027-01-31",
  "2028-02-29",
  "2027-03-28",
  "2027-10-31",
  "2026-07-04",
  "2027-12-25",
];

const states = new Map(CLAIM_STATES.map((state) => [String(state), state]));
const outcomes = new Map(VERDICT_OUTCOMES.map((outcome) => [String(outcome), outcome]));
const moves = new Map(Object.entries(MOVES));
const sha256 = (of: string): string => createHash("sha256").update(of).digest("hex");

describe.each(DAYS)("told on %s", (day) => {
  const today = calendarDay(day);
  const telling = storyOn(today, { passwordHash: "hash", render: quickRenderer });
  const table = async (name: Parameters<typeof rowsOf>[1]) => rowsOf((await telling).tables, name);

  it("every claim's facts are what the product would have sent, under the hash of their one text", async () => {
    const revisions = await table("claimRevisions");
    expect(revisions.length).toBeGreaterThan(240);
    for (const revision of revisions) {
      const facts = claimFacts.parse(revision["facts"]);
      expect(sha256(canonicalText(facts))).toBe(revision["sha256"]);
    }
    const drafts = await table("claimDrafts");
    for (const { body } of drafts) expect(storedDraft(body)).toEqual(body);
  });

  it("days run forward: shipped, fitted, failed, filed, today", async () => {
    for (const { facts } of await table("claimRevisions")) {
      const { lines, failedOn, repairedOn, filedOn } = claimFacts.parse(facts);
      for (const line of lines) {
        const known = [
          line.invoiceLine?.shippedOn,
          line.fittedOn,
          failedOn,
          repairedOn,
          filedOn,
          addDays(today, -1),
        ];
        const chain = known.filter((one) => one !== null && one !== undefined);
        expect(chain.toSorted()).toEqual(chain);
      }
    }
    const shippedOn = new Map(
      (await table("invoiceLines")).map((line) => [text(line, "id"), text(line, "shippedOn")]),
    );
    const soldOn = new Map(
      (await table("units")).map((unit) => [text(unit, "id"), shippedOn.get(text(unit, "invoiceLineId"))]),
    );
    for (const fitting of await table("fittings")) {
      const fittedOn = text(fitting, "fittedOn");
      expect((soldOn.get(text(fitting, "unitId")) ?? "9999") <= fittedOn).toBe(true);
      if (fitting["removedOn"] !== null) expect(fittedOn <= text(fitting, "removedOn")).toBe(true);
    }
  });

  it("every claim goes only where the table of moves lets it, forward in time, and ends in the state it stands in", async () => {
    const entries = byColumn(await table("timelineEntries"), "claimId");
    for (const claim of await table("claims")) {
      let state = states.get("draft");
      let lastAt = 0;
      for (const entry of entries.get(text(claim, "id")) ?? []) {
        const move = moves.get(text(entry, "kind"));
        if (move) {
          expect(move.from).toContain(state);
          state = move.to;
        }
        expect(instant(entry, "at").getTime()).toBeGreaterThan(lastAt);
        lastAt = instant(entry, "at").getTime();
      }
      expect(state).toBe(claim["state"]);
      expect(lastAt).toBeLessThan(Date.parse(`${day}T00:00:00Z`));
    }
  });

  it("no unit is held twice, and a line holds its unit exactly while it is live", async () => {
    const claims = new Map((await table("claims")).map((claim) => [text(claim, "id"), claim]));
    const held: string[] = [];
    for (const line of await table("claimLines")) {
      const state = states.get(text(claims.get(text(line, "claimId")), "state"));
      const verdict = outcomes.get(String(line["verdict"])) ?? null;
      const holds = line["unitId"] !== null && state !== undefined && holdsItsUnit(state, verdict);
      expect(line["holdsUnit"]).toBe(holds);
      if (holds) held.push(text(line, "unitId"));
    }
    expect(new Set(held).size).toBe(held.length);
  });

  it("no unit sits in two vehicles at once", async () => {
    for (const fittings of byColumn(await table("fittings"), "unitId").values())
      expect(fittings).toHaveLength(1);
  });

  it("files are taken before they are sent, and every file of a revision is on its claim", async () => {
    const files = await table("evidenceFiles");
    for (const file of files) {
      const { captured } = file;
      const takenAt =
        typeof captured === "object" && captured !== null && "takenAt" in captured ? captured.takenAt : null;
      if (typeof takenAt === "string")
        expect(Date.parse(takenAt)).toBeLessThan(instant(file, "receivedAt").getTime());
    }
    const owners = new Map(files.map((file) => [text(file, "id"), file["claimId"]]));
    for (const revision of await table("claimRevisions")) {
      for (const { id } of claimFacts.parse(revision["facts"]).evidence)
        expect(owners.get(id)).toBe(revision["claimId"]);
    }
  });

  it("a verdict names the revision it saw, gives a reason of its outcome, and stands on the lines of its claim", async () => {
    const revisions = new Map(
      (await table("claimRevisions")).map((row) => [
        `${text(row, "claimId")} ${String(row["revision"])}`,
        row["sha256"],
      ]),
    );
    const verdicts = await table("verdicts");
    for (const verdict of verdicts) {
      expect(revisions.get(`${text(verdict, "claimId")} ${String(verdict["revision"])}`)).toBe(
        verdict["revisionSha256"],
      );
    }
    for (const line of await table("verdictLines")) {
      const outcome = outcomes.get(text(line, "outcome"));
      expect(outcome && REASONS[outcome]).toContain(line["reasonCode"]);
    }
    const reversing = verdicts.filter(({ reversesId }) => reversesId !== null);
    expect(reversing.map(({ outcome }) => outcome)).toEqual(["upheld", "upheld"]);
  });

  it("a settled claim has every credit closed and its days to contest behind it", async () => {
    const lines = byColumn(await table("claimLines"), "claimId");
    for (const claim of (await table("claims")).filter(({ state }) => state === "settled")) {
      expect(text(claim, "contestUntil") < day).toBe(true);
      for (const line of lines.get(text(claim, "id")) ?? []) {
        expect(line["verdict"] === "declined" ? ["none"] : ["allocated", "paidOut", "replaced"]).toContain(
          line["creditState"],
        );
      }
    }
  });

  it("a decided claim that is not settled owes something or may still be contested", async () => {
    const lines = byColumn(await table("claimLines"), "claimId");
    for (const claim of (await table("claims")).filter(({ state }) => state === "decided")) {
      const states = (lines.get(text(claim, "id")) ?? []).map(({ creditState }) => String(creditState));
      const isClosed = states.every((state) => ["none", "allocated", "paidOut", "replaced"].includes(state));
      // What ran out yesterday is settled by the product's own clock today.
      if (isClosed) expect(text(claim, "contestUntil") >= addDays(today, -1)).toBe(true);
    }
  });

  it("no verdict is given while a part is on its way, and none without a finding but with a reason", async () => {
    const entries = byColumn(await table("timelineEntries"), "claimId");
    for (const line of await table("claimLines")) {
      if (line["verdict"] === null) continue;
      const rests = ["notNeeded", "missing", "notSentInTime", "scrapOnSite"].includes(
        String(line["returnState"]),
      );
      if (rests) expect(line["returnWaivedReason"]).not.toBeNull();
      const kinds = (entries.get(text(line, "claimId")) ?? []).map(({ kind }) => String(kind));
      const decided = kinds.indexOf("decide");
      expect(kinds.slice(0, decided).includes("partCalledIn")).toBe(
        kinds.slice(0, decided).includes("partExamined"),
      );
    }
  });

  it("a part goes only where the table of part moves lets it, and its return tells the same", async () => {
    const entries = byColumn(await table("timelineEntries"), "claimId");
    const lines = byColumn(await table("claimLines"), "claimId");
    const moveOf = new Map(keysOf(PART_ENTRIES).map((move) => [String(PART_ENTRIES[move]), move]));
    for (const returned of await table("partReturns")) {
      const claimId = text(returned, "claimId");
      let state: ReturnState = "notNeeded";
      for (const { kind } of entries.get(claimId) ?? []) {
        const move = moveOf.get(String(kind));
        if (!move) continue;
        expect(PART_MOVES[move].from).toContain(state);
        state = PART_MOVES[move].to;
      }
      expect((lines.get(claimId) ?? []).map(({ returnState }) => returnState)).toContain(state);
      expect(normaliseReturnNumber(text(returned, "number"))).toBe(returned["number"]);
    }
    for (const line of await table("returnLines"))
      expect(line["receivedAt"] === null).toBe(line["parcelId"] === null);
  });
});
