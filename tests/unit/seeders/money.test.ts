import { beforeAll, describe, expect, it } from "vitest";
import { thawedCredit } from "@/lib/credits/frozen-credit-shape";
import { thawedNote } from "@/lib/credits/note-shape";
import { calendarDay } from "@/lib/kernel/calendar-day";
import { storyOn, type Story } from "@/seeders/demo-story";
import type { Row } from "@/seeders/tables";
import { quickRenderer } from "./quick-renderer";
import { byColumn, grouped, rowsOf, text } from "./rows";

// A day in the middle of a year, and one at its start: the numbers begin anew.
const DAYS = ["2026-11-30", "2027-01-05"];

describe.each(DAYS)("the money of the story told on %s", (day) => {
  let story: Story;
  beforeAll(async () => {
    story = await storyOn(calendarDay(day), { passwordHash: "hash", render: quickRenderer });
  });
  const table = (name: Parameters<typeof rowsOf>[1]) => rowsOf(story.tables, name);

  it("a verdict keeps what it gives as the product reads it back, and a declined line gives nothing", () => {
    for (const verdict of table("verdicts")) {
      const credit = thawedCredit(verdict["credit"]);
      expect(String(credit?.netMinor)).toBe(verdict["creditNetMinor"]);
      expect(String(credit?.totalMinor)).toBe(verdict["creditTotalMinor"]);
      if (verdict["outcome"] === "declined") expect(credit?.totalMinor).toBe(0n);
      else expect(credit?.totalMinor).toBeGreaterThan(0n);
    }
  });

  it("notes are numbered without a gap in the order of their days, and hold the sums of their lines", () => {
    const lines = byColumn(table("creditNoteLines"), "noteId");
    const notes = table("creditNotes");
    const series = new Map(
      table("creditNoteSeries").map((one) => [`${text(one, "sellerId")} ${String(one["year"])}`, one]),
    );
    for (const [name, own] of grouped(notes, (note) => `${text(note, "sellerId")} ${String(note["year"])}`)) {
      const inOrder = own.toSorted((a, b) => Number(a["sequence"]) - Number(b["sequence"]));
      expect(inOrder.map(({ sequence }) => sequence)).toEqual(inOrder.map((_, place) => place + 1));
      expect(inOrder.map(({ issuedOn }) => issuedOn).toSorted()).toEqual(
        inOrder.map(({ issuedOn }) => issuedOn),
      );
      expect(series.get(name)).toMatchObject({
        lastSequence: inOrder.length,
        lastIssuedOn: inOrder.at(-1)?.["issuedOn"],
      });
    }
    for (const note of notes) {
      const document = thawedNote(note["document"]);
      const own = lines.get(text(note, "id")) ?? [];
      const sum = own.reduce((so, line) => so + BigInt(text(line, "netMinor")), 0n);
      const allowed = document.allowances.reduce((so, { amountMinor }) => so + amountMinor, 0n);
      expect(sum - allowed).toBe(BigInt(text(note, "netMinor")));
      expect(document.totalMinor).toBe(BigInt(text(note, "totalMinor")));
      expect(document.number).toBe(note["number"]);
      expect(text(note, "issuedOn") < day).toBe(true);
    }
  });

  it("the Day book balances entry by entry, and what workshops are owed is what is open of their notes", () => {
    const postings = table("ledgerPostings");
    const entryOf = (row: Row): string => `${text(row, "sellerId")} ${String(row["sequence"])}`;
    const minor = (rows: readonly Row[], column: string): bigint =>
      rows.reduce((so, row) => so + BigInt(text(row, column)), 0n);
    const byEntry = grouped(postings, entryOf);
    for (const own of byEntry.values()) expect(minor(own, "amountMinor")).toBe(0n);
    expect(byEntry.size).toBe(table("ledgerEntries").length);
    const notes = table("creditNotes");
    const issued = minor(
      notes.filter(({ kind }) => kind === "credit"),
      "totalMinor",
    );
    const countered = minor(
      notes.filter(({ kind }) => kind === "counter"),
      "totalMinor",
    );
    const allocated = minor(table("creditAllocations"), "amountMinor");
    const payable = postings.filter(({ account }) => account === "workshopPayable");
    expect(-minor(payable, "amountMinor")).toBe(issued - countered - allocated);
    for (const head of table("ledgerHeads")) {
      const own = table("ledgerEntries").filter(({ sellerId }) => sellerId === head["sellerId"]);
      expect(own.map(({ sequence }) => sequence)).toEqual(own.map((_, place) => place + 1));
      expect(own.map(({ entryOn }) => entryOn).toSorted()).toEqual(own.map(({ entryOn }) => entryOn));
      expect(head["sequence"]).toBe(own.length);
    }
  });

  it("a line stands in its credit as the note of its claim does", () => {
    const allocated = new Map(
      table("creditAllocations").map((one) => [text(one, "noteId"), text(one, "how")]),
    );
    const countered = new Set(table("creditNotes").map(({ countersId }) => countersId));
    const noted = new Map(
      table("creditNotes")
        .filter(({ kind }) => kind === "credit")
        .map((note) => [text(note, "claimId"), note]),
    );
    for (const line of table("claimLines")) {
      const note = noted.get(text(line, "claimId"));
      const state = String(line["creditState"]);
      if (state === "due" || state === "replaced") expect(note).toBeUndefined();
      if (state === "countered") expect(countered.has(note?.["id"])).toBe(true);
      if (state === "paidOut") expect(allocated.get(text(note, "id"))).toBe("paidOut");
      if (state === "allocated") expect(allocated.get(text(note, "id"))).toBe("invoice");
    }
  });
});
